import { toast } from 'sonner';
import { pieceOf, type Point } from '@/lib/network/piece-geometry';
import { labelPlace } from '@/lib/network/pipe-route';
import { farEndOf, nextPipeAt, pieceNear, pieceTowards, type Heading } from '@/lib/network/walk-network';
import { wayOf } from '@/lib/network/bend-pipe';
import { selectOnly } from '../canvas-state';
import { bringIntoView, focusElement, midView, type Stage } from './stage';

/** What goes from piece to piece and from pipe to pipe. */
export function goingAbout(stage: Stage) {
  const { canvasStore, drawingStore } = stage.editor;
  const drawing = () => drawingStore.getState().drawing;
  const goTo = (id: string, at: Point) => {
    bringIntoView(stage, at);
    focusElement(id);
  };
  const go = (heading: Heading, isAdded: boolean) => () => {
    const { pieces, pipes } = canvasStore.getState();
    const from = pieceOf(drawing(), [...pieces].at(-1) ?? '');
    const way = pipes.size === 1 && !from ? wayOf(drawing(), [...pipes][0]) : null;
    const start = from ?? (way ? labelPlace(way.path) : null);
    const next = start ? pieceTowards(drawing(), start, heading) : pieceNear(drawing(), midView(stage));
    if (!next) return;
    // Taken out and put in again, the piece one stands at is the last of the set.
    const others = new Set(isAdded ? pieces : []);
    others.delete(next.id);
    selectOnly(canvasStore, [...others, next.id]);
    goTo(next.id, next);
  };
  return {
    'go-left': go('left', false),
    'go-right': go('right', false),
    'go-up': go('up', false),
    'go-down': go('down', false),
    'add-left': go('left', true),
    'add-right': go('right', true),
    'add-up': go('up', true),
    'add-down': go('down', true),
    'next-pipe': () => {
      const { pieces, pipes, walkedFrom } = canvasStore.getState();
      const [pieceId] = pieces;
      const [pipeId] = pipes;
      const pipe = drawing().pipes.find(({ id }) => id === pipeId);
      const from =
        pieceId ??
        (pipe && [pipe.from, pipe.to].some(({ equipmentId }) => equipmentId === walkedFrom) ? walkedFrom : pipe?.from.equipmentId);
      const next = from && nextPipeAt(drawing(), from, pieceId ? null : (pipeId ?? null));
      const way = next && wayOf(drawing(), next.id);
      if (!next || !way) {
        toast(from ? 'No pipe is joined here.' : 'Select a piece first.');
        return;
      }
      selectOnly(canvasStore, [], [next.id]);
      canvasStore.setState({ walkedFrom: from });
      goTo(next.id, labelPlace(way.path));
    },
    'far-end': () => {
      const { pipes, walkedFrom } = canvasStore.getState();
      const pipe = drawing().pipes.find(({ id }) => pipes.has(id));
      const piece = pipe && pieceOf(drawing(), farEndOf(pipe, walkedFrom));
      if (!piece) {
        toast('Select a pipe first.');
        return;
      }
      selectOnly(canvasStore, [piece.id]);
      goTo(piece.id, piece);
    },
  };
}
