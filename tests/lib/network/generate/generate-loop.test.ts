import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { solve } from '@/lib/hydraulics/solve';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import { preferredKvs } from '@/lib/network/generate/preferred-kv';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import type { Drawing } from '@/lib/network/drawing';
import { readingsAtDesign } from '@/lib/network/generate/loop-summary';
import { generateLoop, type MadeLoop } from '@/lib/network/generate/generate-loop';
import { usualGenerateOptions } from '@/lib/network/generate/scheduled-terminal';
import { chilledMake, generated } from '../../../make/generated';
import { anyOptions, anySchedule, schedule } from '../../../make/schedule';

vi.setConfig({ testTimeout: 120_000 });
const RUNS = 12;

const percentsOf = ({ drawing }: MadeLoop) => {
  const solution = solve(drawingToDocument(drawing, 'loop').document!);
  const flow = new Map(solution.links.map(({ id, flowLs }) => [id, flowLs]));
  return drawing.equipment.flatMap((piece) =>
    piece.kind === 'terminalUnit' ? [(100 * flow.get(`${piece.id}:coil`)!) / piece.designFlowLs!] : [],
  );
};

/** m of pipe from the riser's side of a branch through a unit and back, by the unit's tag. */
function lengthsThrough(drawing: Drawing): Map<string, number> {
  const into = new Map(drawing.pipes.map((pipe) => [`${pipe.to.equipmentId} ${pipe.circuit}`, pipe]));
  const outOf = new Map(drawing.pipes.map((pipe) => [`${pipe.from.equipmentId} ${pipe.circuit}`, pipe]));
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  return new Map(
    drawing.equipment.flatMap((unit) => {
      if (unit.kind !== 'terminalUnit') return [];
      let lengthM = 0;
      for (let at = unit.id; at;) {
        const pipe = into.get(`${at} supply`);
        lengthM += pipe?.lengthM ?? 0;
        at = pipe && pieces.get(pipe.from.equipmentId)?.kind !== 'source' ? pipe.from.equipmentId : '';
      }
      for (let at = unit.id; at;) {
        const pipe = outOf.get(`${at} return`);
        lengthM += pipe?.lengthM ?? 0;
        at = pipe && pieces.get(pipe.to.equipmentId)?.kind !== 'source' ? pipe.to.equipmentId : '';
      }
      return [[unit.tag, lengthM] as const];
    }),
  );
}

describe('a loop generated from any schedule', () => {
  it('has every terminal within 1 % of its design flow, as the engine solves its drawing', async () => {
    await fc.assert(
      fc.asyncProperty(anySchedule, anyOptions, async (terminals, options) => {
        const made = await generated(terminals, options);
        const percents = percentsOf(made);
        expect(percents).toHaveLength(terminals.length);
        expect(Math.min(...percents)).toBeGreaterThan(99);
        expect(Math.max(...percents)).toBeLessThan(101);
      }),
      { numRuns: RUNS },
    );
  });

  it('has balancing valves that each read at least the limit at design flow, less what rounding to the handwheel takes', async () => {
    await fc.assert(
      fc.asyncProperty(anySchedule, anyOptions, async (terminals, options) => {
        const made = await generated(terminals, options);
        expect(Math.min(...readingsAtDesign(made))).toBeGreaterThan(options.minReadingKpa * 0.98);
      }),
      { numRuns: RUNS },
    );
  });

  it('keeps all pipes within the limits, and has a pump whose curve passes the duty that was found', async () => {
    await fc.assert(
      fc.asyncProperty(anySchedule, anyOptions, async (terminals, options) => {
        const { drawing, solution, balance, overLimit } = await generated(terminals, options);
        expect(overLimit).toEqual([]);
        const bore = new Map(drawing.pipes.map(({ id, boreMm }) => [id, boreMm!]));
        for (const { id, velocityMs, frictionFactor } of solution.links) {
          if (velocityMs === undefined) continue;
          // Flows as solved are within 1 % of those sized for.
          expect(Math.abs(velocityMs)).toBeLessThan(options.maxVelocityMs * 1.01);
          const paPerM = ((frictionFactor ?? 0) * solution.fluid.densityKgM3 * velocityMs ** 2) / 2 / (bore.get(id)! / 1000);
          expect(paPerM).toBeLessThan(options.maxGradientPaM * 1.02);
        }
        const [pump] = drawing.equipment.filter((piece) => piece.kind === 'pump');
        const [duty] = balance.pumps;
        const atDuty = pump.curve.find(({ flowLs }) => Math.abs(flowLs / duty.flowLs - 1) < 1e-4)!;
        expect(atDuty.headM).toBeGreaterThanOrEqual(duty.requiredHeadM);
        expect(atDuty.headM).toBeLessThan(duty.requiredHeadM + 0.0011);
      }),
      { numRuns: RUNS },
    );
  });
});

