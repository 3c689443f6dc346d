import { z } from 'zod';
import type { KvPoint } from '@/lib/network/drawing';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import type { StationKind, ToleranceRule } from './projects';

export const methods = ['valve-drop', 'direct-flow'] as const;
export type ReadingMethod = (typeof methods)[number];
export const verdicts = ['low', 'within', 'high'] as const;
export type Verdict = (typeof verdicts)[number];
export const instrumentKinds = ['differential-pressure', 'flow'] as const;
export type InstrumentKind = (typeof instrumentKinds)[number];

const isoDate = z.iso.date('A date such as 2026-03-14.');

export const instrumentSchema = z
  .object({
    name: z.string().trim().min(1, 'Say what kind of meter it is.').max(120),
    kind: z.enum(instrumentKinds),
    serial: z.string().trim().min(1, 'A serial number is needed.').max(80),
    /** Lower and upper end of the range, kPa or L/s by kind. */
    rangeLow: z.number().min(0).nullable(),
    rangeHigh: z.number().positive().nullable(),
    /** Per cent of reading, and a fixed part in kPa or L/s. */
    accuracyPercent: z.number().min(0).max(50),
    accuracyAbsolute: z.number().min(0).max(1000),
    calibratedOn: isoDate.nullable(),
    calibrationDueOn: isoDate.nullable(),
    isRetired: z.boolean(),
  })
  .refine((it) => it.rangeLow === null || it.rangeHigh === null || it.rangeLow < it.rangeHigh, {
    path: ['rangeHigh'],
    message: 'The upper end must be above the lower end.',
  });
export type InstrumentInput = z.infer<typeof instrumentSchema>;
export interface Instrument extends InstrumentInput {
  id: string;
}

/** POST /api/loops/:loopId/rounds; the id is made by the client, so that a repeated request starts no second round. */
export const startRoundSchema = z.object({ id: z.uuid(), purpose: z.string().trim().min(1, 'Say what this round is for.').max(200) });
export type StartRound = z.infer<typeof startRoundSchema>;
/** PATCH /api/rounds/:roundId */
export const closeRoundSchema = z.object({ isClosed: z.literal(true) });

/**
 * POST /api/rounds/:roundId/readings. The id is made on the device: sent twice, stored once. Values are SI; `entered`
 * keeps what was typed, in the unit it was typed in.
 */
export const recordReadingSchema = z
  .object({
    id: z.uuid(),
    stationId: z.uuid(),
    method: z.enum(methods),
    settingTurns: z.number().min(0).max(1000).nullable(),
    dropKpa: z.number().min(0, 'A drop cannot be negative: check the hoses.').max(100_000).nullable(),
    flowLs: z.number().min(0).max(100_000).nullable(),
    entered: z.array(z.object({ quantity: z.string().max(40), text: z.string().max(40), unit: z.string().max(20) })).max(6),
    instrumentId: z.uuid(),
    takenAt: z.iso.datetime({ offset: true }),
    note: z.string().trim().max(1000),
    /** The reading that this one puts right; the old one stays in the record. */
    correctsReadingId: z.uuid().nullable(),
  })
  .refine((it) => it.method !== 'valve-drop' || (it.settingTurns !== null && it.dropKpa !== null), {
    path: ['dropKpa'],
    message: 'A drop needs the setting it was read at.',
  })
  .refine((it) => it.method !== 'direct-flow' || it.flowLs !== null, { path: ['flowLs'], message: 'A flow is needed.' })
  .refine((it) => it.correctsReadingId === null || it.note !== '', { path: ['note'], message: 'Say why the earlier entry was wrong.' });
export type RecordReading = z.infer<typeof recordReadingSchema>;

export interface Reading {
  id: string;
  stationId: string;
  roundId: string;
  roundNumber: number;
  revisionNumber: number;
  method: ReadingMethod;
  settingTurns: number | null;
  dropKpa: number | null;
  kv: number | null;
  flowLs: number;
  percentOfDesign: number;
  uncertaintyPercent: number;
  verdict: Verdict;
  entered: { quantity: string; text: string; unit: string }[];
  instrumentId: string;
  instrumentName: string;
  isInstrumentOverdue: boolean;
  takenBy: string;
  takenAt: string;
  recordedAt: string;
  note: string;
  correctsReadingId: string | null;
  /** Set when a later entry put this one right; it then counts no more. */
  isCorrected: boolean;
}

export interface Station {
  id: string;
  elementId: string;
  kind: StationKind;
  tag: string;
  storey: string;
  room: string;
  walkingOrder: number;
  designFlowLs: number;
  valveName: string;
  kvTable: KvPoint[] | null;
  settingTurns: number | null;
  expectedDropKpa: number | null;
}

export interface Round {
  id: string;
  number: number;
  purpose: string;
  revisionNumber: number;
  startedBy: string;
  startedAt: string;
  closedAt: string | null;
}

/** GET /api/loops/:loopId/commissioning — all that the tablet needs for one loop. */
export interface CommissioningBody {
  revision: { id: string; number: number } | null;
  /** Fluid at the loop's mean temperature, from which flows are computed. */
  densityKgM3: number | null;
  /** Drop that the loop's pumps give together at no flow, kPa; no reading across a valve can be above it. */
  pumpShutOffKpa: number | null;
  tolerances: ToleranceRule[];
  stations: Station[];
  rounds: Round[];
  /** Every entry, corrected ones too, oldest first. */
  readings: Reading[];
  instruments: Instrument[];
  strip: StripTick[];
  band: StripBand;
}
