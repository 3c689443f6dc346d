import ExcelJS from 'exceljs';
import type { UploadedSchedule } from '@/lib/api/schedule-import';
import { onlyNeeded } from './needed-parts';
import { sheetTable } from './sheet-table';
import { UnreadableWorkbook } from './zip';

/** Elements of a sheet that lead to parts which are left out, or that one element can blow up to millions of cells. */
const ignoreNodes = [
  'autoFilter',
  'conditionalFormatting',
  'cols',
  'dataValidations',
  'drawing',
  'extLst',
  'headerFooter',
  'hyperlinks',
  'picture',
  'rowBreaks',
  'sheetProtection',
  'sheetViews',
  'tableParts',
];

/**
 * Reads one sheet of a workbook (.xlsx): the one asked for, else the first visible one that holds anything. Values are those last
 * calculated; formulas, dates and merged cells are marked. Throws `UnreadableWorkbook` with a sentence for a person.
 */
export async function readWorkbook(file: Uint8Array, sheet: string | undefined): Promise<UploadedSchedule> {
  const workbook = new ExcelJS.Workbook();
  // exceljs declares its own Buffer, which Node's has outgrown.
  const parts = onlyNeeded(Buffer.from(file.buffer, file.byteOffset, file.byteLength)) as unknown as ExcelJS.Buffer;
  try {
    await workbook.xlsx.load(parts, { ignoreNodes });
  } catch (error) {
    throw new UnreadableWorkbook('The workbook could not be read. Save it again as .xlsx, or as CSV.', { cause: error });
  }
  const worksheets = workbook.worksheets.filter(({ state }) => state === 'visible' || state === undefined);
  const worksheet =
    sheet === undefined
      ? (worksheets.find(({ actualRowCount }) => actualRowCount > 1) ?? worksheets[0])
      : worksheets.find(({ name }) => name === sheet);
  if (!worksheet)
    throw new UnreadableWorkbook(sheet === undefined ? 'The workbook has no sheet to read.' : `The workbook has no sheet “${sheet}”.`);
  return { table: sheetTable(worksheet), sheet: worksheet.name, sheets: worksheets.map(({ name }) => name) };
}
