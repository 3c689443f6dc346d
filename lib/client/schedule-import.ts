import { z } from 'zod';
import type { GeneratedLoop, GenerateLoop } from '@/lib/api/generate';
import { MAX_UPLOAD_BYTES, type UploadedSchedule } from '@/lib/api/schedule-import';
import { headSignature, type ColumnMap, type TableReading } from '@/lib/network/schedule-import/guess-columns';
import { meaningOf, meanings } from '@/lib/network/schedule-import/meanings';
import { scheduleUnitsOf } from '@/lib/network/schedule-import/schedule-units';
import type { ScheduleTable } from '@/lib/network/schedule-import/table';
import { RequestError, send, sendFile } from './http';

/** What stands in a schedule file, read by the server, which keeps nothing of it. */
export async function readScheduleFile(loopId: string, file: File, sheet?: string): Promise<UploadedSchedule> {
  // The server refuses it too, but in the middle of the upload, where no browser listens for an answer.
  if (file.size > MAX_UPLOAD_BYTES) {
    const size = `${Math.round(file.size / (1 << 20))} MiB`;
    throw new RequestError('input-too-large', `“${file.name}” has ${size}; a schedule may have ${MAX_UPLOAD_BYTES >> 20} MiB.`, 413);
  }
  const query = new URLSearchParams({ fileName: file.name, ...(sheet === undefined ? {} : { sheet }) });
  return sendFile('POST', `/api/loops/${loopId}/schedule-upload?${query}`, file);
}

export const generateLoop = (loopId: string, body: GenerateLoop, signal: AbortSignal): Promise<GeneratedLoop> =>
  send('POST', `/api/loops/${loopId}/draft/generate`, body, { signal });

const MOST_REMEMBERED = 20;
const columnSchema = z.object({ column: z.number().int().min(0).nullable(), unit: z.string().nullable(), whenEmpty: z.string().max(200) });
const rememberedSchema = z.array(z.object({ heads: z.string(), columns: z.record(z.enum(meanings), columnSchema) }));
type Remembered = z.infer<typeof rememberedSchema>;

type Shelf = Pick<Storage, 'getItem' | 'setItem'>;
const shelfKey = (personId: string) => `evenhead.schedule-columns.${personId}`;

function remembered(shelf: Shelf, personId: string): Remembered {
  try {
    const parsed = rememberedSchema.safeParse(JSON.parse(shelf.getItem(shelfKey(personId)) ?? '[]'));
    return parsed.success ? parsed.data : [];
  } catch {
    // Not readable, or no storage in this browser: then nothing is remembered.
    return [];
  }
}

/** The columns that this person last chose for a schedule with these heads; null where there were none yet, or they no longer fit. */
export function rememberedColumns(shelf: Shelf, personId: string, table: ScheduleTable, headRow: number | null): ColumnMap | null {
  const heads = headSignature(table, headRow);
  const found = remembered(shelf, personId).find((it) => it.heads === heads)?.columns;
  const fits = meanings.every((meaning) => {
    const { column, unit } = found?.[meaning] ?? { column: null, unit: null };
    const { quantity } = meaningOf[meaning];
    const hasUnit = quantity === null ? unit === null : unit !== null && scheduleUnitsOf(quantity).includes(unit);
    return hasUnit && (column === null || column < (table.rows[0]?.length ?? 0));
  });
  return found && fits ? found : null;
}

/** Keeps the choice under the heads of the schedule, the latest first. */
export function rememberColumns(shelf: Shelf, personId: string, table: ScheduleTable, { headRow, columns }: TableReading): void {
  const heads = headSignature(table, headRow);
  const others = remembered(shelf, personId).filter((it) => it.heads !== heads);
  try {
    shelf.setItem(shelfKey(personId), JSON.stringify([{ heads, columns }, ...others].slice(0, MOST_REMEMBERED)));
  } catch {
    // A full or forbidden storage costs the convenience and nothing else.
  }
}
