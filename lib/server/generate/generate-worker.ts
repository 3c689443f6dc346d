import type { GeneratedSummary } from '@/lib/api/generate';
import type { Drawing } from '@/lib/network/drawing';
import { generateLoop, type LoopMake } from '@/lib/network/generate/generate-loop';
import { loopSummary } from '@/lib/network/generate/loop-summary';
import type { GenerateOptions, ScheduledTerminal } from '@/lib/network/generate/scheduled-terminal';
import type { ScheduleFault } from '@/lib/network/generate/schedule-faults';

export interface GenerateTask {
  terminals: ScheduledTerminal[];
  options: GenerateOptions;
  make: LoopMake;
}

export type GenerateAnswer = { ok: true; drawing: Drawing; summary: GeneratedSummary } | { ok: false; faults: ScheduleFault[] };

/** What a thread of the pool runs: the drawing alone comes back, not the solutions it was made with. */
export default async function generate({ terminals, options, make }: GenerateTask): Promise<GenerateAnswer> {
  const startedAt = performance.now();
  const made = await generateLoop(terminals, options, make);
  if (!made.ok) return made;
  const summary = loopSummary(made, options);
  return { ok: true, drawing: made.drawing, summary: { ...summary, tookMs: performance.now() - startedAt } };
}
