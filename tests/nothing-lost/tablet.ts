import type { RecordReading } from '@/lib/api/commissioning';
import { deviceShelf } from '@/lib/client/device-database';
import { Outbox } from '@/lib/client/outbox';
import { sendKept } from '@/lib/client/send-kept';

/** The application's own outbox in a real browser, on a page without anything else: what a tablet keeps and sends. */
export interface Tablet {
  /** Resolves when the reading is safe on the device: the moment at which the screen says so. */
  enter(personId: string, loopId: string, roundId: string, body: RecordReading): Promise<void>;
  send(personId: string): Promise<void>;
  waiting(personId: string): Promise<{ waiting: number; refusals: string[] }>;
}

declare global {
  interface Window {
    tablet: Tablet;
  }
}

let outbox: Outbox | null = null;

async function open(personId: string): Promise<Outbox> {
  if (!outbox) {
    outbox = new Outbox({ personId, shelf: deviceShelf, send: sendKept, onAcknowledged: () => undefined });
    await outbox.load();
  }
  return outbox;
}

window.tablet = {
  async enter(personId, loopId, roundId, body) {
    const kept = await open(personId);
    await kept.keep(loopId, 'station', { kind: 'reading', roundId, body });
    if (!kept.state.isStored) throw new Error('the browser has no room');
  },
  async send(personId) {
    await (await open(personId)).send();
  },
  async waiting(personId) {
    const kept = await open(personId);
    await kept.load();
    const refusals = kept.state.entries.flatMap(({ refusal }) => (refusal === null ? [] : [refusal]));
    return { waiting: kept.state.entries.length, refusals };
  },
};
