import { describe, expect, it } from 'vitest';
import { farEndOf, nextPipeAt, pieceNear, pieceTowards } from '@/lib/network/walk-network';
import { drawing, ladder, pipe, tee } from '../../make/drawing';

const cross = drawing(
  [
    tee('mid'),
    { ...tee('right'), x: 100, y: 10 },
    { ...tee('far right'), x: 300 },
    { ...tee('up'), y: -50 },
    { ...tee('left'), x: -40, y: 30 },
  ],
  [pipe('a', 'mid.e', 'right.w'), pipe('b', 'up.s', 'mid.n'), pipe('c', 'mid.w', 'left.e')],
);
const mid = { x: 0, y: 0 };

describe('going about by key', () => {
  it('reaches the nearest piece that lies that way', () => {
    expect(pieceTowards(cross, mid, 'right')?.id).toBe('right');
    expect(pieceTowards(cross, { x: 100, y: 10 }, 'right')?.id).toBe('far right');
    expect(pieceTowards(cross, mid, 'up')?.id).toBe('up');
    expect(pieceTowards(cross, mid, 'left')?.id).toBe('left');
    expect(pieceTowards(cross, { x: 300, y: 0 }, 'right')).toBeNull();
    expect(pieceNear(cross, { x: 90, y: 0 })?.id).toBe('right');
  });

  it('goes round the pipes of a piece in turn, and along one to its other end', () => {
    const seen = [null, 'a', 'b', 'c'].map((id) => nextPipeAt(cross, 'mid', id)!.id);
    expect(seen).toEqual(['a', 'b', 'c', 'a']);
    expect(farEndOf(cross.pipes[1], 'mid')).toBe('up');
    expect(farEndOf(cross.pipes[1], 'up')).toBe('mid');
    expect(nextPipeAt(cross, 'far right', null)).toBeNull();
  });

  it('reaches every piece of a loop along its pipes', () => {
    const loop = ladder([0.2, 0.3, 0.4]);
    const reached = new Set(['P-1']);
    const toDo = ['P-1'];
    for (let id = toDo.pop(); id; id = toDo.pop()) {
      const first = nextPipeAt(loop, id, null);
      let pipeId = first?.id ?? null;
      while (pipeId) {
        const next = farEndOf(
          loop.pipes.find((it) => it.id === pipeId)!,
          id,
        );
        if (!reached.has(next)) toDo.push(next);
        reached.add(next);
        const after: string = nextPipeAt(loop, id, pipeId)!.id;
        pipeId = after === first!.id ? null : after;
      }
    }
    expect(reached.size).toBe(loop.equipment.length);
  });
});
