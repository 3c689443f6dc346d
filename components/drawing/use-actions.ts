'use client';

import { useMemo } from 'react';
import { useReactFlow, type ReactFlowInstance } from 'reactflow';
import { toast } from 'sonner';
import { joinPieces } from '@/lib/network/connect-pipe';
import { addPart, duplicatePieces, partOf } from '@/lib/network/duplicate-pieces';
import { mirrorPieces, nudgePieces, rotatePieces } from '@/lib/network/move-pieces';
import { GRID } from '@/lib/network/piece-geometry';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import { overlays, selectOnly } from './canvas-state';
import { useEditor, type Editor } from './editor-context';
import { placePiece } from './placing';
import { showAll } from './show-all';
import type { ActionId } from './shortcuts';

type Actions = Record<ActionId, () => void>;

/** Everything the keys, the menu and the bar can do. */
export function useActions(): Actions {
  const editor = useEditor();
  const view = useReactFlow();
  return useMemo(() => ({ ...editing(editor, view), ...viewing(editor, view) }), [editor, view]);
}

type ViewAction = 'find' | 'fit' | 'zoom-in' | 'zoom-out' | 'next-overlay' | 'shortcuts' | 'escape' | 'select-all' | 'copy';

/** Those that change nothing: for everyone. */
function viewing({ canvasStore, drawingStore }: Editor, view: ReactFlowInstance): Pick<Actions, ViewAction> {
  return {
    find: () => canvasStore.setState({ open: 'find' }),
    fit: () => showAll(view, drawingStore.getState().drawing, 200),
    'zoom-in': () => void view.zoomIn({ duration: 120 }),
    'zoom-out': () => void view.zoomOut({ duration: 120 }),
    'next-overlay': () => canvasStore.setState(({ overlay }) => ({ overlay: overlays[(overlays.indexOf(overlay) + 1) % overlays.length] })),
    shortcuts: () => canvasStore.setState({ open: 'shortcuts' }),
    escape: () => {
      const { tool, pipeStart } = canvasStore.getState();
      if (pipeStart) canvasStore.setState({ pipeStart: null });
      else if (tool !== 'select') canvasStore.setState({ tool: 'select' });
      else selectOnly(canvasStore, []);
    },
    'select-all': () => {
      const { equipment, pipes } = drawingStore.getState().drawing;
      selectOnly(
        canvasStore,
        equipment.map(({ id }) => id),
        pipes.map(({ id }) => id),
      );
    },
    copy: () => {
      const { pieces } = canvasStore.getState();
      if (pieces.size) canvasStore.setState({ clipboard: partOf(drawingStore.getState().drawing, new Set(pieces)) });
    },
  };
}

function editing(editor: Editor, view: ReactFlowInstance): Omit<Actions, ViewAction> {
  const { canvasStore, drawingStore, canEdit } = editor;
  const chosen = () => new Set(canvasStore.getState().pieces);
  const drawing = () => drawingStore.getState().drawing;
  const change = drawingStore.getState().change;
  const nudge = (x: number, y: number) => withChosen((ids) => change((before) => nudgePieces(before, ids, { x: x * GRID, y: y * GRID })));
  const withChosen = (act: (ids: Set<string>) => void) => {
    const ids = chosen();
    if (ids.size) act(ids);
  };
  const remove = () => {
    const { pieces, pipes } = canvasStore.getState();
    if (pieces.size + pipes.size === 0) return;
    change((before) => removeFromDrawing(before, new Set(pieces), new Set(pipes)));
    selectOnly(canvasStore, []);
  };
  const addCopy = (made: ReturnType<typeof addPart>) => {
    if (made.added.equipment.length === 0) return;
    change(() => made.drawing);
    selectOnly(
      canvasStore,
      made.added.equipment.map(({ id }) => id),
      made.added.pipes.map(({ id }) => id),
    );
  };
  const actions: Omit<Actions, ViewAction> = {
    undo: () => drawingStore.temporal.getState().undo(),
    redo: () => drawingStore.temporal.getState().redo(),
    cut: () => {
      canvasStore.setState({ clipboard: partOf(drawing(), chosen()) });
      remove();
    },
    paste: () => {
      const { clipboard } = canvasStore.getState();
      if (!clipboard) return;
      const by = { x: 4 * GRID, y: 4 * GRID };
      const made = addPart(drawing(), clipboard, by);
      addCopy(made);
      // The next paste goes on from here.
      canvasStore.setState({ clipboard: { equipment: made.added.equipment, pipes: made.added.pipes } });
    },
    duplicate: () => withChosen((ids) => addCopy(duplicatePieces(drawing(), ids))),
    delete: remove,
    rotate: () => withChosen((ids) => change((before) => rotatePieces(before, ids))),
    mirror: () => withChosen((ids) => change((before) => mirrorPieces(before, ids))),
    join: () => {
      const [first, second, ...others] = [...chosen()].map((id) => drawing().equipment.find((piece) => piece.id === id));
      if (!first || !second || others.length) {
        toast('Select the two pieces to join.');
        return;
      }
      const made = joinPieces(drawing(), first, second, canvasStore.getState().newPipe);
      if ('refused' in made) toast(made.refused);
      else change(() => made.drawing);
    },
    'nudge-left': () => nudge(-1, 0),
    'nudge-right': () => nudge(1, 0),
    'nudge-up': () => nudge(0, -1),
    'nudge-down': () => nudge(0, 1),
    place: () => {
      const { tool } = canvasStore.getState();
      const canvas = document.querySelector('.drawing-canvas');
      if (tool === 'select' || tool === 'pipe' || !canvas) return;
      const box = canvas.getBoundingClientRect();
      placePiece(editor, tool, view.screenToFlowPosition({ x: box.left + box.width / 2, y: box.top + box.height / 2 }), 0);
    },
  };
  if (canEdit) return actions;
  return Object.fromEntries(Object.keys(actions).map((id) => [id, () => undefined])) as typeof actions;
}
