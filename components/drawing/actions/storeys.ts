import { toast } from 'sonner';
import type { Drawing, Storey } from '@/lib/network/drawing';
import { duplicateStorey } from '@/lib/network/duplicate-storey';
import { GRID, pieceOf } from '@/lib/network/piece-geometry';
import { addStorey, isStoreyEmpty, moveStorey, removeStorey, resizeStorey, storeyAt, withStoreysByPlace } from '@/lib/network/storeys';
import { selectOnly } from '../canvas-state';
import { midView, type Stage } from './stage';

const STEP = 4 * GRID;
export const LEAST_HEIGHT = 80;

/** The storey that a command means: that of the open menu, else of the selected piece, else the one in mid-view. */
export function storeyMeant(stage: Stage): Storey | null {
  const { canvasStore, drawingStore } = stage.editor;
  const { storeyId, pieces } = canvasStore.getState();
  const { drawing } = drawingStore.getState();
  const [pieceId] = pieces;
  const id = storeyId ?? (pieceId ? pieceOf(drawing, pieceId)?.storeyId : null);
  return drawing.storeys.find((it) => it.id === id) ?? storeyAt(drawing, midView(stage).y);
}

/** What is done with a storey and all that is drawn in it. */
export function storeyActions(stage: Stage) {
  const { canvasStore, drawingStore } = stage.editor;
  const withStorey = (act: (storey: Storey, drawing: Drawing, change: (make: (drawing: Drawing) => Drawing) => void) => void) => () => {
    const storey = storeyMeant(stage);
    const { drawing, change } = drawingStore.getState();
    if (storey) act(storey, drawing, change);
    else toast('There is no storey yet. Add one first.');
  };
  const resize = (by: number) =>
    withStorey(({ id, height }, _, change) => change((before) => resizeStorey(before, id, Math.max(LEAST_HEIGHT, height + by))));
  return {
    'storey-rename': withStorey(({ id }) => canvasStore.setState({ storeyId: id, open: 'rename-storey' })),
    'storey-up': withStorey(({ id }, _, change) => change((before) => moveStorey(before, id, 'up'))),
    'storey-down': withStorey(({ id }, _, change) => change((before) => moveStorey(before, id, 'down'))),
    'storey-higher': resize(STEP),
    'storey-lower': resize(-STEP),
    'storey-duplicate': withStorey(({ id, name }, drawing, change) => {
      const made = duplicateStorey(drawing, id);
      if (!made) return;
      change(() => made.drawing);
      selectOnly(
        canvasStore,
        made.added.equipment.map((it) => it.id),
        made.added.pipes.map((it) => it.id),
      );
      toast(`${made.storey.name} is like ${name}, right above it.`);
    }),
    'storey-add-above': () => drawingStore.getState().change((before) => addStorey(before, 'above')),
    'storey-add-below': () => drawingStore.getState().change((before) => addStorey(before, 'below')),
    'storey-remove': withStorey(({ id, name }, drawing, change) => {
      if (isStoreyEmpty(drawing, id)) change((before) => withStoreysByPlace(removeStorey(before, id)));
      else toast(`${name} is not empty: move its pieces before you remove it.`);
    }),
  };
}
