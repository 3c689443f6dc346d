import { storedZip, tooMuch, UnreadableWorkbook, unpack, zipEntries } from './zip';

/** Unpacked, all parts that are read together: a sheet of 5000 rows and 30 columns is about 8 MiB. */
const MOST_UNPACKED_BYTES = 40 << 20;
const MOST_MERGED_CELLS = 200_000;
/** Opening and closing tags of all parts: each costs the reader some hundred bytes. 5000 rows of 60 cells have 1.3 million. */
const MOST_TAGS = 2_500_000;

/** What rows can stand in. Pictures, comments, tables, checks of input, macros and links to elsewhere are never unpacked. */
const neededParts =
  /^(\[Content_Types\]\.xml|_rels\/\.rels|xl\/(workbook|sharedStrings|styles)\.xml|xl\/_rels\/workbook\.xml\.rels|xl\/worksheets\/sheet\d+\.xml)$/;

/** A workbook of the parts that rows can stand in, each measured before anything reads it. */
export function onlyNeeded(zip: Buffer): Buffer {
  const needed = zipEntries(zip).filter(({ name }) => neededParts.test(name));
  if (!needed.some(({ name }) => name === '[Content_Types].xml') || !needed.some(({ name }) => name === 'xl/workbook.xml'))
    throw new UnreadableWorkbook('This is a packed file, but no workbook (.xlsx). Save the rows as .xlsx or CSV.');
  if (needed.reduce((sum, { bytes }) => sum + bytes, 0) > MOST_UNPACKED_BYTES) throw tooMuch();
  let left = MOST_UNPACKED_BYTES;
  let tags = 0;
  return storedZip(
    needed.map((entry) => {
      const content = unpack(zip, entry, left);
      left -= content.length;
      tags += tagsIn(content);
      if (tags > MOST_TAGS) throw tooMuch();
      if (entry.name.startsWith('xl/worksheets/')) refuseHugeMerges(content);
      // A name for a whole sheet is spelt out cell by cell when it is read; no table of rows needs it.
      const kept = entry.name === 'xl/workbook.xml' ? withoutNames(content) : content;
      return { name: entry.name, crc: entry.crc, content: kept };
    }),
  );
}

function tagsIn(part: Buffer): number {
  let count = 0;
  for (const byte of part) if (byte === 0x3c) count += 1;
  return count;
}

const withoutNames = (workbook: Buffer): Buffer =>
  Buffer.from(workbook.toString('utf8').replace(/<definedNames>[\s\S]*?<\/definedNames>/g, ''), 'utf8');

function refuseHugeMerges(sheet: Buffer): void {
  let cells = 0;
  for (const [, left, top, right, bottom] of sheet
    .toString('latin1')
    .matchAll(/<mergeCell\s+ref="([A-Z]{1,4})(\d{1,8}):([A-Z]{1,4})(\d{1,8})"/g)) {
    cells += (columnNumber(right!) - columnNumber(left!) + 1) * (Number(bottom) - Number(top) + 1);
  }
  if (cells > MOST_MERGED_CELLS)
    throw new UnreadableWorkbook('The sheet has merged cells over whole columns or most of the sheet. Unmerge them and save it again.');
}

const columnNumber = (letters: string): number => [...letters].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
