import { z } from 'zod';

/**
 * What is entered on site besides readings. Every id is made on the device, so that an entry that is sent twice is stored once; every
 * time is the device's, with `clockOffsetMs` = server − device as last seen (null where it never met the server).
 */
const takenOnDevice = { clockOffsetMs: z.number().int().min(-1e12).max(1e12).nullable() };
const at = z.iso.datetime({ offset: true });

/** POST /api/rounds/:roundId/settings — a valve's turns, or a pump's speed as a fraction, before and after it was changed. */
export const changeSettingSchema = z.object({
  id: z.uuid(),
  stationId: z.uuid(),
  before: z.number().min(0).max(1000).nullable(),
  after: z.number().min(0).max(1000),
  changedAt: at,
  note: z.string().trim().max(1000),
  ...takenOnDevice,
});
export type ChangeSetting = z.infer<typeof changeSettingSchema>;
export interface SettingChange extends Omit<ChangeSetting, 'clockOffsetMs'> {
  roundId: string;
  changedBy: string;
}

export const checkAnswers = ['done', 'open', 'not-applicable'] as const;

/** POST /api/loops/:loopId/checks — the answer to one check; the newest of a check counts, the others stay in the record. */
export const answerCheckSchema = z
  .object({
    id: z.uuid(),
    checkKey: z.string().min(1).max(60),
    answer: z.enum(checkAnswers),
    remark: z.string().trim().max(1000),
    answeredAt: at,
    ...takenOnDevice,
  })
  .refine((it) => it.answer !== 'not-applicable' || it.remark !== '', { path: ['remark'], message: 'Say why it does not apply.' });
export type AnswerCheck = z.infer<typeof answerCheckSchema>;

/** POST /api/loops/:loopId/snags */
export const raiseSnagSchema = z.object({
  id: z.uuid(),
  stationId: z.uuid().nullable(),
  text: z.string().trim().min(1, 'Say what is wrong.').max(1000),
  raisedAt: at,
  ...takenOnDevice,
});
export type RaiseSnag = z.infer<typeof raiseSnagSchema>;

/** POST /api/loops/:loopId/snags/:snagId/resolution */
export const resolveSnagSchema = z.object({
  id: z.uuid(),
  snagId: z.uuid(),
  note: z.string().trim().min(1, 'Say what was done.').max(1000),
  resolvedAt: at,
  ...takenOnDevice,
});
export type ResolveSnag = z.infer<typeof resolveSnagSchema>;

export const photoSubjects = ['station', 'check', 'snag'] as const;

/** PUT /api/loops/:loopId/photos/:photoId, the picture as the body and these as its search parameters. `subjectId` is a station's or snag's id or a check's key. */
export const photoSchema = z.object({
  id: z.uuid(),
  subject: z.enum(photoSubjects),
  subjectId: z.string().min(1).max(64),
  takenAt: at,
});
export type PhotoInput = z.infer<typeof photoSchema>;
export interface Photo extends PhotoInput {
  takenBy: string;
  widthPx: number;
  heightPx: number;
}

export interface CheckAnswer extends Omit<AnswerCheck, 'clockOffsetMs'> {
  answeredBy: string;
}
export interface Snag extends Omit<RaiseSnag, 'clockOffsetMs'> {
  number: number;
  raisedBy: string;
  resolution: { note: string; resolvedBy: string; resolvedAt: string } | null;
}

/** GET /api/loops/:loopId/site — what a loop's site holds besides its readings. */
export interface SiteBody {
  /** Every answer, oldest first; the newest of a check counts. */
  checks: CheckAnswer[];
  snags: Snag[];
  settingChanges: SettingChange[];
  photos: Photo[];
}
