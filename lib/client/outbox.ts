import { RequestError } from './http';
import type { KeptContent, KeptEntry } from './kept-entry';

export interface OutboxState {
  entries: KeptEntry[];
  /** Whether what was kept before this page came has been read. */
  isLoaded: boolean;
  isSending: boolean;
  /** Whether the last try found no server. */
  isOffline: boolean;
  /** Whether the last try was refused because the session has ended. */
  isSignedOut: boolean;
  /** Whether an entry was acknowledged since this page came. */
  hasSent: boolean;
  /** When the server last acknowledged an entry from this device, ISO. */
  lastSentAt: string | null;
  /** False where this browser has no room: then what it could not store lives only as long as the page. */
  isStored: boolean;
}

export const emptyOutbox: OutboxState = {
  entries: [],
  isLoaded: false,
  isSending: false,
  isOffline: false,
  isSignedOut: false,
  hasSent: false,
  lastSentAt: null,
  isStored: true,
};

/** Where entries lie on the device. A promise resolves only when the change would outlive the power being cut. */
export interface OutboxShelf {
  entriesOf(personId: string): Promise<KeptEntry[]>;
  put(entry: KeptEntry): Promise<void>;
  remove(id: string): Promise<void>;
}

interface Options {
  shelf: OutboxShelf;
  personId: string;
  /** Sends one entry; resolves with the server's answer when it has acknowledged it, throws `RequestError` otherwise. */
  send: (entry: KeptEntry) => Promise<unknown>;
  onAcknowledged: (entry: KeptEntry, answer: unknown) => void;
  /** Lets one page of the browser send at a time. */
  alone?: (work: () => Promise<void>) => Promise<void>;
}

/**
 * Keeps every entry on this device from the moment it is made until the server has acknowledged it, and sends them one after another in
 * the order they were made. Each goes under the id it was made with, so one that is sent again is stored once.
 */
export class Outbox {
  state: OutboxState = emptyOutbox;
  private listeners = new Set<() => void>();
  private sending: Promise<void> | null = null;
  /** Entries that could not be stored: kept by this page alone. */
  private unstored = new Map<string, KeptEntry>();

  constructor(private options: Options) {}

  /** Reads what is on the device; also after another page of this browser has changed it. */
  async load(): Promise<void> {
    let stored: KeptEntry[] = [];
    try {
      stored = await this.options.shelf.entriesOf(this.options.personId);
    } catch (error) {
      // A browser that keeps nothing: what was entered on this page is still in `unstored`.
      if (!(error instanceof DOMException)) throw error;
    }
    const entries = [...stored.filter(({ id }) => !this.unstored.has(id)), ...this.unstored.values()].sort(inOrder);
    this.tell({ entries, isLoaded: true, isStored: this.unstored.size === 0 });
  }

  /** Resolves when the entry is safe on the device, or known not to be (`isStored`). */
  async keep(loopId: string, tag: string, content: KeptContent): Promise<KeptEntry> {
    const order = 1 + Math.max(0, ...this.state.entries.map((entry) => entry.order));
    const entry: KeptEntry = { id: content.body.id, personId: this.options.personId, loopId, tag, order, refusal: null, content };
    await this.write(entry);
    return entry;
  }

  /** Lets go of an entry that the person takes back or throws away. */
  async release(id: string): Promise<void> {
    this.unstored.delete(id);
    try {
      await this.options.shelf.remove(id);
    } catch (error) {
      if (!(error instanceof DOMException)) throw error;
    }
    this.tell({ entries: this.state.entries.filter((entry) => entry.id !== id), isStored: this.unstored.size === 0 });
  }

  /**
   * Takes a refused reading or setting over into another round and sends it there. What it put right stands in the round it was refused
   * for, so it counts as an entry of its own now; the reason stays as its note.
   */
  async moveTo(id: string, roundId: string): Promise<void> {
    const entry = this.state.entries.find((it) => it.id === id);
    if (!entry) return;
    const { content } = entry;
    if (content.kind === 'reading')
      await this.write({ ...entry, refusal: null, content: { ...content, roundId, body: { ...content.body, correctsReadingId: null } } });
    else if (content.kind === 'setting') await this.write({ ...entry, refusal: null, content: { ...content, roundId } });
    await this.send();
  }

  /** Tries a refused entry again as it is, e.g. after a right was given back. */
  async tryAgain(id: string): Promise<void> {
    const entry = this.state.entries.find((it) => it.id === id);
    if (entry) await this.write({ ...entry, refusal: null });
    await this.send();
  }

  /** Sends all that wait; at most one round of sending goes on at a time. */
  send(): Promise<void> {
    const alone = this.options.alone ?? ((work) => work());
    this.sending ??= alone(() => this.sendAll()).finally(() => {
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
    this.tell({ isSending: true });
    // Another page of this browser may have kept or sent some since.
    await this.load();
    const tried = new Set<string>();
    for (;;) {
      const next = this.state.entries.find(({ id, refusal }) => refusal === null && !tried.has(id));
      if (!next) return;
      tried.add(next.id);
      try {
        const answer = await this.options.send(next);
        await this.release(next.id);
        this.tell({ isOffline: false, isSignedOut: false, hasSent: true, lastSentAt: new Date().toISOString() });
        this.options.onAcknowledged(next, answer);
      } catch (error) {
        if (!(error instanceof RequestError)) throw error;
        if (mayComeRight(error)) return this.tell({ isOffline: error.code !== 'signed-out', isSignedOut: error.code === 'signed-out' });
        await this.write({ ...next, refusal: error.fields[0]?.message ?? error.message });
      }
    }
  }

  private async write(entry: KeptEntry): Promise<void> {
    this.unstored.delete(entry.id);
    try {
      await this.options.shelf.put(entry);
    } catch (error) {
      // A full or a private browser: the entry lives on in this page, and the line says so.
      if (!(error instanceof DOMException)) throw error;
      this.unstored.set(entry.id, entry);
    }
    const entries = [...this.state.entries.filter(({ id }) => id !== entry.id), entry].sort(inOrder);
    this.tell({ entries, isStored: this.unstored.size === 0 });
  }

  private tell(change: Partial<OutboxState>): void {
    this.state = { ...this.state, ...change };
    for (const listener of this.listeners) listener();
  }
}

const inOrder = (a: KeptEntry, b: KeptEntry): number => a.order - b.order || a.id.localeCompare(b.id);

/**
 * No answer, a fault of the server, too many at once, or a session that has ended or is another person's now: the entry waits and is sent
 * again. Anything else is its refusal.
 */
const mayComeRight = ({ code, status }: RequestError): boolean =>
  code === 'offline' || code === 'signed-out' || status >= 500 || status === 429 || status === 408;
