import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Circuits, type Stretch } from '@/lib/hydraulics/circuits';

const stretch = (a: number, b: number, head: number, isTerminal = false): Stretch => ({ a, b, head, isTerminal });
const DISCHARGE = 0;

/** Every way from the discharge to the suction with its head and whether it passes a terminal, found by trying all. */
function allWays(stretches: Stretch[], suction: number) {
  const ways: { head: number; passed: number[]; hasTerminal: boolean }[] = [];
  const walk = (v: number, head: number, passed: number[], hasTerminal: boolean) => {
    if (v === suction) ways.push({ head, passed, hasTerminal });
    stretches.forEach((each, k) => {
      if (each.a === v) walk(each.b, head + each.head, [...passed, k], hasTerminal || each.isTerminal);
    });
  };
  walk(DISCHARGE, 0, [], false);
  return ways;
}

/** Flow always leads from a lower to a higher node, so that there is no ring. */
const layout = fc
  .record({
    nodes: fc.integer({ min: 2, max: 7 }),
    ends: fc.array(fc.tuple(fc.nat(99), fc.nat(99), fc.integer({ min: -3, max: 20 }), fc.boolean()), { minLength: 1, maxLength: 12 }),
  })
  .map(({ nodes, ends }) => ({
    nodes,
    stretches: ends
      .map(([a, b, head, isTerminal]) => stretch(Math.min(a % nodes, b % nodes), Math.max(a % nodes, b % nodes), head, isTerminal))
      .filter(({ a, b }) => a !== b),
  }));

function expectAsByTryingAll(circuits: Circuits | null, stretches: Stretch[], suction: number) {
  const ways = allWays(stretches, suction);
  const demanding = ways.some((way) => way.hasTerminal) ? ways.filter((way) => way.hasTerminal) : ways;
  if (!ways.length) return expect(circuits).toBeNull();
  const most = (of: typeof ways) => Math.max(-Infinity, ...of.map((way) => way.head));
  expect(circuits!.requiredHead).toBeCloseTo(most(demanding), 9);
  stretches.forEach((_, k) => {
    const through = most(demanding.filter((way) => way.passed.includes(k)));
    if (through === -Infinity) expect(circuits!.through(k)).toBe(-Infinity);
    else expect(circuits!.through(k)).toBeCloseTo(through, 9);
  });
}

describe('the circuits of a pump', () => {
  it('need what the worst way through a terminal needs, as found by trying all ways', () => {
    fc.assert(
      fc.property(layout, ({ nodes, stretches }) => {
        expectAsByTryingAll(Circuits.of(stretches, nodes, DISCHARGE, nodes - 1), stretches, nodes - 1);
      }),
      { numRuns: 300 },
    );
  });

  it('need more when a valve takes more, as if laid out afresh', () => {
    const growth = fc.array(fc.tuple(fc.nat(99), fc.double({ min: 0, max: 9, noNaN: true })), { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(layout, growth, ({ nodes, stretches }, steps) => {
        const circuits = Circuits.of(stretches, nodes, DISCHARGE, nodes - 1);
        if (!circuits) return;
        for (const [at, head] of steps) {
          stretches[at % stretches.length].head += head;
          circuits.grown(at % stretches.length);
        }
        expectAsByTryingAll(circuits, stretches, nodes - 1);
      }),
      { numRuns: 200 },
    );
  });

  it('leave a bypass out of the demand while there is a terminal, and live by it where there is none', () => {
    const bare = [stretch(0, 1, 2), stretch(1, 2, 50), stretch(2, 3, 1)];
    expect(Circuits.of(bare, 4, 0, 3)!.requiredHead).toBe(53);
    const withTerminal = [...bare, stretch(1, 2, 9, true)];
    const circuits = Circuits.of(withTerminal, 4, 0, 3)!;
    expect(circuits.requiredHead).toBe(12);
    expect(circuits.through(1)).toBe(-Infinity);
    expect(circuits.through(0)).toBe(12);
  });

  it('are none where no way leads back or flow runs in a ring', () => {
    expect(Circuits.of([stretch(0, 1, 1)], 3, 0, 2)).toBeNull();
    expect(Circuits.of([stretch(0, 1, 1), stretch(1, 2, 1), stretch(2, 1, 1), stretch(2, 3, 1)], 4, 0, 3)).toBeNull();
  });
});
