import { z } from 'zod';
import type { BalanceResult, SolveResult } from '@/lib/hydraulics/types';
import { drawingSchema, type Drawing, type Place } from '@/lib/network/drawing';
import type { Fault } from '@/lib/network/fault';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { Role } from './permissions';

export const loopServices = ['chilled', 'hot'] as const;
export type LoopService = (typeof loopServices)[number];
export const loopStates = ['draft', 'issued', 'in-commissioning', 'submitted', 'reviewed', 'accepted'] as const;
export type LoopState = (typeof loopStates)[number];

export const createLoopSchema = z.object({
  name: z.string().trim().min(1, 'A loop needs a name.').max(120),
  service: z.enum(loopServices),
});
export type CreateLoop = z.infer<typeof createLoopSchema>;

/** GET /api/loops/:loopId — what heads every page of a loop. */
export interface LoopDetail {
  id: string;
  name: string;
  service: LoopService;
  state: LoopState;
  project: { id: string; name: string };
  roles: Role[];
  /** The newest issued revision. */
  revision: { id: string; number: number; issuedAt: string; issuedBy: string; note: string } | null;
  /** Whether the draft differs from the newest revision; false where there is no revision. Null to those who may not see drafts. */
  isDraftAhead: boolean | null;
  strip: StripTick[];
  band: StripBand;
}

/** GET /api/loops/:loopId/draft */
export interface DraftBody {
  version: number;
  drawing: Drawing;
  savedAt: string;
  savedBy: string;
}

/** PUT /api/loops/:loopId/draft — 200 {version, savedAt}, or 409 `draft-changed` with detail: DraftBody (what the other person saved). */
export const saveDraftSchema = z.object({ baseVersion: z.number().int().min(0).max(2_000_000_000), drawing: drawingSchema });
export interface SavedDraft {
  version: number;
  savedAt: string;
}

/** POST /api/loops/:loopId/draft/presence — said every 15 s by a page that has the draft open; answers who else has it open now. */
export interface DraftPresence {
  others: { id: string; name: string }[];
}

/** POST /api/loops/:loopId/solve — the drawing as it stands on the canvas, saved or not. */
export const solveDrawingSchema = z.object({ drawing: drawingSchema });
export interface SolutionBody {
  faults: Fault[];
  /** Null while an error stands in the drawing. Link ids are those of `lib/network/drawing-to-document.ts`. */
  solved: SolvedBody | null;
}
export interface SolvedBody {
  /** Flows as the valves stand. */
  solve: SolveResult;
  /** Settings and pump duty for design flow; null with `balanceMissing` saying why. */
  balance: BalanceResult | null;
  balanceMissing: string | null;
  /** Pipes and pieces of the index circuit, once around from the pump. */
  indexCircuit: Place[];
  solveMs: number;
}

/** POST /api/loops/:loopId/revisions — freezes the saved draft of this version. */
export const issueRevisionSchema = z.object({ draftVersion: z.number().int().min(1), note: z.string().trim().max(2000) });
export type IssueRevision = z.infer<typeof issueRevisionSchema>;

/** GET /api/loops/:loopId/revisions/:number */
export interface RevisionBody {
  id: string;
  number: number;
  note: string;
  issuedAt: string;
  issuedBy: string;
  drawing: Drawing;
  balance: BalanceResult;
  /** What changed against the revision before, in words, each with its place. */
  changes: { message: string; place: Place }[];
}
