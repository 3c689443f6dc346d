import type { UploadedSchedule } from '@/lib/api/schedule-import';
import { readWorkbook } from './read-workbook';
import { UnreadableWorkbook } from './zip';

export interface WorkbookTask {
  file: Uint8Array;
  sheet: string | undefined;
}

export type WorkbookAnswer = { ok: true; schedule: UploadedSchedule } | { ok: false; message: string; reason: string | null };

/** What a thread of the pool runs; a class of error does not survive the way between threads, so a refusal goes as a value. */
export default async function readInThread({ file, sheet }: WorkbookTask): Promise<WorkbookAnswer> {
  try {
    return { ok: true, schedule: await readWorkbook(file, sheet) };
  } catch (error) {
    if (error instanceof UnreadableWorkbook)
      return {
        ok: false,
        message: error.message,
        reason: error.cause instanceof Error ? (error.cause.stack ?? error.cause.message) : null,
      };
    throw error;
  }
}
