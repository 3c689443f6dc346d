import { decodeText, readDelimitedText } from '@/lib/network/schedule-import/delimited-text';
import type { UploadedSchedule } from '@/lib/api/schedule-import';
import { Problem } from '../problem';
import { readWorkbookOffThread } from './workbook-pool';

interface Upload {
  fileName: string;
  bytes: Buffer;
  sheet?: string;
}

const unfit = (message: string) => new Problem('schedule-unfit', message);

/** What stands in a file of rows (a terminal schedule, the figures of a valve or pump), told by its content and held against its name. Nothing is kept. */
export async function readUpload({ fileName, bytes, sheet }: Upload, signal: AbortSignal): Promise<UploadedSchedule> {
  if (bytes.length === 0) throw unfit('The file is empty.');
  const extension = /\.([a-z0-9]+)$/i.exec(fileName)?.[1]?.toLowerCase() ?? '';
  if (bytes.subarray(0, 8).equals(olderWorkbook))
    throw unfit('This is an older workbook (.xls) or one that is locked by a password. Save it as .xlsx, without a password, or as CSV.');
  if (bytes.subarray(0, 4).equals(zipFile)) {
    if (!['xlsx', 'xlsm'].includes(extension))
      throw unfit(`“${fileName}” is a packed file, not text. If it is a workbook, give it the ending .xlsx.`);
    return readWorkbookOffThread({ file: new Uint8Array(bytes), sheet }, signal);
  }
  if (['xlsx', 'xlsm', 'xls', 'ods'].includes(extension))
    throw unfit(`“${fileName}” is named as a workbook, but its content is none. If it is text, give it the ending .csv.`);
  const text = decodeText(bytes);
  if (text === null) throw unfit(`“${fileName}” is neither a workbook (.xlsx) nor text (.csv).`);
  if (!['csv', 'txt', 'tsv', ''].includes(extension))
    throw unfit(`“${fileName}” cannot be read as rows. Bring a workbook (.xlsx) or text (.csv).`);
  const read = readDelimitedText(text);
  if (!read.ok) throw unfit(read.message);
  return { table: read.table, sheet: null, sheets: [] };
}

const zipFile = Buffer.from([0x50, 0x4b, 0x03, 0x04]);
/** A compound document: the older workbook, and the wrapping of an encrypted one. */
const olderWorkbook = Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]);