describe('a generated loop', () => {
  it('carries in its source and pump what all terminals ask for together', async () => {
    const terminals = schedule(40, { storeys: 2, risers: 2 });
    const total = terminals.reduce((sum, { designFlowLs }) => sum + designFlowLs, 0);
    const { drawing, balance } = await generated(terminals);
    expect(drawing.equipment.find((piece) => piece.kind === 'source')?.designFlowLs).toBeCloseTo(total, 6);
    expect(balance.pumps[0].flowLs).toBeCloseTo(total, 6);
    const main = drawing.equipment.find(({ tag }) => tag === 'BV-M')!;
    expect(balance.valves.find(({ id }) => id === main.id)!.flowLs).toBeCloseTo(total, 6);
    for (const name of ['A', 'B']) {
      const riser = drawing.equipment.find(({ tag }) => tag === `BV-R${name}`)!;
      const its = terminals.filter((terminal) => terminal.riser === name).reduce((sum, { designFlowLs }) => sum + designFlowLs, 0);
      expect(balance.valves.find(({ id }) => id === riser.id)!.flowLs).toBeCloseTo(its, 6);
    }
  });

  it('with a reverse return has as much pipe through every terminal of a branch', async () => {
    const { drawing } = await generated(schedule(9, { storeys: 1, risers: 1 }), { returnPiping: 'reverse' });
    const lengths = [...lengthsThrough(drawing).values()];
    for (const length of lengths) expect(length).toBeCloseTo(lengths[0], 9);
  });

  it('with a direct return has two spacings of pipe more through each terminal than through the one before', async () => {
    const { drawing } = await generated(schedule(9, { storeys: 1, risers: 1 }), { returnPiping: 'direct', terminalSpacingM: 5 });
    const lengths = [...lengthsThrough(drawing).values()];
    lengths.slice(1).forEach((length, k) => expect(length - lengths[k]).toBeCloseTo(10, 9));
  });

  it('has main and branch valves only where they are wanted', async () => {
    const valves = async (hasMainValve: boolean, hasBranchValves: boolean) => {
      const { drawing } = await generated(schedule(40, { storeys: 2, risers: 2 }), { hasMainValve, hasBranchValves });
      return drawing.equipment.flatMap(({ kind, tag }) => (kind === 'balancingValve' ? [tag] : [])).sort();
    };
    expect(await valves(false, false)).toEqual([]);
    expect(await valves(true, false)).toEqual(['BV-M']);
    expect(await valves(true, true)).toEqual(['BV-1A', 'BV-1B', 'BV-2A', 'BV-2B', 'BV-M', 'BV-RA', 'BV-RB']);
  });

  it('holds back a valve too large for its flow, and locks the one that its circuit would have opened', async () => {
    const terminals = schedule(3, { storeys: 1, risers: 1 }).map((terminal) => ({ ...terminal, designFlowLs: 0.09 }));
    const { drawing, lockedValves } = await generated(terminals, { hasMainValve: false, hasBranchValves: false });
    const valves = drawing.equipment.flatMap((piece) => (piece.kind === 'terminalUnit' ? [piece.balancingValve!] : []));
    expect(lockedValves).toBe(1);
    expect(valves.filter(({ isLocked }) => isLocked)).toHaveLength(1);
    for (const { settingTurns, kvTable } of valves) expect(settingTurns).toBeLessThan(kvTable.at(-1)!.setting);
  });

  it('has control valves with an authority of a half or more, or none smaller that would leave the balancing valve enough to read', async () => {
    const { drawing, balance, solution } = await generated(schedule(36, { storeys: 3, risers: 1 }));
    const setDrop = new Map(balance.valves.map(({ id, dropKpa }) => [id, dropKpa]));
    const authority = new Map(balance.terminals.map((terminal) => [terminal.id, terminal.authority!]));
    for (const piece of drawing.equipment) {
      if (piece.kind !== 'terminalUnit') continue;
      const drop = (kv: number) => dropAcrossValveKpa(kv, piece.designFlowLs!, solution.fluid.densityKgM3);
      const { kvs } = piece.controlValve!;
      const smaller = preferredKvs[preferredKvs.indexOf(kvs!) - 1];
      const spareKpa = setDrop.get(`${piece.id}:balancing`)! - Math.max(3, drop(piece.balancingValve!.kvTable.at(-1)!.kv));
      if (authority.get(`${piece.id}:coil`)! < 0.49) expect(drop(smaller) - drop(kvs!)).toBeGreaterThan(spareKpa);
    }
  });

  it('goes on in steel where a pipe is too large for the series', async () => {
    const { drawing, otherSeries } = await generated(schedule(200), { pipeSeries: 'pex-sdr9' });
    expect(otherSeries.length).toBeGreaterThan(0);
    const series = new Map(drawing.pipes.map((pipe) => [pipe.id, pipe.series]));
    for (const id of otherSeries) expect(series.get(id)).toBe('steel-asme-sch40');
    expect([...series.values()].filter((it) => it === 'pex-sdr9').length).toBe(drawing.pipes.length - otherSeries.length);
  });

  it('of 200 terminals is made within 10 s', async () => {
    const begun = process.cpuUsage();
    await generated(schedule(200));
    const { user, system } = process.cpuUsage(begun);
    expect((user + system) / 1e6).toBeLessThan(10);
  });
});

