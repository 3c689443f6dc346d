import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { FluidProperties } from '@/lib/hydraulics/fluids';
import { kvAtSetting, settingAtKv } from '@/lib/hydraulics/links/balancing-valve';
import { metresPerKpa } from '@/lib/hydraulics/links/law';
import { gather, isShut, linkKinds, usualFlowLs } from '@/lib/hydraulics/links/link-laws';
import { reynoldsPerLs } from '@/lib/hydraulics/links/pipe';
import { pumpHeadAt } from '@/lib/hydraulics/solve-result';
import type { LinkOf, NetworkLink } from '@/lib/hydraulics/types';

const fluid: FluidProperties = {
  densityKgM3: 960,
  viscosityMPaS: 0.3,
  specificHeatKJKgK: 4.2,
  vapourPressureKpa: null,
  freezingPointC: null,
  conductivityWMK: null,
};
const METRE_KPA = 960 * 9.80665e-3;
const ends = { id: 'L', from: 'A', to: 'B' };

/** Drop (kPa) and its slope (kPa per L/s) of a link as the second of three of its kind, which stand first to last as numbers 5 to 7. */
function at(link: NetworkLink, flowLs: number): { dropKpa: number; slope: number } {
  const batch = gather(link.kind, [link, link, link], 5, fluid);
  const flow = Float64Array.from({ length: 9 }, (_, i) => (i === 6 ? flowLs : NaN));
  const loss = new Float64Array(9).fill(-77);
  const slope = new Float64Array(9).fill(-77);
  batch.evaluate(flow, loss, slope, 6, 7);
  expect([...loss.slice(0, 6), ...loss.slice(7)]).toEqual(new Array(8).fill(-77));
  return { dropKpa: loss[6] * METRE_KPA, slope: slope[6] * METRE_KPA };
}

const kvDrop = (kv: number, flowLs: number) => ((3.6 * flowLs) / kv) ** 2 * 100 * 0.96;

const pipe: LinkOf<'pipe'> = { ...ends, kind: 'pipe', lengthM: 12, boreMm: 40, roughnessMm: 0.1, minorK: 3 };
const terminal: LinkOf<'terminal'> = { ...ends, kind: 'terminal', designFlowLs: 0.5, designDropKpa: 24 };
const balancingValve: LinkOf<'balancingValve'> = {
  ...ends,
  kind: 'balancingValve',
  kvTable: [
    { setting: 1, kv: 2 },
    { setting: 2, kv: 3 },
    { setting: 4, kv: 9 },
  ],
};
const controlValve: LinkOf<'controlValve'> = { ...ends, kind: 'controlValve', kvs: 6.3 };
const pump: LinkOf<'pump'> = { ...ends, kind: 'pump', curve: [0.5, 1, 2, 3].map((flowLs) => ({ flowLs, headM: 12 - flowLs ** 2 })) };
const passive: NetworkLink[] = [
  pipe,
  { ...pipe, minorK: undefined },
  terminal,
  { ...terminal, exponent: 1.6 },
  { ...terminal, exponent: 1 },
  balancingValve,
  { ...controlValve, opening: 0.4 },
  { ...ends, kind: 'resistance', kv: 5 },
  { ...ends, kind: 'resistance', designFlowLs: 0.6, designDropKpa: 18 },
  { ...ends, kind: 'dpController', setpointKpa: 20, sense: ['A', 'B'], kvs: 4 },
];
const walled: NetworkLink[] = [
  { ...ends, kind: 'checkValve', kv: 5 },
  { ...ends, kind: 'flowLimiter', limitLs: 0.4, minDropKpa: 16 },
];

