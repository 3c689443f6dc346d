import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coilFromDesign } from '@/lib/hydraulics/coil';
import { networkTemperatures, type ThermalInput, type ThermalLaw } from '@/lib/hydraulics/temperatures';

const FLUID = { densityKgM3: 1000, viscosityMPaS: 1, specificHeatKJKgK: 4.2 };

/** A link with its flow, as solved: id, from, to, L/s. */
type Flow = [id: string, from: string, to: string, flowLs: number];
type Solved = Parameters<typeof networkTemperatures>;

/** A network of links with known flows: temperatures do not ask why they flow. */
function temperaturesOf(
  flows: Flow[],
  laws: Record<string, ThermalLaw>,
  inflows: Record<string, [flowLs: number, temperatureC?: number]> = {},
) {
  const ids = [...new Set(flows.flatMap(([, from, to]) => [from, to]))];
  const document: Solved[0] = {
    nodes: ids.map((id) => ({ id, inflowLs: inflows[id]?.[0] })),
    links: flows.map(([id, from, to]) => ({ id, kind: 'resistance', from, to, kv: 1 })),
  };
  const links = flows.map(([id, , , flowLs]) => ({ id, flowLs, dropKpa: 0 }));
  const known = Object.entries(inflows).filter(([, [, c]]) => c !== undefined);
  const input: ThermalInput = { laws: new Map(Object.entries(laws)), inflowC: new Map(known.map(([id, [, c]]) => [id, c!])) };
  return networkTemperatures(document, { links, fluid: FLUID }, input);
}

function solved(...args: Parameters<typeof temperaturesOf>) {
  const result = temperaturesOf(...args);
  if (!result.ok) throw new Error(result.error.message);
  const { temperatures } = result;
  const node = (id: string) => temperatures.nodes.find((candidate) => candidate.id === id)!.temperatureC;
  const link = (id: string) => temperatures.links.find((candidate) => candidate.id === id)!;
  return { ...temperatures, node, link };
}

const source = (outletC: number): ThermalLaw => ({ kind: 'fixedOutlet', outletC });
const heat = (heatToWaterKw: number): ThermalLaw => ({ kind: 'heat', heatToWaterKw });

