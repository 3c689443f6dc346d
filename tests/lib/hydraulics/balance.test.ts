import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { balance } from '@/lib/hydraulics/balance';
import type { BalanceResult, LinkOf, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { houseExample } from '../../make/house-example';

const wide = () => houseExample({ kv: [9, 6, 4.1569219382] });
const valveOf = (result: BalanceResult, id: string) => result.valves.find((valve) => valve.id === id)!;
const change = <K extends NetworkLink['kind']>(document: NetworkDocument, id: string, fields: Partial<LinkOf<K>>) => ({
  ...document,
  links: document.links.map((link) => (link.id === id ? ({ ...link, ...fields } as NetworkLink) : link)),
});

interface Floor {
  drops: number[];
  lengthM: number;
}

/** Floors on a riser, each a ladder of terminals with a valve each, a valve at each floor and at the riser. */
function riser(floors: Floor[]): NetworkDocument {
  const links: NetworkLink[] = [];
  const kvTable = (kvs: number) => [0, 1, 2, 3, 4].map((setting) => ({ setting, kv: kvs * (0.002 + 0.998 * (setting / 4) ** 2) }));
  const pipe = (id: string, from: string, to: string, lengthM: number, boreMm: number) => {
    links.push({ id, kind: 'pipe', from, to, lengthM, boreMm, roughnessMm: 0.045, minorK: 1 });
  };
  const total = 0.2 * floors.reduce((sum, { drops }) => sum + drops.length, 0);
  const curve = [0, 0.5, 1, 1.5].map((part) => ({ flowLs: part * total, headM: 80 - 10 * part ** 2 }));
  links.push(
    { id: 'PU', kind: 'pump', from: 'D0', to: 'P', curve },
    { id: 'RV', kind: 'balancingValve', from: 'P', to: 'U0', kvTable: kvTable(40) },
  );
  floors.forEach(({ drops, lengthM }, k) => {
    const f = k + 1;
    pipe(`u${f}`, `U${k}`, `U${f}`, 4, 60);
    pipe(`d${f}`, `D${f}`, `D${k}`, 4, 60);
    links.push({ id: `BV${f}`, kind: 'balancingValve', from: `r${f}.0`, to: `D${f}`, kvTable: kvTable(20) });
    pipe(`x${f}`, `U${f}`, `s${f}.0`, 3, 40);
    drops.forEach((designDropKpa, t) => {
      if (t) {
        pipe(`s${f}.${t}`, `s${f}.${t - 1}`, `s${f}.${t}`, lengthM, 26.6);
        pipe(`r${f}.${t}`, `r${f}.${t}`, `r${f}.${t - 1}`, lengthM, 26.6);
      }
      links.push(
        { id: `T${f}.${t}`, kind: 'terminal', from: `s${f}.${t}`, to: `m${f}.${t}`, designFlowLs: 0.2, designDropKpa },
        { id: `V${f}.${t}`, kind: 'balancingValve', from: `m${f}.${t}`, to: `r${f}.${t}`, kvTable: kvTable(6) },
      );
    });
  });
  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  return { format: 'network/1', fluid: { medium: 'water', temperatureC: 8 }, nodes: ids.map((id) => ({ id })), links };
}

const floor = fc.record({
  drops: fc.array(fc.integer({ min: 5, max: 60 }), { minLength: 1, maxLength: 5 }),
  lengthM: fc.integer({ min: 1, max: 25 }),
});
const floors = fc.array(floor, { minLength: 1, maxLength: 5 });

describe('balance', () => {
  it('gives every terminal its design flow, with one valve of each group fully open and the pump slowed to the index circuit', () => {
    fc.assert(
      fc.property(floors, (building) => {
        const result = balance(riser(building));
        expect(result.converged).toBe(true);
        for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
        expect(valveOf(result, 'RV').state).toBe('open');
        building.forEach(({ drops }, k) => {
          const inFloor = drops.map((_, t) => valveOf(result, `V${k + 1}.${t}`).state);
          expect(inFloor).toContain('open');
        });
        expect(building.map((_, k) => valveOf(result, `BV${k + 1}`).state)).toContain('open');
        const most = Math.max(...result.terminals.map((terminal) => terminal.circuitDropKpa!));
        expect(result.terminals.find((terminal) => terminal.id === result.indexTerminal)!.circuitDropKpa).toBe(most);
        expect((result.pumps[0].requiredHeadM * 9.80665 * result.solution.fluid.densityKgM3) / 1000).toBeCloseTo(most, 6);
        expect(result.solution.pumps[0].headM).toBeCloseTo(result.pumps[0].requiredHeadM, 3);
      }),
      { numRuns: 60 },
    );
  }, 60_000);

  it('with the pump kept at its speed, the valve at the riser takes the excess and the rest stays the same', () => {
    fc.assert(
      fc.property(floors, (building) => {
        const slowed = balance(riser(building));
        const throttled = balance({ ...riser(building), options: { pumpExcess: 'throttle' } });
        expect(throttled.pumps[0].speed).toBe(1);
        expect(valveOf(throttled, 'RV').state).toBe('throttled');
        for (const valve of throttled.valves)
          if (valve.id !== 'RV') expect(valve.setting).toBeCloseTo(valveOf(slowed, valve.id).setting, 6);
        for (const terminal of throttled.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
      }),
      { numRuns: 30 },
    );
  }, 60_000);

  it('leaves a locked valve where it is and sets the others round it', () => {
    const result = balance(change<'balancingValve'>(wide(), 'V3', { locked: true, setting: 3 }));
    expect(result.valves.map((valve) => valve.id)).toEqual(['V1', 'V2']);
    expect(result.pumps[0].requiredHeadM * 9.80665).toBeGreaterThan(45.5);
    expect(result.terminals[0].percentOfDesign).toBeCloseTo(result.terminals[2].percentOfDesign, 3);
  });

  it('names a pump that is too small, and shows the shortfall at settings for design flow', () => {
    const result = balance(houseExample({ kv: [9, 6, 4.1569219382], pump: (q) => 40 - 15 * q * q }));
    expect(result.warnings).toContainEqual(expect.objectContaining({ code: 'pump-too-small', id: 'PU' }));
    expect(result.pumps[0]).toMatchObject({ speed: 1 });
    expect(valveOf(result, 'V1').kv).toBeCloseTo(4.64758, 4);
    expect(valveOf(result, 'V3').state).toBe('too-small');
    const [first, , third] = result.terminals;
    expect(first.percentOfDesign).toBeLessThan(90);
    expect(first.percentOfDesign).toBeCloseTo(third.percentOfDesign, 2);
  });

  it('names a valve whose smallest Kv passes too much', () => {
    const kvTable = [1, 2].map((setting) => ({ setting, kv: 4 + setting }));
    const result = balance(change<'balancingValve'>(wide(), 'V1', { kvTable }));
    expect(valveOf(result, 'V1')).toMatchObject({ state: 'too-large', setting: 1, kv: 5 });
    expect(valveOf(result, 'V1').wantedKv).toBeCloseTo(4.64758, 4);
    expect(result.terminals[0].percentOfDesign).toBeGreaterThan(100.5);
  });

  it('rounds a setting to the step of the valve', () => {
    const result = balance(change<'balancingValve'>(wide(), 'V1', { settingStep: 0.1 }));
    const { setting, kv } = valveOf(result, 'V1');
    expect(setting).toBe(2.1);
    expect(kv).toBeCloseTo((9 * 2.1) / 4, 9);
    expect(result.terminals[0].percentOfDesign).not.toBeCloseTo(100, 1);
  });

  it('leaves a circuit with a closed link out', () => {
    const result = balance(change<'terminal'>(wide(), 'T2', { closed: true }));
    expect(result.terminals.map((terminal) => terminal.id)).toEqual(['T1', 'T3']);
    expect(result.pumps[0].flowLs).toBeCloseTo(0.7, 9);
    expect(result.warnings).toContainEqual(expect.objectContaining({ code: 'circuit-closed', id: 'T2' }));
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
  });

  it('gives the authority of a control valve in the terminal’s branch', () => {
    const document = wide();
    document.nodes.push({ id: 'c1' });
    const links = document.links.map((link) => (link.id === 'T1' ? { ...link, to: 'c1', designDropKpa: 10 } : link));
    links.push({ id: 'C1', kind: 'controlValve', from: 'c1', to: 'm1', kvs: 5.0911688, characteristic: 'equalPercentage' });
    // Kv 5.0912 takes 12.5 kPa at 0.5 L/s, of 35 kPa across the branch.
    const [first, second] = balance({ ...document, links }).terminals;
    expect(first.authority).toBeCloseTo(12.5 / 35, 4);
    expect(second.authority).toBeNull();
  });

  it('lets a bypass make no demand on the pump', () => {
    const result = balance(houseExample({ kv: [9, 6, 4.1569219382], bypass: 400, pump: (q) => 90 - 15 * q * q }));
    expect(result.converged).toBe(true);
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
    const bypass = result.solution.links.find((link) => link.id === 'bypass')!;
    expect(bypass.flowLs).toBeCloseTo(Math.sqrt(35 / 400), 4);
    expect(result.pumps[0].speed).toBeLessThan(0.95);
  });

  it('leaves a valve on a bypass as it is set', () => {
    const document = houseExample({ kv: [9, 6, 4.1569219382], pump: (q) => 90 - 15 * q * q });
    const kvTable = [1, 4].map((setting) => ({ setting, kv: setting }));
    document.links.push({ id: 'BY', kind: 'balancingValve', from: 'n1', to: 'X', kvTable, setting: 1 });
    const result = balance(document);
    expect(result.valves.map((valve) => valve.id)).toEqual(['V1', 'V2', 'V3']);
    // At Kv 1 the bypass passes sqrt(35)/36 L/s under the 35 kPa at the first tee.
    expect(result.solution.links.find((link) => link.id === 'BY')!.flowLs).toBeCloseTo(Math.sqrt(35) / 36, 4);
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 2);
  });

  it('holds design flows in a ring main and lets the ring share them', () => {
    const pipe = (id: string, from: string, to: string): NetworkLink => ({
      id,
      kind: 'pipe',
      from,
      to,
      lengthM: 20,
      boreMm: 40,
      roughnessMm: 0.045,
    });
    const kvTable = [0.5, 4].map((setting) => ({ setting, kv: setting * 3 }));
    const links: NetworkLink[] = [
      { id: 'PU', kind: 'pump', from: 'X', to: 'a', curve: [0, 1, 2, 3].map((q) => ({ flowLs: q, headM: 18 - q })) },
    ];
    links.push(pipe('ab', 'a', 'b'), pipe('bc', 'b', 'c'), pipe('ca', 'c', 'a'));
    for (const place of ['b', 'c']) {
      links.push({
        id: `T${place}`,
        kind: 'terminal',
        from: place,
        to: `m${place}`,
        designFlowLs: place === 'b' ? 0.9 : 0.3,
        designDropKpa: 30,
      });
      links.push({ id: `V${place}`, kind: 'balancingValve', from: `m${place}`, to: 'X', kvTable });
    }
    const nodes = ['X', 'a', 'b', 'c', 'mb', 'mc'].map((id) => ({ id }));
    const result = balance({ format: 'network/1', fluid: { medium: 'water', temperatureC: 10 }, nodes, links });
    for (const terminal of result.terminals) expect(terminal.percentOfDesign).toBeCloseTo(100, 3);
  });
});
