import { generateLoop, type LoopMake } from '@/lib/network/generate/generate-loop';
import { loopSummary } from '@/lib/network/generate/loop-summary';
import { usualGenerateOptions } from '@/lib/network/generate/scheduled-terminal';
import { genericValves } from '@/lib/network/valve-families';
import { schedule } from '../make/schedule';
import type { Suite } from './run';

/** GENERATE_TERMINALS=5000 measures other sizes. */
const sizes = (process.env.GENERATE_TERMINALS ?? '12,60,200,1000').split(',').map(Number);
const RUNS = 3;

const make: LoopMake = {
  service: 'chilled',
  fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
  valveSizes: genericValves,
};

/**
 * From the rows of a schedule to the solved drawing (laid out, sized, valves and pump chosen, balanced, solved again with rounded settings): the first run of
 * the process, which still compiles, and the median of three.
 */
export async function generateSuite(): Promise<Suite> {
  const rows: Suite['rows'] = [];
  for (const terminals of sizes)
    for (const returnPiping of ['direct', 'reverse'] as const) {
      const options = { ...usualGenerateOptions, returnPiping };
      const took: number[] = [];
      let row: Suite['rows'][number] = {};
      for (let run = 0; run < RUNS; run++) {
        const begun = performance.now();
        const made = await generateLoop(schedule(terminals), options, make);
        took.push(performance.now() - begun);
        if (!made.ok) throw new Error(made.faults[0].message);
        const { lowestPercent, highestPercent, lowestReadingKpa, pipes } = loopSummary(made, options);
        const rounded = (value: number) => Number(value.toFixed(2));
        row = {
          pieces: made.drawing.equipment.length,
          pipes,
          drawingKib: Math.round(JSON.stringify(made.drawing).length / 1024),
          lowestPercent: rounded(lowestPercent),
          highestPercent: rounded(highestPercent),
          lowestReadingKpa: rounded(lowestReadingKpa),
        };
      }
      rows.push({
        terminals,
        returnPiping,
        firstMs: Math.round(took[0]),
        ms: Math.round(took.toSorted((a, b) => a - b)[RUNS >> 1]),
        ...row,
      });
    }
  return { suite: 'generate', rows };
}