describe('every law', () => {
  const flows = fc.oneof(fc.double({ min: 1e-4, max: 3, noNaN: true }), fc.double({ min: -3, max: -1e-4, noNaN: true }));

  it('has its drop’s derivative as slope', () => {
    fc.assert(
      fc.property(fc.constantFrom(...passive, ...walled, pump), flows, (link, flow) => {
        const step = 1e-6 * Math.abs(flow);
        const { slope } = at(link, flow);
        const rise = (at(link, flow + step).dropKpa - at(link, flow - step).dropKpa) / (2 * step);
        // At a corner (the limit, the first or last point of a curve) there is no derivative.
        const isCorner = Math.abs(at(link, flow + step).slope - at(link, flow - step).slope) > 0.01 * (slope + 1e-3);
        if (!isCorner) expect(Math.abs(rise - slope)).toBeLessThan(1e-3 * slope + 1e-6);
        expect(slope).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 400 },
    );
  });

  it('of a passive link without a wall is odd: turned flow, turned drop', () => {
    fc.assert(
      fc.property(fc.constantFrom(...passive), flows, (link, flow) => {
        const [one, other] = [at(link, flow), at(link, -flow)];
        expect(other.dropKpa).toBeCloseTo(-one.dropKpa, 9);
        expect(other.slope).toBeCloseTo(one.slope, 9);
      }),
    );
  });

  it('has a slope that is finite at rest, and no drop there', () => {
    for (const link of [...passive, ...walled]) {
      const { dropKpa, slope } = at(link, 0);
      expect(dropKpa).toBeCloseTo(0, 12);
      expect(Number.isFinite(slope) && slope >= 0).toBe(true);
    }
    expect(at(pipe, 0).slope).toBeGreaterThan(0);
    expect(at({ ...terminal, exponent: 1.6 }, 0).slope).toBeGreaterThan(0);
  });

  it('stands in the table of kinds', () => {
    expect([...linkKinds].sort()).toEqual([...new Set([...passive, ...walled, pump].map((link) => link.kind))].sort());
  });
});

describe('a pipe', () => {
  it('loses (f L/D + K) rho v²/2, with 64/Re in laminar flow', () => {
    const velocity = 0.02 / 1000 / ((Math.PI / 4) * 0.04 ** 2);
    const reynolds = (960 * velocity * 0.04) / 0.3e-3;
    expect(reynolds).toBeGreaterThan(2000);
    const slow = 0.01;
    const v = slow / 1000 / ((Math.PI / 4) * 0.04 ** 2);
    const factor = 64 / ((960 * v * 0.04) / 0.3e-3);
    expect(at(pipe, slow).dropKpa).toBeCloseTo(((((factor * 12) / 0.04 + 3) * 960 * v * v) / 2) * 1e-3, 12);
    expect(reynoldsPerLs(40, fluid) * 0.02).toBeCloseTo(reynolds, 8);
  });

  it('without local losses loses by friction alone', () => {
    const local = at(pipe, 1).dropKpa - at({ ...pipe, minorK: undefined }, 1).dropKpa;
    const v = 1e-3 / ((Math.PI / 4) * 0.04 ** 2);
    expect(local).toBeCloseTo(((3 * 960 * v * v) / 2) * 1e-3, 9);
  });

  it('keeps its friction apart from that of its neighbours', () => {
    const links = [pipe, { ...pipe, boreMm: 20, roughnessMm: 0.5 }];
    const batch = gather('pipe', links, 0, fluid);
    const loss = new Float64Array(2);
    batch.evaluate(Float64Array.of(1.2, 0.4), loss, new Float64Array(2), 0, 2);
    batch.evaluate(Float64Array.of(0.4, 1.2), loss, new Float64Array(2), 0, 2);
    expect(loss[0] * METRE_KPA).toBeCloseTo(at(links[0], 0.4).dropKpa, 9);
    expect(loss[1] * METRE_KPA).toBeCloseTo(at(links[1], 1.2).dropKpa, 7);
  });
});

describe('a terminal', () => {
  it('loses its design drop at its design flow, and by its exponent elsewhere', () => {
    expect(at(terminal, 0.5).dropKpa).toBeCloseTo(24, 9);
    expect(at(terminal, 0.25).dropKpa).toBeCloseTo(6, 9);
    expect(at({ ...terminal, exponent: 1.6 }, 0.5).dropKpa).toBeCloseTo(24, 9);
    expect(at({ ...terminal, exponent: 1.6 }, 1).dropKpa).toBeCloseTo(24 * 2 ** 1.6, 9);
    expect(at({ ...terminal, exponent: 1 }, 0.1).dropKpa).toBeCloseTo(4.8, 9);
  });
});

describe('valves', () => {
  it('follow Q = Kv sqrt(dp 1000 / rho) at the Kv of their setting, fully open without one', () => {
    expect(at(balancingValve, 1).dropKpa).toBeCloseTo(kvDrop(9, 1), 9);
    expect(at({ ...balancingValve, setting: 3 }, 1).dropKpa).toBeCloseTo(kvDrop(6, 1), 9);
    expect(at({ ...ends, kind: 'resistance', kv: 5 }, 1).dropKpa).toBeCloseTo(kvDrop(5, 1), 9);
    expect(at({ ...ends, kind: 'dpController', setpointKpa: 20, sense: ['A', 'B'], kvs: 4 }, 1).dropKpa).toBeCloseTo(kvDrop(4, 1), 9);
  });

  it('by a design pair lose its drop at its flow, whatever the density', () => {
    expect(at({ ...ends, kind: 'resistance', designFlowLs: 0.6, designDropKpa: 18 }, 0.6).dropKpa).toBeCloseTo(18, 9);
    expect(at({ ...ends, kind: 'resistance', designFlowLs: 0.6, designDropKpa: 18, kv: 5 }, 0.6).dropKpa).toBeCloseTo(kvDrop(5, 0.6), 9);
  });

  it('read their table straight between its points and never beyond them, either way round', () => {
    const { kvTable } = balancingValve;
    const pairs = [
      [1, 2],
      [1.5, 2.5],
      [2, 3],
      [3, 6],
      [3.5, 7.5],
      [4, 9],
    ];
    for (const [setting, kv] of pairs) {
      expect(kvAtSetting(kvTable, setting)).toBeCloseTo(kv, 12);
      expect(settingAtKv(kvTable, kv)).toBeCloseTo(setting, 12);
    }
    expect([kvAtSetting(kvTable, 0), kvAtSetting(kvTable, 9)]).toEqual([2, 9]);
    expect([settingAtKv(kvTable, 0.1), settingAtKv(kvTable, 50)]).toEqual([1, 4]);
  });

  it('that are control valves have equal percentage and full opening unless told otherwise', () => {
    expect(at(controlValve, 1).dropKpa).toBeCloseTo(kvDrop(6.3, 1), 9);
    expect(at({ ...controlValve, opening: 0.5 }, 0.1).dropKpa).toBeCloseTo(kvDrop(6.3 / Math.sqrt(50), 0.1), 9);
    expect(at({ ...controlValve, opening: 0.5, rangeability: 30 }, 0.1).dropKpa).toBeCloseTo(kvDrop(6.3 / Math.sqrt(30), 0.1), 9);
    expect(at({ ...controlValve, opening: 0.5, characteristic: 'linear' }, 0.1).dropKpa).toBeCloseTo(kvDrop(3.15, 0.1), 9);
  });
});

describe('walls', () => {
  const wallM = 1e9;

  it('a check valve is its Kv forwards and takes any head backwards', () => {
    const check: NetworkLink = { ...ends, kind: 'checkValve', kv: 5 };
    expect(at(check, 0.7).dropKpa).toBeCloseTo(kvDrop(5, 0.7), 9);
    expect(at(check, -1e-8).dropKpa).toBeCloseTo(-1e-8 * wallM * METRE_KPA, 3);
    expect(at(check, -1e-8).slope).toBeCloseTo(wallM * METRE_KPA, 0);
  });

  it('a limiter is an opening that passes its limit at its least drop, and takes any head beyond', () => {
    const limiter: NetworkLink = { ...ends, kind: 'flowLimiter', limitLs: 0.4, minDropKpa: 16 };
    expect(at(limiter, 0.2).dropKpa).toBeCloseTo(4, 9);
    expect(at(limiter, -0.4).dropKpa).toBeCloseTo(-16, 9);
    expect(at(limiter, -0.8).dropKpa).toBeCloseTo(-64, 9);
    expect(at(limiter, 0.4).dropKpa).toBeCloseTo(16, 9);
    expect(at(limiter, 0.4 + 1e-8).dropKpa).toBeCloseTo(16 + 1e-8 * wallM * METRE_KPA, 3);
  });

  it('a pump with a non-return takes any head backwards; without one it gives its shut-off head there', () => {
    expect(at(pump, -1e-8).dropKpa).toBeCloseTo((-11.75 - 1e-8 * wallM) * METRE_KPA, 3);
    expect(at(pump, -1e-8).slope).toBeCloseTo(wallM * METRE_KPA, 0);
    expect(at({ ...pump, nonReturn: false }, -1)).toMatchObject({
      dropKpa: expect.closeTo(-11.75 * METRE_KPA, 9),
      slope: expect.closeTo(0, 12),
    });
    expect(at(pump, 0).dropKpa).toBeCloseTo(-11.75 * METRE_KPA, 9);
  });
});

describe('a pump', () => {
  it('goes through the points of its curve, level before the first and straight on past the last', () => {
    for (const { flowLs, headM } of pump.curve) expect(pumpHeadAt(pump, flowLs, 1)).toBeCloseTo(headM, 12);
    expect(pumpHeadAt(pump, 0.1, 1)).toBeCloseTo(11.75, 12);
    const [three, four, five] = [3, 4, 5].map((flowLs) => pumpHeadAt(pump, flowLs, 1));
    expect(three - four).toBeGreaterThan(3);
    expect(four - five).toBeCloseTo(three - four, 9);
  });

  it('follows the affinity laws: at a speed n it gives n² the head at n times the flow', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 1.5, noNaN: true }), fc.double({ min: 0, max: 4, noNaN: true }), (speed, flow) => {
        expect(pumpHeadAt(pump, flow * speed, speed)).toBeCloseTo(speed ** 2 * pumpHeadAt(pump, flow, 1), 9);
        expect(at({ ...pump, speed }, flow * speed).dropKpa).toBeCloseTo(-(speed ** 2) * pumpHeadAt(pump, flow, 1) * METRE_KPA, 7);
      }),
    );
  });

  it('that is stopped raises nothing', () => {
    expect(pumpHeadAt(pump, 1, 0)).toBe(0);
    expect(at({ ...pump, speed: 0, nonReturn: false }, 1)).toEqual({ dropKpa: -0, slope: -0 });
  });

  it('with a level curve still falls, however little, past its last point', () => {
    const level = { ...pump, curve: [0, 1, 2].map((flowLs) => ({ flowLs, headM: 8 })) };
    expect(pumpHeadAt(level, 1.5, 1)).toBe(8);
    expect(pumpHeadAt(level, 1002, 1)).toBeCloseTo(8 - 1e-3, 9);
    expect(at(level, 5).slope).toBeGreaterThan(0);
  });
});

