import type { DraftBody, SavedDraft } from '@/lib/api/loops';
import type { Drawing } from '@/lib/network/drawing';
import { same } from '@/lib/network/merge-drawings';
import { RequestError } from './http';
import type { DraftKeeper } from './kept-drafts';

export type SaveState =
  | { kind: 'saved'; at: string }
  | { kind: 'waiting' }
  | { kind: 'saving' }
  /** No answer from the server: kept in this browser (unless it has no room) and tried again. */
  | { kind: 'offline'; isKept: boolean }
  | { kind: 'refused'; message: string }
  | { kind: 'conflict'; base: Drawing; theirs: DraftBody };

const SAVE_AFTER_MS = 800;
const KEEP_AFTER_MS = 200;
const RETRY_AFTER_MS = 5_000;

interface SaverOptions {
  loaded: DraftBody;
  keeper: DraftKeeper;
  save: (baseVersion: number, drawing: Drawing) => Promise<SavedDraft>;
}

/**
 * Saves a drawing by itself: a moment after the last change, one request at a time, again and again while the server
 * cannot be reached. Until the server has acknowledged a change it is kept in the browser.
 */
export class DraftSaver {
  state: SaveState;
  /** The version of the draft that the server last acknowledged here. */
  version: number;
  private savedAt: string;
  private base: Drawing;
  private drawing: Drawing;
  private keeper: DraftKeeper;
  private save: SaverOptions['save'];
  private saveTimer: ReturnType<typeof setTimeout> | undefined;
  private keepTimer: ReturnType<typeof setTimeout> | undefined;
  private isSending = false;
  private listeners = new Set<() => void>();

  constructor({ loaded, keeper, save }: SaverOptions) {
    this.keeper = keeper;
    this.save = save;
    this.version = loaded.version;
    this.base = loaded.drawing;
    this.drawing = loaded.drawing;
    this.savedAt = loaded.savedAt;
    this.state = { kind: 'saved', at: loaded.savedAt };
  }

  /** What this browser still keeps from before; it is taken up again and saved. Null where there is nothing new in it. */
  restore(): Drawing | null {
    const kept = this.keeper.read();
    if (!kept || same(kept.drawing, this.drawing)) return null;
    this.version = kept.baseVersion;
    this.base = kept.base;
    this.change(kept.drawing);
    return kept.drawing;
  }

  change(drawing: Drawing): void {
    if (drawing === this.drawing) return;
    this.drawing = drawing;
    clearTimeout(this.keepTimer);
    this.keepTimer = setTimeout(() => this.keep(), KEEP_AFTER_MS);
    if (this.state.kind === 'conflict') return;
    if (this.state.kind !== 'offline') this.tell({ kind: 'waiting' });
    this.saveAfter(SAVE_AFTER_MS);
  }

  /** Writes what is not acknowledged to the browser at once: the page may be going. */
  keep(): boolean {
    clearTimeout(this.keepTimer);
    if (this.drawing === this.base) return true;
    return this.keeper.keep({ baseVersion: this.version, base: this.base, drawing: this.drawing });
  }

  /** Saves at once, waiting for the answer; false where it is not saved. */
  async saveNow(): Promise<boolean> {
    clearTimeout(this.saveTimer);
    if (this.isSending || this.state.kind === 'conflict') return false;
    if (this.drawing === this.base) {
      // Undone to what is saved: there is nothing to send, and nothing to keep.
      this.rest();
      return true;
    }
    const sent = this.drawing;
    this.isSending = true;
    this.tell({ kind: 'saving' });
    try {
      const saved = await this.save(this.version, sent);
      this.isSending = false;
      this.acknowledge(sent, saved);
      return this.drawing === sent;
    } catch (error) {
      this.isSending = false;
      this.refuse(error);
      return false;
    }
  }

  /** Goes on from what the other person saved, with the drawing that both sides were merged into. */
  resolve(merged: Drawing, theirs: DraftBody): void {
    this.version = theirs.version;
    this.base = theirs.drawing;
    this.drawing = merged;
    this.tell({ kind: 'waiting' });
    this.keep();
    this.saveAfter(0);
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Goes on with what is not acknowledged yet, after `stop` or a restored drawing. */
  start(): void {
    if (this.drawing !== this.base && this.state.kind !== 'conflict') this.saveAfter(SAVE_AFTER_MS);
  }

  stop(): void {
    this.keep();
    clearTimeout(this.saveTimer);
  }

  private acknowledge(sent: Drawing, saved: SavedDraft): void {
    this.version = saved.version;
    this.savedAt = saved.savedAt;
    this.base = sent;
    if (this.drawing === sent) {
      this.rest();
      return;
    }
    this.keep();
    this.tell({ kind: 'waiting' });
    this.saveAfter(SAVE_AFTER_MS);
  }

  private rest(): void {
    clearTimeout(this.keepTimer);
    this.keeper.release();
    this.tell({ kind: 'saved', at: this.savedAt });
  }

  private refuse(error: unknown): void {
    const isKept = this.keep();
    if (!(error instanceof RequestError)) throw error;
    if (error.code === 'draft-changed') {
      this.tell({ kind: 'conflict', base: this.base, theirs: error.problem?.detail as DraftBody });
    } else if (error.code === 'offline' || error.status >= 500) {
      this.tell({ kind: 'offline', isKept });
      this.saveAfter(RETRY_AFTER_MS);
    } else {
      this.tell({ kind: 'refused', message: error.message });
    }
  }

  private saveAfter(ms: number): void {
    clearTimeout(this.saveTimer);
    this.saveTimer = setTimeout(() => void this.saveNow(), ms);
  }

  private tell(state: SaveState): void {
    this.state = state;
    for (const listener of this.listeners) listener();
  }
}
