import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Point } from '@/lib/network/piece-geometry';
import { crossingRegister, type Hops } from '@/lib/network/pipe-crossings';

const cell = fc.integer({ min: -60, max: 60 }).map((n) => n * 10);
/** A route along the sheet: level and plumb parts by turns. */
const anyRoute: fc.Arbitrary<Point[]> = fc
  .record({ x: cell, y: cell, isLevel: fc.boolean(), to: fc.array(cell, { minLength: 1, maxLength: 5 }) })
  .map(({ x, y, isLevel, to }) => {
    const path = [{ x, y }];
    to.forEach((place, i) => {
      const { x: px, y: py } = path.at(-1)!;
      const next = isLevel === (i % 2 === 0) ? { x: place, y: py } : { x: px, y: place };
      if (next.x !== px || next.y !== py) path.push(next);
    });
    return path;
  })
  .filter((path) => path.length > 1);

const routesOf = (paths: Point[][]) => new Map(paths.map((path, i) => [`p${i}`, path]));

/** Every pair of parts looked at, as the register must not do. */
function everyPair(routes: ReadonlyMap<string, Point[]>): string[] {
  const found = new Set<string>();
  for (const [levelId, level] of routes)
    for (let part = 0; part < level.length - 1; part++) {
      const [a, b] = [level[part], level[part + 1]];
      if (a.y !== b.y) continue;
      for (const [plumbId, plumb] of routes) {
        if (plumbId === levelId) continue;
        for (let i = 0; i < plumb.length - 1; i++) {
          const [c, d] = [plumb[i], plumb[i + 1]];
          if (c.x !== d.x) continue;
          const isInside = (v: number, p: number, q: number) => v > Math.min(p, q) && v < Math.max(p, q);
          if (isInside(c.x, a.x, b.x) && isInside(a.y, c.y, d.y)) found.add(`${levelId} ${part} ${c.x}`);
        }
      }
    }
  return [...found].sort();
}

const told = (hops: Hops) => [...hops].flatMap(([id, list]) => list.map(({ part, x }) => `${id} ${part} ${x}`)).sort();

describe('the crossings of pipes', () => {
  it('are found each once, just as by looking at every pair', () => {
    fc.assert(
      fc.property(fc.array(anyRoute, { minLength: 2, maxLength: 14 }), (paths) => {
        const routes = routesOf(paths);
        expect(told(crossingRegister()(routes))).toEqual(everyPair(routes));
      }),
    );
  });

  it('stay right while pipes are moved, added and taken away', () => {
    fc.assert(
      fc.property(
        fc.array(anyRoute, { minLength: 3, maxLength: 10 }),
        fc.array(fc.record({ at: fc.nat(11), path: fc.option(anyRoute) }), { maxLength: 6 }),
        (paths, steps) => {
          const update = crossingRegister();
          let routes = routesOf(paths);
          update(routes);
          for (const { at, path } of steps) {
            routes = new Map(routes);
            if (path) routes.set(`p${at}`, path);
            else routes.delete(`p${at}`);
            expect(told(update(routes))).toEqual(everyPair(routes));
          }
        },
      ),
    );
  });

  it('are none where pipes meet at an end, turn on each other or run on one line', () => {
    const routes = routesOf([
      [
        { x: 0, y: 0 },
        { x: 100, y: 0 },
      ],
      [
        { x: 50, y: 0 },
        { x: 50, y: 80 },
      ],
      [
        { x: 100, y: -40 },
        { x: 100, y: 40 },
      ],
      [
        { x: 20, y: 0 },
        { x: 60, y: 0 },
      ],
    ]);
    expect(told(crossingRegister()(routes))).toEqual([]);
  });

  it('follow the route of the level pipe, and a pipe that nothing changed for keeps its list', () => {
    const update = crossingRegister();
    const level = [
      { x: 100, y: 0 },
      { x: 0, y: 0 },
    ];
    const other = [
      { x: 0, y: 500 },
      { x: 90, y: 500 },
    ];
    const crossed = [
      { x: 40, y: 450 },
      { x: 40, y: 550 },
    ];
    const plumb = (x: number) => [
      { x, y: -50 },
      { x, y: 50 },
    ];
    const [b, c] = [plumb(30), plumb(60)];
    const before = update(
      new Map([
        ['a', level],
        ['b', b],
        ['c', c],
        ['d', other],
        ['e', crossed],
      ]),
    );
    expect(before.get('a')).toEqual([
      { part: 0, x: 60 },
      { part: 0, x: 30 },
    ]);
    expect(before.get('d')).toEqual([{ part: 0, x: 40 }]);
    const after = update(
      new Map([
        ['a', level],
        ['b', plumb(70)],
        ['c', c],
        ['d', other],
        ['e', crossed],
      ]),
    );
    expect(after.get('a')).toEqual([
      { part: 0, x: 70 },
      { part: 0, x: 60 },
    ]);
    expect(after.get('d')).toBe(before.get('d'));
  });

  it('of 4,000 pipes are kept up to date within a frame while one of them moves', () => {
    const routes = new Map<string, Point[]>();
    for (let i = 0; i < 2000; i++) {
      const [column, row] = [i % 50, Math.floor(i / 50)];
      routes.set(`l${i}`, [
        { x: column * 100, y: row * 100 },
        { x: column * 100 + 90, y: row * 100 },
      ]);
      routes.set(`v${i}`, [
        { x: column * 100 + 40, y: row * 100 - 30 },
        { x: column * 100 + 40, y: row * 100 + 30 },
      ]);
    }
    const update = crossingRegister();
    expect([...update(routes).values()].flat()).toHaveLength(2000);
    const times = Array.from({ length: 40 }, (_, i) => {
      routes.set('v7', [
        { x: 700 + i, y: -30 },
        { x: 700 + i, y: 30 },
      ]);
      const start = performance.now();
      update(routes);
      return performance.now() - start;
    });
    expect(times.sort((a, b) => a - b)[20]).toBeLessThan(8);
  });
});
