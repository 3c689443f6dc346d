'use client';

import { createContext, useContext, useState, type ReactNode } from 'react';
import { v7 as newId } from 'uuid';
import type { DraftBody, LoopDetail } from '@/lib/api/loops';
import { DraftSaver } from '@/lib/client/draft-saver';
import { saveDraft } from '@/lib/client/drafts';
import { draftKeeper } from '@/lib/client/kept-drafts';
import { lastPipeOf } from '@/lib/network/pipe-choice';
import { createCanvasStore } from './canvas-state';
import type { Editor } from './editor-context';
import { createDrawingStore } from './store';

/** The draft of a loop as it is open in this tab: one document, one history, one selection, one saver. */
export interface OpenDraft {
  editor: Editor;
  saver: DraftSaver;
  /** What this browser kept from an earlier visit has been taken up. */
  isRestored: boolean;
}

const OpenDrafts = createContext<Map<string, OpenDraft> | null>(null);

/** Holds the open draft for the pages of a loop, so that going from one to another keeps its history and selection. */
export function OpenDraftProvider({ children }: { children: ReactNode }) {
  const [drafts] = useState(() => new Map<string, OpenDraft>());
  return <OpenDrafts value={drafts}>{children}</OpenDrafts>;
}

interface DraftOptions {
  loop: LoopDetail;
  personId: string;
  loaded: DraftBody;
}

/** The draft that is open already, or the one just loaded: where nothing here is newer than what someone else has saved. */
export function useOpenDraft(options: DraftOptions): OpenDraft {
  const drafts = useContext(OpenDrafts);
  if (!drafts) throw new Error('A page of the draft stands outside of its loop');
  const [draft] = useState(() => {
    const open = drafts.get(options.loop.id);
    if (open && (open.saver.version >= options.loaded.version || open.saver.state.kind !== 'saved')) return open;
    const opened = openDraft(options);
    drafts.set(options.loop.id, opened);
    return opened;
  });
  return draft;
}

function openDraft({ loop, personId, loaded }: DraftOptions): OpenDraft {
  const newPipe = lastPipeOf(loaded.drawing);
  return {
    editor: {
      drawingStore: createDrawingStore(loaded.drawing),
      canvasStore: createCanvasStore(newPipe ? { newPipe } : {}),
      canEdit: true,
      band: loop.band,
    },
    saver: new DraftSaver({
      loaded,
      // On the server there is no shelf; the first render there keeps nothing.
      keeper: draftKeeper(typeof window === 'undefined' ? noShelf : window.localStorage, personId, loop.id, newId()),
      save: (baseVersion, drawing) => saveDraft(loop.id, baseVersion, drawing),
    }),
    isRestored: false,
  };
}

const noShelf = { getItem: () => null, setItem: () => undefined, removeItem: () => undefined };
