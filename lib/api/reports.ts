import { z } from 'zod';
import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Instrument, Reading, Round, Station } from './commissioning';
import type { StripBand, StripTick } from './flow-strip';
import type { LoopService, LoopState } from './loops';
import type { ToleranceRule } from './projects';

export const meanings = ['submitted', 'reviewed', 'returned', 'accepted'] as const;
export type Meaning = (typeof meanings)[number];

/** POST /api/loops/:loopId/signatures; `contentSha256` is that of the report as the signer saw it. */
export const signSchema = z
  .object({ meaning: z.enum(meanings), note: z.string().trim().max(2000), contentSha256: z.string().regex(/^[0-9a-f]{64}$/) })
  .refine((it) => it.meaning !== 'returned' || it.note !== '', { path: ['note'], message: 'Say what has to be put right.' });
export type Sign = z.infer<typeof signSchema>;

export interface Signature {
  id: string;
  meaning: Meaning;
  note: string;
  submission: number;
  personName: string;
  personRole: string;
  signedAt: string;
}

export interface ReportStation extends Station {
  /** The entry that counts: the newest that no other puts right. */
  reading: Reading | null;
}

/** What is handed over: one value from which the page, the workbook and the SHA-256 are made. */
export interface ReportContent {
  organization: string;
  project: { name: string; client: string; building: string };
  loop: { name: string; service: LoopService };
  revision: { number: number; note: string; issuedBy: string; issuedAt: string };
  fluid: { medium: string; massFraction: number; supplyC: number; returnC: number; densityKgM3: number; viscosityMPaS: number };
  tolerances: ToleranceRule[];
  stations: ReportStation[];
  rounds: Round[];
  instruments: Instrument[];
  /** Entries that were put right later, with what replaced them: nothing measured is left out. */
  correctedReadings: Reading[];
  balance: BalanceResult;
}

/** GET /api/loops/:loopId/report */
export interface ReportBody {
  state: LoopState;
  content: ReportContent | null;
  contentSha256: string | null;
  signatures: Signature[];
  accepted: { number: number; sha256: string; acceptedAt: string }[];
  strip: StripTick[];
  band: StripBand;
  /** What the person may sign now. */
  maySign: Meaning[];
}
