import { describe, expect, it } from 'vitest';
import { connect, freePortTowards, joinPieces } from '@/lib/network/connect-pipe';
import type { PipeEnd } from '@/lib/network/drawing';
import { chosenSize, firstPipeFigures, pipeWords, sizeSource } from '@/lib/network/pipe-choice';
import { drawing, pipe, pump, source, tee, unit } from '../../make/drawing';

const end = (text: string): PipeEnd => ({ equipmentId: text.split('.')[0], port: text.split('.')[1] as PipeEnd['port'] });
const figures = { ...firstPipeFigures, lengthM: 5 };
const made = (result: ReturnType<typeof connect>) => {
  if ('refused' in result) throw new Error(result.refused);
  return result.pipe;
};

describe('joining two ends', () => {
  it('runs the pipe out of an outlet and into an inlet, whichever was pressed first', () => {
    const loop = drawing([pump('P'), source('CH')], []);
    expect(
      made(
        connect(loop, end('CH.in'), end('P.out'), figures, [
          { x: 1, y: 1 },
          { x: 2, y: 2 },
        ]),
      ),
    ).toMatchObject({
      from: end('P.out'),
      to: end('CH.in'),
      lengthM: 5,
      nominal: 'DN25',
      bends: [
        { x: 2, y: 2 },
        { x: 1, y: 1 },
      ],
    });
  });

  it('refuses an end that is taken, and a piece joined to itself; a tee takes many', () => {
    const loop = drawing([pump('P'), source('CH'), tee('T')], [pipe('p', 'P.out', 'CH.in'), pipe('q', 'T.e', 'P.in')]);
    expect(connect(loop, end('T.n'), end('CH.in'), figures)).toMatchObject({
      refused: expect.stringContaining('CH already has a pipe there'),
    });
    expect(connect(loop, end('T.n'), end('T.s'), figures)).toMatchObject({ refused: expect.stringContaining('two different pieces') });
    expect('pipe' in connect(loop, end('CH.out'), end('T.e'), figures)).toBe(true);
  });

  it('draws what comes from a unit as return and what goes to one as supply', () => {
    const loop = drawing([unit('U'), tee('T'), source('CH')], []);
    expect(made(connect(loop, end('U.out'), end('T.n'), figures)).circuit).toBe('return');
    expect(made(connect(loop, end('T.n'), end('U.in'), figures)).circuit).toBe('supply');
    expect(made(connect(loop, end('CH.out'), end('T.n'), figures)).circuit).toBe('supply');
  });

  it('joins two pieces by their free ends and says when there is none', () => {
    const loop = drawing([pump('P'), source('CH')], [pipe('p', 'P.out', 'CH.in')]);
    expect(made(joinPieces(loop, loop.equipment[0], loop.equipment[1], figures))).toMatchObject({ from: end('CH.out'), to: end('P.in') });
    const closed = drawing(loop.equipment, [...loop.pipes, pipe('q', 'CH.out', 'P.in')]);
    expect(joinPieces(closed, closed.equipment[0], closed.equipment[1], figures)).toEqual({ refused: 'P has no free end.' });
  });

  it('offers of a tee the side that looks towards the other end', () => {
    const loop = drawing([{ ...tee('T'), x: 0, y: 0 }], []);
    expect(freePortTowards(loop, loop.equipment[0], { x: -80, y: 30 })).toEqual(end('T.w'));
    expect(freePortTowards(loop, loop.equipment[0], { x: 10, y: 30 })).toEqual(end('T.s'));
  });
});

describe('the size of a pipe', () => {
  it('brings bore and roughness of its series, with their sources', () => {
    expect(chosenSize('steel-en10255-medium', 'DN25')).toEqual({
      series: 'steel-en10255-medium',
      nominal: 'DN25',
      boreMm: 27.3,
      roughnessMm: 0.045,
    });
    expect(chosenSize('copper-en1057', 'DN25')).toMatchObject({ nominal: null, boreMm: null });
    expect(sizeSource({ series: 'copper-en1057' })).toContain('EN 1057');
    expect(sizeSource({ series: null })).toBe('Bore and roughness as typed.');
    expect(pipeWords({ ...figures, nominal: null, boreMm: 26 })).toBe('5 m, bore 26 mm');
  });
});
