'use client';

import { useEffect, useMemo } from 'react';
import { toast } from 'sonner';
import type { DraftBody } from '@/lib/api/loops';
import type { SaveState } from '@/lib/client/draft-saver';
import type { Drawing } from '@/lib/network/drawing';
import { mergeByItself } from '@/lib/network/merge-drawings';
import { ConflictDialog } from './dialogs/conflict-dialog';
import type { OpenDraft } from './open-draft';

interface DraftConflictProps {
  draft: OpenDraft;
  saving: SaveState;
  drawing: Drawing;
  /** What the other person saved, once its comparison was put off. */
  later: DraftBody | null;
  onLater: (theirs: DraftBody) => void;
}

/** Joins what another person saved meanwhile: by itself where it does not touch what was changed here, else by asking; until then nothing is saved. */
export function DraftConflict({ draft, saving, drawing, later, onLater }: DraftConflictProps) {
  const conflict = saving.kind === 'conflict' ? saving : null;
  useEffect(() => {
    if (!conflict) return;
    const { base, theirs } = conflict;
    const merged = mergeByItself(base, draft.editor.drawingStore.getState().drawing, theirs.drawing);
    if (!merged) return;
    goOnWith(draft, merged, theirs);
    toast(`${theirs.savedBy} saved changes of their own meanwhile. They do not touch yours: both are on the drawing now.`);
  }, [conflict, draft]);
  // What joins by itself is joined before anybody is asked.
  const mustAsk = useMemo(() => conflict && !mergeByItself(conflict.base, drawing, conflict.theirs.drawing), [conflict, drawing]);
  if (!conflict || !mustAsk || later === conflict.theirs) return null;
  const { base, theirs } = conflict;
  return (
    <ConflictDialog
      base={base}
      mine={drawing}
      theirs={theirs}
      onResolve={(merged) => goOnWith(draft, merged, theirs)}
      onLater={() => onLater(theirs)}
    />
  );
}

function goOnWith({ saver, editor: { drawingStore } }: OpenDraft, merged: Drawing, theirs: DraftBody): void {
  saver.resolve(merged, theirs);
  drawingStore.setState({ drawing: merged });
  // Steps from before would take the other person's changes away again.
  drawingStore.temporal.getState().clear();
}