describe('a schedule that makes no loop', () => {
  it('is answered with every tag that stands twice, at its row', async () => {
    const terminals = schedule(4).map((terminal, k) => (k === 0 ? terminal : { ...terminal, tag: 'FC-X' }));
    const made = await generateLoop(terminals, usualGenerateOptions, chilledMake);
    expect(made).toEqual({
      ok: false,
      faults: [
        { path: 'terminals.2.tag', message: 'FC-X stands in row 2 already.' },
        { path: 'terminals.3.tag', message: 'FC-X stands in row 2 already.' },
      ],
    });
  });

  it('is refused at the row that goes beyond the storeys of a drawing', async () => {
    const terminals = schedule(200).map((terminal, k) => ({ ...terminal, storey: `Level ${k + 1}` }));
    const made = await generateLoop(terminals, usualGenerateOptions, chilledMake);
    expect(made).toEqual({ ok: false, faults: [{ path: 'terminals.199.storey', message: 'A loop has up to 199 storeys.' }] });
  });

  it('is refused where its storeys would be higher than a drawing takes', async () => {
    const terminals = schedule(60).map((terminal, k) => ({ ...terminal, storey: `Level ${k + 1}` }));
    const made = await generateLoop(terminals, { ...usualGenerateOptions, storeyHeightM: 50 }, chilledMake);
    expect(made).toMatchObject({ ok: false, faults: [{ path: 'options.storeyHeightM' }] });
  });

  it('is refused where no pump could drive it', async () => {
    const options = { ...usualGenerateOptions, riserSpacingM: 500, maxGradientPaM: 5000, maxVelocityMs: 10 };
    const made = await generateLoop(schedule(30, { storeys: 1, risers: 10 }), options, chilledMake);
    expect(made).toMatchObject({ ok: false, faults: [{ path: 'terminals', message: expect.stringContaining('cannot be balanced') }] });
  });
});
