import { z } from 'zod';
import { drawingSchema, type Drawing } from '@/lib/network/drawing';

/** What was drawn but not yet acknowledged by the server, with the saved drawing it was made from. */
export interface KeptDraft {
  baseVersion: number;
  base: Drawing;
  drawing: Drawing;
}

const keptSchema = z.object({ keeper: z.string(), baseVersion: z.number().int(), base: drawingSchema, drawing: drawingSchema });

export interface DraftKeeper {
  read(): KeptDraft | null;
  /** False where this browser has no room for it. */
  keep(draft: KeptDraft): boolean;
  /** Lets go of what this page kept; what another page of the same person kept stays. */
  release(): void;
}

type Shelf = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

/** Keeps one person's unsaved drawing of one loop in this browser. */
export function draftKeeper(shelf: Shelf, personId: string, loopId: string, keeper: string): DraftKeeper {
  const key = `evenhead.draft.${personId}.${loopId}`;
  const stored = () => {
    const text = shelf.getItem(key);
    if (text === null) return null;
    try {
      return keptSchema.safeParse(JSON.parse(text)).data ?? null;
    } catch (error) {
      // A write that was cut off is no draft; anything else is a fault of ours.
      if (error instanceof SyntaxError) return null;
      throw error;
    }
  };
  return {
    read: stored,
    keep(draft) {
      try {
        shelf.setItem(key, JSON.stringify({ keeper, ...draft }));
        return true;
      } catch (error) {
        if (error instanceof DOMException) return false;
        throw error;
      }
    },
    release() {
      if (stored()?.keeper === keeper) shelf.removeItem(key);
    },
  };
}
