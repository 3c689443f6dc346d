import { expect, it } from 'vitest';
import { balance as balanceOf } from '@/lib/hydraulics/balance';
import { solve as solveFor } from '@/lib/hydraulics/solve';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { scheduleOf } from '@/lib/network/schedule-rows';
import { ladder } from '../../make/drawing';

const drawn = ladder([0.2, 0.3, 0.25]);
const { document } = drawingToDocument(drawn, 'Loop');
const solve = solveFor(document!);
const balance = balanceOf(document!);
const schedule = scheduleOf(drawn, { solve, balance });

it('lists every terminal, pipe, pump and source of the drawing once, by its id', () => {
  expect(schedule.terminals.map(({ id }) => id)).toEqual(['FC-1', 'FC-2', 'FC-3']);
  expect(schedule.pipes.map(({ id }) => id)).toEqual(drawn.pipes.map(({ id }) => id));
  expect(schedule.pumps.map(({ id }) => id)).toEqual(['P-1']);
  expect(schedule.sources).toMatchObject([{ id: 'CH-1', kind: 'chiller', designFlowLs: 0.75 }]);
});

it('sets the flow now beside the design flow, and one is the per cent of the other', () => {
  for (const row of schedule.terminals) expect(row.percentOfDesign!).toBeCloseTo((100 * row.flowLs!) / row.designFlowLs!, 9);
  const total = schedule.terminals.reduce((sum, { flowLs }) => sum + flowLs!, 0);
  expect(schedule.pumps[0].flowLs).toBeCloseTo(total, 6);
  expect(schedule.pumps[0].designFlowLs).toBeCloseTo(0.75, 6);
});

it('gives each valve the setting of the balance, and marks the one terminal of the index circuit', () => {
  const settingOf = new Map(balance.valves.map(({ id, setting }) => [id, setting]));
  for (const row of schedule.terminals) expect(row.settingTurns).toBe(settingOf.get(`${row.id}:balancing`));
  expect(schedule.terminals.filter(({ isIndex }) => isIndex).map(({ id }) => `${id}:coil`)).toEqual([balance.indexTerminal]);
  const longest = Math.max(...schedule.terminals.map(({ circuitDropKpa }) => circuitDropKpa!));
  expect(schedule.terminals.find(({ isIndex }) => isIndex)!.circuitDropKpa).toBe(longest);
});

it('a pipe is named from where to where, its flow without a sign', () => {
  const back = schedule.pipes.find(({ id }) => id === 'r-1')!;
  expect(back.tag).toBe('R-1 – R-0');
  expect(back.flowLs).toBeGreaterThan(0);
  expect(schedule.pipes.every(({ flowLs }) => flowLs! >= 0)).toBe(true);
});

it('a drawing that cannot be solved is listed all the same, without figures', () => {
  const bare = scheduleOf(drawn, { solve: null, balance: null });
  expect(bare.terminals).toMatchObject([
    { designFlowLs: 0.2, flowLs: null, percentOfDesign: null, settingTurns: null, isIndex: false },
    {},
    {},
  ]);
  expect(bare.pipes[0]).toMatchObject({ flowLs: null, dropKpa: null });
});
