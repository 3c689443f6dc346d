import { z } from 'zod';
import type { KvPoint } from '@/lib/network/drawing';
import type { StripBand, StripTick } from '@/lib/commissioning/flow-strip';
import { readingMethods, type ReadingMethodName } from '@/lib/commissioning/reading-methods';
import type { StationKind, StationRank, ToleranceRule } from './projects';

export const methods = Object.keys(readingMethods) as [ReadingMethodName, ...ReadingMethodName[]];
export type ReadingMethod = ReadingMethodName;
export const verdicts = ['low', 'within', 'high'] as const;
export type Verdict = (typeof verdicts)[number];
export const instrumentKinds = ['differential-pressure', 'flow', 'temperature'] as const;
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

/** GET /api/instruments/:instrumentId/certificates, the newest first. */
export interface Certificate {
  id: string;
  instrumentId: string;
  fileName: string;
  uploadedBy: string;
  uploadedAt: string;
}

/** POST /api/loops/:loopId/rounds; the id is made by the client, so that a repeated request starts no second round. */
export const startRoundSchema = z.object({
  id: z.uuid(),
  purpose: z.string().trim().min(1, 'Say what this round is for.').max(200),
  /** Why it is started while readiness checks are open; goes into the report. Needed only then. */
  openChecksReason: z.string().trim().max(500),
});
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
    /** Heat that the circuit carries, without a sign, and its temperatures. */
    heatKw: z.number().min(0).max(1e6).nullable(),
    supplyC: z.number().min(-60).max(250).nullable(),
    returnC: z.number().min(-60).max(250).nullable(),
    /** Part of full speed at which a pump was read. */
    pumpSpeed: z.number().positive().max(2).nullable(),
    entered: z.array(z.object({ quantity: z.string().max(40), text: z.string().max(40), unit: z.string().max(20) })).max(6),
    instrumentId: z.uuid(),
    takenAt: z.iso.datetime({ offset: true }),
    /** Server − device as the device last knew, ms; null where it never met the server. */
    clockOffsetMs: z.number().int().min(-1e12).max(1e12).nullable(),
    note: z.string().trim().max(1000),
    /** The reading that this one puts right; the old one stays in the record. */
    correctsReadingId: z.uuid().nullable(),
  })
  .refine((it) => it.method !== 'valve-drop' || (it.settingTurns !== null && it.dropKpa !== null), {
    path: ['dropKpa'],
    message: 'A drop needs the setting it was read at.',
  })
  .refine((it) => it.method !== 'coil-differential' || it.dropKpa !== null, { path: ['dropKpa'], message: 'A drop is needed.' })
  .refine((it) => it.method !== 'pump-differential' || (it.dropKpa !== null && it.pumpSpeed !== null), {
    path: ['pumpSpeed'],
    message: 'A pump’s differential needs the speed it was read at.',
  })
  .refine((it) => it.method !== 'heat-balance' || (it.heatKw !== null && it.supplyC !== null && it.returnC !== null), {
    path: ['heatKw'],
    message: 'A heat balance needs the heat and both temperatures.',
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
  heatKw: number | null;
  supplyC: number | null;
  returnC: number | null;
  pumpSpeed: number | null;
  kv: number | null;
  flowLs: number;
  percentOfDesign: number;
  uncertaintyPercent: number;
  verdict: Verdict;
  entered: { quantity: string; text: string; unit: string }[];
  instrumentId: string;
  instrumentName: string;
  isInstrumentOverdue: boolean;
  isInstrumentOutOfRange: boolean;
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
  /** Which tolerance of its kind holds for it. */
  rank: StationRank;
  /** Of its coil at design flow, and a pump's curve at full speed with the speed that the design asks. */
  coilDropKpa: number | null;
  pumpCurve: { flowLs: number; headM: number }[] | null;
  pumpSpeed: number | null;
}

/** PUT /api/loops/:loopId/walking-order — all stations in the order of walking; none for the revision's own. */
export const walkingOrderSchema = z.object({ stationIds: z.array(z.uuid()).max(20_000) });
export type WalkingOrder = z.infer<typeof walkingOrderSchema>;

export interface Round {
  id: string;
  number: number;
  purpose: string;
  /** Empty where no check was open. */
  openChecksReason: string;
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
  specificHeatKJKgK: number | null;
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
