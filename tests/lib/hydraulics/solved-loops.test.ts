import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { powerBreakdown } from '@/lib/hydraulics/energy';
import { stoppedPressures, surveyPressures } from '@/lib/hydraulics/pressures';
import { solve } from '@/lib/hydraulics/solve';
import { networkTemperatures, type ThermalLaw } from '@/lib/hydraulics/temperatures';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { saturationPressureMpa } from '@/lib/hydraulics/water';

type Circuit = {
  designFlowLs: number;
  designDropKpa: number;
  opening: number;
  setting: number;
  lengthM: number;
  boreMm: number;
  riseM: number;
};

const circuit: fc.Arbitrary<Circuit> = fc.record({
  designFlowLs: fc.double({ min: 0.05, max: 1.5, noNaN: true }),
  designDropKpa: fc.double({ min: 5, max: 40, noNaN: true }),
  opening: fc.double({ min: 0.2, max: 1, noNaN: true }),
  setting: fc.double({ min: 0.5, max: 4, noNaN: true }),
  lengthM: fc.double({ min: 1, max: 40, noNaN: true }),
  boreMm: fc.double({ min: 20, max: 80, noNaN: true }),
  riseM: fc.double({ min: 0, max: 5, noNaN: true }),
});

/** A heating loop of direct return: boiler and pump at X, circuit i between supply node Si and return node Ri. */
function loopOf(circuits: Circuit[]): NetworkDocument {
  const totalLs = circuits.reduce((sum, { designFlowLs }) => sum + designFlowLs, 0);
  const curve = [0, 0.5, 1, 1.5].map((share) => ({ flowLs: totalLs * share, headM: 15 - 6 * share * share }));
  const pipe = { kind: 'pipe', roughnessMm: 0.045, minorK: 2 } as const;
  const nodes: NetworkDocument['nodes'] = [{ id: 'X' }, { id: 'P' }, { id: 'S0' }];
  const links: NetworkLink[] = [
    { id: 'PU', kind: 'pump', from: 'X', to: 'P', curve },
    { id: 'boiler', kind: 'resistance', from: 'P', to: 'S0', designFlowLs: totalLs, designDropKpa: 15 },
  ];
  let elevationM = 0;
  circuits.forEach(({ designFlowLs, designDropKpa, opening, setting, lengthM, boreMm, riseM }, index) => {
    const i = index + 1;
    elevationM += riseM;
    for (const name of ['S', 'a', 'b', 'R']) nodes.push({ id: `${name}${i}`, elevationM });
    const kvTable = [0.5, 2, 4].map((at) => ({ setting: at, kv: designFlowLs * 3 * at }));
    links.push(
      { ...pipe, id: `s${i}`, from: `S${i - 1}`, to: `S${i}`, lengthM, boreMm },
      { id: `T${i}`, kind: 'terminal', from: `S${i}`, to: `a${i}`, designFlowLs, designDropKpa },
      { id: `C${i}`, kind: 'controlValve', from: `a${i}`, to: `b${i}`, kvs: designFlowLs * 10, characteristic: 'equalPercentage', opening },
      { id: `V${i}`, kind: 'balancingValve', from: `b${i}`, to: `R${i}`, kvTable, setting },
      { ...pipe, id: `r${i}`, from: `R${i}`, to: index ? `R${index}` : 'X', lengthM, boreMm },
    );
  });
  const reference = { node: 'X', gaugePressureKpa: 150 };
  return { format: 'network/1', fluid: { medium: 'water', temperatureC: 70 }, reference, nodes, links };
}

describe('side calculations on solved loops', () => {
  it('the power lost in all links is the pump’s hydraulic power within 0.1 %', () => {
    fc.assert(
      fc.property(fc.array(circuit, { minLength: 1, maxLength: 8 }), (circuits) => {
        const document = loopOf(circuits);
        const solution = solve(document);
        const power = powerBreakdown(document, solution);
        const hydraulicKw = solution.pumps.reduce((sum, pump) => sum + pump.hydraulicKw, 0);
        expect(solution.converged).toBe(true);
        expect(power.pumpsKw).toBeGreaterThan(0);
        expect(Math.abs(power.pumpsKw / hydraulicKw - 1)).toBeLessThan(1e-9);
        expect(Math.abs(power.lostKw / hydraulicKw - 1)).toBeLessThan(1e-3);
        const byKind = Object.values(power.lostByKind).reduce((sum, kw) => sum + kw, 0);
        expect(Math.abs(byKind / power.lostKw - 1)).toBeLessThan(1e-9);
        for (const { lostKw } of power.links) expect(lostKw).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  it('heat given by the terminals is what the boiler puts in', () => {
    fc.assert(
      fc.property(fc.array(circuit, { minLength: 1, maxLength: 8 }), fc.double({ min: 0.5, max: 20, noNaN: true }), (circuits, loadKw) => {
        const document = loopOf(circuits);
        const laws = new Map<string, ThermalLaw>([['boiler', { kind: 'fixedOutlet', outletC: 80 }]]);
        circuits.forEach((_, i) => laws.set(`T${i + 1}`, { kind: 'heat', heatToWaterKw: -loadKw }));
        const result = networkTemperatures(document, solve(document), { laws });
        if (!result.ok) throw new Error(result.error.message);
        const { balance, converged } = result.temperatures;
        expect(converged).toBe(true);
        expect(balance.loadsKw).toBeCloseTo(-loadKw * circuits.length, 6);
        expect(Math.abs(balance.sourcesKw + balance.loadsKw)).toBeLessThan(1e-3 * loadKw);
      }),
    );
  });

  it('pressures with the pump stopped are the static ones, and the survey finds the highest place', () => {
    const circuits: Circuit[] = [1, 2, 3].map(() => ({
      designFlowLs: 0.4,
      designDropKpa: 20,
      opening: 1,
      setting: 4,
      lengthM: 10,
      boreMm: 40,
      riseM: 5,
    }));
    const running = loopOf(circuits);
    const stopped: NetworkDocument = {
      ...running,
      links: running.links.map((link) => (link.kind === 'pump' ? { ...link, speed: 0, nonReturn: false } : link)),
    };
    const solution = solve(stopped);
    const expected = stoppedPressures(stopped, solution.fluid.densityKgM3);
    solution.nodes.forEach((node, i) => expect(node.pressureKpa).toBeCloseTo(expected[i].pressureKpa, 6));
    const survey = surveyPressures(solution, { vapourKpaAbs: saturationPressureMpa(343.15) * 1000 });
    expect(survey.lowest?.id).toBe('S3');
    expect(survey.lowest?.concern).toBe('low');
    expect(survey.lowest?.aboveVapourKpa).toBeCloseTo(survey.lowest!.pressureKpa + 101.325 - 31.20064, 3);
  });
});
