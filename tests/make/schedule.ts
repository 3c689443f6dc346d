import fc from 'fast-check';
import { usualGenerateOptions, type GenerateOptions, type ScheduledTerminal } from '@/lib/network/generate/scheduled-terminal';

/** Storeys and risers of a building for so many terminals, about 15 on each branch. */
function spread(terminals: number): { storeys: number; risers: number } {
  const branches = Math.max(1, Math.ceil(terminals / 15));
  const risers = Math.max(1, Math.round(Math.sqrt(branches / 4)));
  return { storeys: Math.ceil(branches / risers), risers };
}

/** A schedule of small coils, 0.08 to 0.28 L/s and 12 to 20 kPa, spread over storeys and risers. */
export function schedule(terminals: number, { storeys, risers } = spread(terminals)): ScheduledTerminal[] {
  return Array.from({ length: terminals }, (_, k) => {
    const storey = 1 + Math.floor((k * storeys) / terminals);
    return {
      tag: `FC-${storey}.${String(k + 1).padStart(2, '0')}`,
      storey: `Level ${storey}`,
      riser: risers > 1 ? String.fromCharCode(65 + (k % risers)) : '',
      room: `${storey}.${k}`,
      loadKw: null,
      designFlowLs: Number((0.08 + ((k * 7) % 11) * 0.02).toFixed(2)),
      coilDropKpa: 12 + ((k * 5) % 9),
    };
  });
}

/** Schedules as buildings have them: some risers that serve some storeys, a few terminals or many on each. */
export const anySchedule: fc.Arbitrary<ScheduledTerminal[]> = fc
  .array(
    fc.record({
      storey: fc.integer({ min: 1, max: 4 }),
      riser: fc.constantFrom('', 'A', 'North core'),
      flow: fc.integer({ min: 3, max: 120 }),
      coilDropKpa: fc.integer({ min: 4, max: 45 }),
    }),
    { minLength: 1, maxLength: 40 },
  )
  .map((rows) =>
    rows.map(({ storey, riser, flow, coilDropKpa }, k) => ({
      tag: `AHU-${storey}.${k + 1}`,
      storey: `Level ${storey}`,
      riser,
      room: '',
      loadKw: null,
      designFlowLs: flow / 100,
      coilDropKpa,
    })),
  );

export const anyOptions: fc.Arbitrary<GenerateOptions> = fc
  .record({
    returnPiping: fc.constantFrom('direct' as const, 'reverse' as const),
    terminalSpacingM: fc.integer({ min: 1, max: 12 }),
    storeyHeightM: fc.integer({ min: 2, max: 6 }),
    mostOnBranch: fc.integer({ min: 2, max: 20 }),
    hasBranchValves: fc.boolean(),
    hasMainValve: fc.boolean(),
    minReadingKpa: fc.integer({ min: 1, max: 6 }),
  })
  .map((some) => ({ ...usualGenerateOptions, ...some }));