describe('a shut link', () => {
  const shut: [string, NetworkLink, boolean][] = [
    ['one that is closed', { ...pipe, closed: true }, true],
    ['an open pipe', pipe, false],
    ['a terminal', terminal, false],
    [
      'a balancing valve at Kv 0',
      {
        ...balancingValve,
        kvTable: [
          { setting: 0, kv: 0 },
          { setting: 1, kv: 4 },
        ],
        setting: 0,
      },
      true,
    ],
    [
      'the same a little open',
      {
        ...balancingValve,
        kvTable: [
          { setting: 0, kv: 0 },
          { setting: 1, kv: 4 },
        ],
        setting: 0.01,
      },
      false,
    ],
    ['a control valve at opening 0', { ...controlValve, opening: 0 }, true],
    ['a control valve a little open', { ...controlValve, opening: 0.01 }, false],
    ['a stopped pump with its non-return', { ...pump, speed: 0 }, true],
    ['a stopped pump without one', { ...pump, speed: 0, nonReturn: false }, false],
    ['a running pump', pump, false],
    ['a check valve', walled[0], false],
    ['a limiter', walled[1], false],
    ['a resistance', { ...ends, kind: 'resistance', kv: 5 }, false],
    ['a controller', { ...ends, kind: 'dpController', setpointKpa: 20, sense: ['A', 'B'], kvs: 4 }, false],
  ];
  it.each(shut)('%s', (_, link, isIt) => expect(isShut(link)).toBe(isIt));
});

