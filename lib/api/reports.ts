import { z } from 'zod';
import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Instrument, Reading, Round, Station } from './commissioning';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { LoopService, LoopState } from './loops';
import type { CheckAnswer, SettingChange, Snag } from './site';
import type { ToleranceRule } from './projects';

export const meanings = ['submitted', 'reviewed', 'returned', 'accepted'] as const;
export type Meaning = (typeof meanings)[number];

/** What the signer types. */
export const signNoteSchema = z.object({ note: z.string().trim().max(2000) });
export const returnNoteSchema = z.object({ note: signNoteSchema.shape.note.min(1, 'Say what has to be put right.') });

/** `contentSha256` is that of the report as the signer saw it: nobody signs what they have not seen. */
const signedSchema = signNoteSchema.extend({
  contentSha256: z.string().regex(/^[0-9a-f]{64}$/, 'The SHA-256 of the report that you saw.'),
});

/** POST /api/loops/:loopId/submission */
export const submitReportSchema = signedSchema;
/** POST /api/loops/:loopId/review */
export const reviewReportSchema = z.discriminatedUnion('meaning', [
  signedSchema.extend({ meaning: z.literal('reviewed') }),
  signedSchema.extend({ meaning: z.literal('returned'), ...returnNoteSchema.shape }),
]);
/** POST /api/loops/:loopId/acceptance */
export const acceptReportSchema = signedSchema;

/** What a signer puts under a report, whichever of the three it is. */
export interface Sign {
  meaning: Meaning;
  note: string;
  contentSha256: string;
}

/** GET /api/loops/:loopId/report/workbook: of the report as it stands, or with `number` of the accepted one of that number. */
export const workbookQuerySchema = z.object({ number: z.coerce.number().int().min(1).max(1_000_000).optional() });

export interface Signature {
  id: string;
  meaning: Meaning;
  note: string;
  submission: number;
  personName: string;
  personRole: string;
  contentSha256: string;
  signedAt: string;
}

export interface ReportStation extends Station {
  /** The entry that counts: the newest that no other puts right, taken for the design flow that is still asked. */
  reading: Reading | null;
}

/** A round with entries. When it was closed is left out: submitting closes it, and must not change what is signed. */
export type ReportRound = Omit<Round, 'closedAt'>;

/** A meter that was read. Whether it was retired since is left out: it says nothing of what was read. */
export type ReportInstrument = Omit<Instrument, 'isRetired'>;

/** An entry with the station's name in the revision that it was taken under. */
export interface ReportReading extends Reading {
  tag: string;
}

/** What the report says of the site besides its readings. */
export interface ReportSite {
  checks: {
    checkKey: string;
    text: string;
    answer: CheckAnswer['answer'];
    remark: string;
    answeredBy: string | null;
    answeredAt: string | null;
  }[];
  snags: (Pick<Snag, 'number' | 'text' | 'raisedBy' | 'raisedAt' | 'resolution'> & { tag: string | null })[];
  settingChanges: (Pick<SettingChange, 'id' | 'before' | 'after' | 'changedBy' | 'changedAt' | 'note'> & { tag: string })[];
}

/** What is handed over: one value from which the page, the workbook and the SHA-256 are made. */
export interface ReportContent {
  organization: string;
  project: { name: string; client: string; building: string };
  loop: { name: string; service: LoopService };
  revision: { number: number; note: string; issuedBy: string; issuedAt: string; changes: string[] };
  fluid: { medium: string; massFraction: number; supplyC: number; returnC: number; densityKgM3: number; viscosityMPaS: number };
  tolerances: ToleranceRule[];
  stations: ReportStation[];
  rounds: ReportRound[];
  instruments: ReportInstrument[];
  /** Every entry of every revision, oldest first, those too that were put right later: nothing measured is left out. */
  readings: ReportReading[];
  balance: BalanceResult;
  /** Missing in reports that were accepted before it was kept. */
  site?: ReportSite;
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
