import { toast } from 'sonner';
import { straightenPipes } from '@/lib/network/bend-pipe';
import { freePortTowards, joinPieces } from '@/lib/network/connect-pipe';
import { pieceOf } from '@/lib/network/piece-geometry';
import { selectOnly } from '../canvas-state';
import type { Stage } from './stage';

/** What joins pieces and bends pipes. */
export function piping(stage: Stage) {
  const { canvasStore, drawingStore } = stage.editor;
  const drawing = () => drawingStore.getState().drawing;
  return {
    join: () => {
      const [first, second, ...others] = [...canvasStore.getState().pieces].map((id) => pieceOf(drawing(), id));
      if (!first || !second || others.length) {
        toast('Select the two pieces to join.');
        return;
      }
      const made = joinPieces(drawing(), first, second, canvasStore.getState().newPipe);
      if ('refused' in made) toast(made.refused);
      else drawingStore.getState().change(() => made.drawing);
    },
    'begin-pipe': () => {
      const [id, ...others] = canvasStore.getState().pieces;
      const piece = id && others.length === 0 ? pieceOf(drawing(), id) : undefined;
      const end = piece && freePortTowards(drawing(), piece, { x: piece.x + 1000, y: piece.y }, 'out');
      if (!piece) toast('Select the piece where the pipe begins.');
      else if (!end) toast(`${piece.tag || 'This piece'} has no free end. Press on one of its pipes to branch off with a tee.`);
      else {
        canvasStore.setState({ tool: 'pipe', pipeStart: { end, bends: [] } });
        toast('Now press on the piece where it ends, or go there with Alt and an arrow and press Enter.');
      }
    },
    'hold-bend': () => {
      const [pipeId, ...others] = canvasStore.getState().pipes;
      if (!pipeId || others.length) {
        toast('Select one pipe first: then this key takes hold of one of its bends after another.');
        return;
      }
      selectOnly(canvasStore, [], [pipeId]);
      requestAnimationFrame(() => {
        const holds = [...document.querySelectorAll<HTMLElement>('.pipe-hold')];
        holds[(holds.indexOf(document.activeElement as HTMLElement) + 1) % holds.length]?.focus();
      });
    },
    straighten: () => {
      const { pipes } = canvasStore.getState();
      if (pipes.size) drawingStore.getState().change((before) => straightenPipes(before, pipes));
    },
  };
}
