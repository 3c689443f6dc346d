import { toast } from 'sonner';
import { addPart, duplicatePieces, partOf, type DrawingPart } from '@/lib/network/duplicate-pieces';
import { boundsOf, GRID, snap, type Point } from '@/lib/network/piece-geometry';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import { selectOnly } from '../canvas-state';
import { placeByKey } from '../place-by-key';
import type { Stage } from './stage';

/** What changes the drawing as a whole: its history, and pieces taken from it and put into it. */
export function editing(stage: Stage) {
  const { canvasStore, drawingStore } = stage.editor;
  const { change } = drawingStore.getState();
  const drawing = () => drawingStore.getState().drawing;
  const chosen = () => new Set(canvasStore.getState().pieces);
  const add = (made: { drawing: ReturnType<typeof drawing>; added: DrawingPart }) => {
    if (made.added.equipment.length === 0) return;
    change(() => made.drawing);
    selectOnly(
      canvasStore,
      made.added.equipment.map(({ id }) => id),
      made.added.pipes.map(({ id }) => id),
    );
  };
  const remove = () => {
    const { pieces, pipes } = canvasStore.getState();
    if (pieces.size + pipes.size === 0) return;
    change((before) => removeFromDrawing(before, new Set(pieces), new Set(pipes)));
    selectOnly(canvasStore, []);
  };
  return {
    undo: () => drawingStore.temporal.getState().undo(),
    redo: () => drawingStore.temporal.getState().redo(),
    cut: () => {
      if (chosen().size === 0) return;
      canvasStore.setState({ clipboard: partOf(drawing(), chosen()) });
      remove();
    },
    paste: () => {
      const { clipboard, menu } = canvasStore.getState();
      if (!clipboard) {
        toast('Nothing was copied yet.');
        return;
      }
      const made = addPart(drawing(), clipboard, menu ? shiftTo(clipboard, menu.at) : { x: 4 * GRID, y: 4 * GRID });
      add(made);
      // The next paste goes on from here.
      canvasStore.setState({ clipboard: made.added });
    },
    duplicate: () => add(duplicatePieces(drawing(), chosen())),
    delete: remove,
    place: () => placeByKey(stage),
    renumber: () => canvasStore.setState({ open: 'tags' }),
  };
}

/** From where a part was taken to where its middle is to lie. */
function shiftTo({ equipment }: DrawingPart, { x, y }: Point): Point {
  const { left, top, width, height } = boundsOf(equipment);
  return { x: snap(x - left - width / 2), y: snap(y - top - height / 2) };
}