describe('a usual flow, where nothing better is known', () => {
  it('is 0.7 m/s in a pipe, design flow in a terminal, the limit in a limiter, 60 % of its curve in a pump', () => {
    expect(usualFlowLs(pipe, fluid)).toBeCloseTo(0.7 * (Math.PI / 4) * 0.04 ** 2 * 1000, 12);
    expect(usualFlowLs(terminal, fluid)).toBe(0.5);
    expect(usualFlowLs(walled[1], fluid)).toBe(0.4);
    expect(usualFlowLs(pump, fluid)).toBeCloseTo(1.8, 12);
    expect(usualFlowLs({ ...pump, speed: 0.5 }, fluid)).toBeCloseTo(0.9, 12);
    expect(usualFlowLs({ ...pump, speed: 0, nonReturn: false }, fluid)).toBeGreaterThan(0);
  });

  it('is that at 8 kPa through an opening', () => {
    const through = (kv: number) => (kv / 3.6) * Math.sqrt(0.08 / 0.96);
    expect(usualFlowLs(balancingValve, fluid)).toBeCloseTo(through(9), 12);
    expect(usualFlowLs({ ...controlValve, opening: 0.5 }, fluid)).toBeCloseTo(through(6.3 / Math.sqrt(50)), 12);
    expect(usualFlowLs(walled[0], fluid)).toBeCloseTo(through(5), 12);
    expect(usualFlowLs({ ...ends, kind: 'resistance', kv: 5 }, fluid)).toBeCloseTo(through(5), 12);
    expect(usualFlowLs({ ...ends, kind: 'resistance', designFlowLs: 0.6, designDropKpa: 18 }, fluid)).toBe(0.6);
    expect(usualFlowLs({ ...ends, kind: 'dpController', setpointKpa: 20, sense: ['A', 'B'], kvs: 4 }, fluid)).toBeCloseTo(through(4), 12);
  });
});

it('a metre of the fluid is rho g kPa', () => expect(metresPerKpa(960)).toBeCloseTo(1 / METRE_KPA, 12));