describe('temperatures through a solved network', () => {
  it('mix the returns by flow and close the heat balance of the loop', () => {
    const flows: Flow[] = [
      ['chiller', 'R', 'S', 1],
      ['near', 'S', 'R1', 0.5],
      ['middle', 'S', 'R1', 0.3],
      ['far', 'S', 'R2', 0.2],
      ['main', 'R1', 'R', 0.8],
      ['branch', 'R2', 'R', 0.2],
    ];
    const loop = solved(flows, { chiller: source(6), near: heat(12.6), middle: heat(6.3), far: heat(8.4) });
    expect(loop.converged).toBe(true);
    expect(loop.node('S')).toBe(6);
    expect(loop.link('near')).toMatchObject({ inletC: 6, outletC: expect.closeTo(12, 9) });
    expect(loop.node('R1')).toBeCloseTo((0.5 * 12 + 0.3 * 11) / 0.8, 9);
    expect(loop.node('R2')).toBeCloseTo(16, 9);
    expect(loop.node('R')).toBeCloseTo(12.5, 9);
    expect(loop.balance.loadsKw).toBeCloseTo(27.3, 9);
    expect(loop.balance.sourcesKw).toBeCloseTo(-27.3, 9);
    expect(loop.balance.boundaryKw).toBe(0);
    expect(Math.abs(loop.balance.imbalanceKw)).toBeLessThan(1e-9);
    expect(loop.warnings).toEqual([]);
  });

  it('give the decoupler’s 7.0 °C secondary supply, and its 11.0 °C primary return (case T8)', () => {
    const short = solved(
      [
        ['chiller', 'R', 'S', 10],
        ['load', 'S', 'R', 12],
        ['bypass', 'S', 'R', -2],
      ],
      { chiller: source(6), load: source(12) },
    );
    expect(short.node('S')).toBeCloseTo(7, 9);
    expect(short.node('R')).toBeCloseTo(12, 9);
    expect(short.link('bypass')).toMatchObject({ inletC: expect.closeTo(12, 9), outletC: expect.closeTo(12, 9), heatToWaterKw: 0 });
    const ample = solved(
      [
        ['chiller', 'R', 'S', 12],
        ['load', 'S', 'R', 10],
        ['bypass', 'S', 'R', 2],
      ],
      { chiller: source(6), load: source(12) },
    );
    expect(ample.node('R')).toBeCloseTo(11, 9);
    expect(ample.node('S')).toBeCloseTo(6, 9);
  });

  it('settle where nearly all the water recirculates', () => {
    // 1 % of the injection circuit's water is renewed: S = R + 0.01 (80 - R) ..., load 4.2 kW on 1 L/s makes R = S - 1.
    const flows: Flow[] = [
      ['boiler', 'B', 'S', 0.01],
      ['load', 'S', 'R', 1],
      ['recirculate', 'R', 'S', 0.99],
      ['back', 'R', 'B', 0.01],
    ];
    const loop = solved(flows, { boiler: source(80), load: heat(-4.2) });
    expect(loop.converged).toBe(true);
    expect(loop.node('R')).toBeCloseTo(80 - 100, 8);
    expect(loop.node('S')).toBeCloseTo(80 - 99, 8);
    expect(Math.abs(loop.balance.imbalanceKw)).toBeLessThan(1e-7);
  });

  it('follow a coil: more than design flow takes less out of each litre', () => {
    const design = coilFromDesign({ loadKw: 42, waterInC: 80, waterOutC: 60, airInC: 10, airOutC: 30 });
    if (!design.ok) throw new Error(design.error.message);
    const law: ThermalLaw = { kind: 'coil', coil: design.coil, designFlowLs: 0.5, airInC: 10 };
    const at = (flowLs: number) =>
      solved(
        [
          ['boiler', 'R', 'S', flowLs],
          ['coil', 'S', 'R', flowLs],
        ],
        { boiler: source(80), coil: law },
      );
    expect(at(0.5).node('R')).toBeCloseTo(60, 8);
    expect(at(0.5).link('coil').heatToWaterKw).toBeCloseTo(-42, 8);
    // Table 3.3: 102.9 % output at 110 % flow.
    expect(at(0.55).link('coil').heatToWaterKw / -42).toBeCloseTo(1.029, 3);
    expect(at(0.55).node('R')).toBeGreaterThan(60);
  });

  it('read a negative flow as flow the other way', () => {
    const loop = solved(
      [
        ['boiler', 'S', 'R', -1],
        ['load', 'R', 'S', -1],
      ],
      { boiler: source(70), load: heat(-42) },
    );
    expect(loop.node('S')).toBe(70);
    expect(loop.node('R')).toBeCloseTo(60, 9);
    expect(loop.link('load')).toMatchObject({ inletC: 70, outletC: expect.closeTo(60, 9) });
  });

  it('leave a link without flow out, and say so when it should have exchanged heat', () => {
    const loop = solved(
      [
        ['boiler', 'R', 'S', 1],
        ['load', 'S', 'R', 1],
        ['shut', 'S', 'X', 1e-9],
        ['idle', 'X', 'R', 0],
      ],
      { boiler: source(70), load: heat(-42), shut: heat(-5) },
    );
    expect(loop.link('shut')).toEqual({ id: 'shut', inletC: null, outletC: null, heatToWaterKw: 0 });
    expect(loop.node('X')).toBeNull();
    expect(loop.warnings).toEqual([{ code: 'no-flow', id: 'shut', message: expect.stringContaining('shut') }]);
    expect(loop.balance.loadsKw).toBeCloseTo(-42, 9);
  });

  it('have no steady value in a part that no source feeds', () => {
    const loop = solved(
      [
        ['pump', 'A', 'B', 1],
        ['load', 'B', 'A', 1],
        ['boiler', 'R', 'S', 1],
        ['back', 'S', 'R', 1],
      ],
      { load: heat(-5), boiler: source(70) },
    );
    expect(loop.node('A')).toBeNull();
    expect(loop.link('load')).toEqual({ id: 'load', inletC: null, outletC: null, heatToWaterKw: 0 });
    expect(loop.warnings.map(({ code, id }) => [code, id])).toEqual([
      ['no-source', 'A'],
      ['no-source', 'B'],
    ]);
    expect(loop.warnings[0].message).toContain('A');
    expect(loop.node('R')).toBe(70);
  });

  it('take in water from outside at its own temperature', () => {
    const loop = solved(
      [
        ['boiler', 'R', 'S', 1],
        ['load', 'S', 'M', 1],
        ['return', 'M', 'R', 0.9],
        ['makeUp', 'Z', 'R', 0.1],
      ],
      { boiler: source(60), load: heat(-42) },
      { Z: [0.1, 10], M: [-0.1] },
    );
    expect(loop.node('Z')).toBe(10);
    expect(loop.node('R')).toBeCloseTo(0.9 * 50 + 0.1 * 10, 9);
    expect(loop.balance.boundaryKw).toBeCloseTo(4.2 * 0.1 * (10 - 50), 9);
    expect(Math.abs(loop.balance.imbalanceKw)).toBeLessThan(1e-9);
  });

  it('mix water from outside with what is there, and count its heat at its own temperature', () => {
    const loop = solved(
      [
        ['boiler', 'R', 'S', 1],
        ['load', 'S', 'R', 0.9],
      ],
      { boiler: source(60), load: heat(-37.8) },
      { R: [0.1, 10], S: [-0.1] },
    );
    expect(loop.node('R')).toBeCloseTo(0.9 * 50 + 0.1 * 10, 9);
    expect(loop.balance.boundaryKw).toBeCloseTo(4.2 * 0.1 * (10 - 60), 9);
    expect(Math.abs(loop.balance.imbalanceKw)).toBeLessThan(1e-9);
  });

  it('say so where so little is renewed that they cannot settle', () => {
    const flows: Flow[] = [
      ['boiler', 'B', 'S', 2e-6],
      ['load', 'S', 'R', 1],
      ['recirculate', 'R', 'S', 1 - 2e-6],
      ['back', 'R', 'B', 2e-6],
    ];
    expect(solved(flows, { boiler: source(80), load: heat(-4.2) })).toMatchObject({ converged: false, sweeps: 20_000 });
  });

  it('take two passes over a loop without recirculation, however long', () => {
    const terminals = Array.from({ length: 200 }, (_, i) => i + 1);
    const flows: Flow[] = terminals.flatMap((i): Flow[] => [
      [`s${i}`, `S${i - 1}`, `S${i}`, 201 - i],
      [`t${i}`, `S${i}`, `R${i}`, 1],
      [`r${i}`, `R${i}`, `R${i - 1}`, 201 - i],
    ]);
    const laws = Object.fromEntries(terminals.map((i) => [`t${i}`, heat(4.2 * (1 + (i % 5)))]));
    const ladder = solved([['chiller', 'R0', 'S0', 200], ...flows], { chiller: source(6), ...laws });
    expect(ladder.sweeps).toBe(2);
    expect(ladder.node('R0')).toBeCloseTo(9, 9);
  });

  it('can come from outside alone', () => {
    const through = solved([['heater', 'A', 'B', 2]], { heater: heat(84) }, { A: [2, 10], B: [-2] });
    expect(through.node('B')).toBeCloseTo(20, 9);
    expect(Math.abs(through.balance.imbalanceKw)).toBeLessThan(1e-9);
  });

  it('need the temperature of every inflow', () => {
    const result = temperaturesOf([['pipe', 'A', 'B', 1]], {}, { A: [1], B: [-1] });
    expect(result).toEqual({ ok: false, error: { code: 'inflow-temperature-missing', id: 'A', message: expect.stringContaining('A') } });
  });

  it('stay between the coldest and the warmest source, and lose no heat, in any ladder of terminals', () => {
    const terminal = fc.record({
      flowLs: fc.double({ min: 0.01, max: 5, noNaN: true }),
      outletC: fc.double({ min: 8, max: 20, noNaN: true }),
    });
    fc.assert(
      fc.property(
        fc.array(terminal, { minLength: 1, maxLength: 12 }),
        fc.double({ min: 0, max: 5, noNaN: true }),
        (terminals, bypassLs) => {
          const flows: Flow[] = [];
          let mainLs = bypassLs;
          terminals.toReversed().forEach(({ flowLs }, index) => {
            const i = terminals.length - index;
            mainLs += flowLs;
            flows.push(
              [`t${i}`, `S${i}`, `R${i}`, flowLs],
              [`s${i}`, `S${i - 1}`, `S${i}`, mainLs],
              [`r${i}`, `R${i}`, `R${i - 1}`, mainLs],
            );
          });
          flows.push(['chiller', 'R0', 'S0', mainLs], ['end', `S${terminals.length}`, `R${terminals.length}`, bypassLs]);
          const laws = Object.fromEntries(terminals.map(({ outletC }, i) => [`t${i + 1}`, source(outletC)]));
          const ladder = solved(flows, { chiller: source(6), ...laws });
          const total = terminals.reduce((sum, t) => sum + t.flowLs * t.outletC, bypassLs < 1e-6 ? 0 : bypassLs * 6);
          expect(ladder.converged).toBe(true);
          expect(Math.abs(ladder.node('R0')! - total / mainLs)).toBeLessThan(1e-4);
          for (const { temperatureC } of ladder.nodes) {
            expect(temperatureC).toBeGreaterThanOrEqual(6 - 1e-9);
            expect(temperatureC).toBeLessThanOrEqual(20 + 1e-9);
          }
          expect(Math.abs(ladder.balance.imbalanceKw)).toBeLessThan(1e-3);
        },
      ),
    );
  });
});
