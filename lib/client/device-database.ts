import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { AboardLoop } from './aboard';
import { keptEntrySchema, type KeptEntry } from './kept-entry';
import type { OutboxShelf } from './outbox';

interface DeviceSchema extends DBSchema {
  outbox: { key: string; value: KeptEntry; indexes: { personId: string } };
  aboard: { key: [personId: string, loopId: string]; value: AboardLoop; indexes: { personId: string } };
}

let opened: Promise<IDBPDatabase<DeviceSchema>> | null = null;

/** What this browser keeps for Evenhead: entries that are not sent yet, and the loops that were taken along. */
export function deviceDatabase(): Promise<IDBPDatabase<DeviceSchema>> {
  opened ??= openDB<DeviceSchema>('evenhead', 1, {
    upgrade(database) {
      database.createObjectStore('outbox', { keyPath: 'id' }).createIndex('personId', 'personId');
      database.createObjectStore('aboard', { keyPath: ['personId', 'loop.id'] }).createIndex('personId', 'personId');
    },
    terminated() {
      opened = null;
    },
  }).catch((error: unknown) => {
    opened = null;
    throw error;
  });
  return opened;
}

/** Entries in IndexedDB. `strict`: written through to the disk before the promise resolves. */
export const deviceShelf: OutboxShelf = {
  async entriesOf(personId) {
    const database = await deviceDatabase();
    const rows = await database.getAllFromIndex('outbox', 'personId', personId);
    return rows.map((row) => keptEntrySchema.parse(row));
  },
  async put(entry) {
    const transaction = (await deviceDatabase()).transaction('outbox', 'readwrite', { durability: 'strict' });
    await Promise.all([transaction.store.put(entry), transaction.done]);
  },
  async remove(id) {
    const transaction = (await deviceDatabase()).transaction('outbox', 'readwrite', { durability: 'strict' });
    await Promise.all([transaction.store.delete(id), transaction.done]);
  },
};
