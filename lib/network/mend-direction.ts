import type { Drawing, DrawingPipe, Equipment, PipeEnd } from './drawing';

const turned = (pipe: DrawingPipe): DrawingPipe => ({ ...pipe, from: pipe.to, to: pipe.from, bends: [...pipe.bends].reverse() });

/** Turns the way a pipe is drawn, and with it the sign of its flow. */
export const turnPipe = (drawing: Drawing, pipeId: string): Drawing => ({
  ...drawing,
  pipes: drawing.pipes.map((pipe) => (pipe.id === pipeId ? turned(pipe) : pipe)),
});

/** Turns a piece around in its line: its inlet is where its outlet was, and its pipes stay where they are. */
export function turnAround(drawing: Drawing, pieceId: string): Drawing {
  const swapped = (end: PipeEnd): PipeEnd =>
    end.equipmentId === pieceId && (end.port === 'in' || end.port === 'out') ? { ...end, port: end.port === 'in' ? 'out' : 'in' } : end;
  return {
    ...drawing,
    equipment: drawing.equipment.map((piece) =>
      piece.id === pieceId ? { ...piece, rotation: ((piece.rotation + 180) % 360) as Equipment['rotation'] } : piece,
    ),
    pipes: drawing.pipes.map((pipe) => {
      const next = { ...pipe, from: swapped(pipe.from), to: swapped(pipe.to) };
      const runsIn = next.from.equipmentId === pieceId && next.from.port === 'in';
      const runsOut = next.to.equipmentId === pieceId && next.to.port === 'out';
      return runsIn || runsOut ? turned(next) : next;
    }),
  };
}
