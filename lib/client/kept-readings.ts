import { z } from 'zod';
import { recordReadingSchema, type Reading, type RecordReading } from '@/lib/api/commissioning';
import { RequestError } from './http';

const keptSchema = z.object({
  roundId: z.uuid(),
  reading: recordReadingSchema,
  /** The station's tag, for the list of what waits. */
  tag: z.string(),
  /** Why the server does not take it; null while it only waits. */
  refusal: z.string().nullable(),
});
export type KeptReading = z.infer<typeof keptSchema>;

export interface KeptState {
  entries: KeptReading[];
  isSending: boolean;
  /** Whether the last try found no server. */
  isOffline: boolean;
  /** Whether the last try was refused because the session has ended. */
  isSignedOut: boolean;
  /** Whether an entry was acknowledged since this page came. */
  hasSent: boolean;
  /** When the server last acknowledged an entry from this tablet, ISO. */
  lastSentAt: string | null;
  /** False where this browser has no room: then the entries live only as long as the page. */
  isStored: boolean;
}

type Shelf = Pick<Storage, 'getItem' | 'setItem'>;

interface Options {
  shelf: Shelf;
  key: string;
  send: (roundId: string, reading: RecordReading) => Promise<Reading>;
  onAcknowledged: (reading: Reading) => void;
}

/**
 * Keeps every reading on this tablet from the moment it is entered until the server has acknowledged it, and sends them one after
 * another in the order they were taken. Each goes under the id it was made with, so one that is sent again is stored once.
 */
export class KeptReadings {
  state: KeptState;
  private options: Options;
  private listeners = new Set<() => void>();
  private sending: Promise<void> | null = null;

  constructor(options: Options) {
    this.options = options;
    this.state = {
      entries: this.read(),
      isSending: false,
      isOffline: false,
      isSignedOut: false,
      hasSent: false,
      lastSentAt: options.shelf.getItem(`${options.key}.sent`),
      isStored: true,
    };
  }

  keep(entry: Omit<KeptReading, 'refusal'>): void {
    this.update((entries) => [...entries.filter(({ reading }) => reading.id !== entry.reading.id), { ...entry, refusal: null }]);
  }

  /** Lets go of an entry that the person takes back. */
  release(id: string): void {
    this.update((entries) => entries.filter(({ reading }) => reading.id !== id));
  }

  /**
   * Takes a refused entry over into another round and sends it there. What it put right stands in the round it was refused for, so it counts as
   * an entry of its own now; the reason stays as its note.
   */
  moveTo(id: string, roundId: string): Promise<void> {
    this.update((entries) =>
      entries.map((entry) =>
        entry.reading.id === id ? { ...entry, roundId, refusal: null, reading: { ...entry.reading, correctsReadingId: null } } : entry,
      ),
    );
    return this.send();
  }

  /** Sends all that wait; at most one round of sending goes on at a time. */
  send(): Promise<void> {
    this.sending ??= this.sendAll().finally(() => {
      this.sending = null;
      this.tell({ isSending: false });
    });
    return this.sending;
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  private async sendAll(): Promise<void> {
    // Another page of this browser may have kept or sent some since.
    this.tell({ isSending: true, entries: this.merged() });
    const tried = new Set<string>();
    for (;;) {
      const next = this.state.entries.find(({ reading, refusal }) => refusal === null && !tried.has(reading.id));
      if (!next) return;
      tried.add(next.reading.id);
      try {
        const stored = await this.options.send(next.roundId, next.reading);
        this.release(stored.id);
        const lastSentAt = new Date().toISOString();
        this.tell({ isOffline: false, isSignedOut: false, hasSent: true, lastSentAt });
        this.write(`${this.options.key}.sent`, lastSentAt);
        this.options.onAcknowledged(stored);
      } catch (error) {
        if (!(error instanceof RequestError)) throw error;
        if (mayComeRight(error)) return this.tell({ isOffline: error.code !== 'signed-out', isSignedOut: error.code === 'signed-out' });
        this.refuse(next.reading.id, error.fields[0]?.message ?? error.message);
      }
    }
  }

  private refuse(id: string, refusal: string): void {
    this.update((entries) => entries.map((entry) => (entry.reading.id === id ? { ...entry, refusal } : entry)));
  }

  private merged(): KeptReading[] {
    return this.state.isStored ? this.read() : this.state.entries;
  }

  private update(change: (entries: KeptReading[]) => KeptReading[]): void {
    const entries = change(this.merged());
    this.tell({ entries, isStored: this.store(entries) });
  }

  private read(): KeptReading[] {
    const text = this.options.shelf.getItem(this.options.key);
    if (text === null) return [];
    try {
      return z.array(keptSchema).safeParse(JSON.parse(text)).data ?? [];
    } catch (error) {
      // A write that was cut off holds no reading; anything else is a fault of ours.
      if (error instanceof SyntaxError) return [];
      throw error;
    }
  }

  private store(entries: KeptReading[]): boolean {
    return this.write(this.options.key, JSON.stringify(entries));
  }

  private write(key: string, text: string): boolean {
    try {
      this.options.shelf.setItem(key, text);
      return true;
    } catch (error) {
      if (error instanceof DOMException) return false;
      throw error;
    }
  }

  private tell(change: Partial<KeptState>): void {
    this.state = { ...this.state, ...change };
    for (const listener of this.listeners) listener();
  }
}

/** No answer, a fault of the server, or a session that has ended: the entry waits and is sent again. Anything else is its refusal. */
const mayComeRight = ({ code, status }: RequestError): boolean => code === 'offline' || code === 'signed-out' || status >= 500;
