import { z } from 'zod';
import type { ScheduleTable } from '@/lib/network/schedule-import/table';

/** The largest schedule file; five thousand terminals with every column take a tenth of it. */
export const MAX_UPLOAD_BYTES = 10 << 20;

/** POST /api/loops/:loopId/schedule-upload — the file's bytes as the body; answers with what stands in it and keeps nothing. */
export const uploadQuerySchema = z.object({
  fileName: z.string().trim().min(1, 'The file has no name.').max(300),
  /** Of a workbook with several; the first that holds anything where none is asked for. */
  sheet: z.string().max(100).optional(),
});

export interface UploadedSchedule {
  table: ScheduleTable;
  /** Null for a text file. */
  sheet: string | null;
  /** The sheets of the workbook, in its order. */
  sheets: string[];
}
