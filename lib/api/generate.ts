import { z } from 'zod';
import type { LoopSummary } from '@/lib/network/generate/loop-summary';
import { generateOptionsSchema, MAX_SCHEDULED_TERMINALS, scheduledTerminalSchema } from '@/lib/network/generate/scheduled-terminal';

/**
 * POST /api/loops/:loopId/draft/generate — makes the loop's drawing from a terminal schedule and saves it as the next version of the draft:
 * 200 GeneratedLoop. Refused, with nothing changed:
 * 409 `draft-changed`, detail: DraftBody (somebody saved after `baseVersion`);
 * 409 `drawing-not-empty` (something is drawn: ask, then send again with `replacesDrawing`);
 * 422 `schedule-unfit`, fields: [{path: 'terminals.12.tag', message}] (rows count from 0) or 'options.pipeSeries';
 * 422 `loop-unfit` (one sentence: what cannot be solved); 422 `solve-too-long`; 429 `solver-busy`; 400 and 413 as everywhere.
 */
export const generateLoopSchema = z.object({
  baseVersion: z.number().int().min(0).max(2_000_000_000),
  terminals: z.array(scheduledTerminalSchema).min(1, 'The schedule has no terminal.').max(MAX_SCHEDULED_TERMINALS),
  options: generateOptionsSchema,
  /** A family of the catalogue, from which all balancing valves are chosen; null: the generic valves. */
  valveFamilyId: z.uuid().nullable(),
  /** What is drawn already may be replaced. Terminals of the same tag keep their readings. */
  replacesDrawing: z.boolean(),
});
export type GenerateLoop = z.infer<typeof generateLoopSchema>;

export interface GeneratedLoop {
  /** The version of the draft that now holds the drawing. */
  version: number;
  savedAt: string;
  summary: GeneratedSummary;
}

/** What was made, and how long it took. */
export interface GeneratedSummary extends LoopSummary {
  tookMs: number;
}
