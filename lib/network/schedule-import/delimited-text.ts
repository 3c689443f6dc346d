import Papa from 'papaparse';
import { MAX_CELL_LENGTH, MAX_TABLE_COLUMNS, MAX_TABLE_ROWS, trimmedTable, type ScheduleTable } from './table';

/** A table, or one sentence that says why there is none. */
export type ReadTable = { ok: true; table: ScheduleTable } | { ok: false; message: string };

const refused = (message: string): ReadTable => ({ ok: false, message });

/** Reads text with a comma, semicolon, tab or bar between its columns: a CSV file, or cells pasted from a spreadsheet. Never throws. */
export function readDelimitedText(text: string): ReadTable {
  if (text.trim() === '') return refused('There is nothing in it.');
  if (text.includes('\0')) return refused('This is not text: it holds characters that no table has.');
  const plain = text.replace(/^\uFEFF/, '');
  const { data, errors } = Papa.parse<string[]>(plain, {
    delimiter: delimiterOf(plain),
    // A quotation mark that never closes swallows the rest; the limit keeps it from being read far beyond what is allowed.
    preview: MAX_TABLE_ROWS + 1,
  });
  const unclosed = errors.find(({ type }) => type === 'Quotes');
  if (unclosed) return refused(`A quotation mark in row ${(unclosed.row ?? 0) + 1} is not closed, so its columns cannot be told apart.`);
  if (data.length > MAX_TABLE_ROWS) return refused(tooManyRows(data.length));
  if (data.every((row) => row.length > MAX_TABLE_COLUMNS)) return refused(tooManyColumns);
  const table = trimmedTable(data.map((row) => row.slice(0, MAX_TABLE_COLUMNS).map((cell) => cell.slice(0, MAX_CELL_LENGTH).trim())));
  return table.rows.length === 0 ? refused('There is nothing in it.') : { ok: true, table };
}

/**
 * What divides the columns: in order of how seldom it stands within a cell, the first that most lines have. A comma comes last, because
 * half of the world writes its decimals with it.
 */
function delimiterOf(text: string): string {
  const lines = text
    .slice(0, 50_000)
    .replace(/"[^"]*"/g, '')
    .split(/\r\n|\n|\r/)
    .filter((line) => line.trim() !== '')
    .slice(0, 100);
  const isUsual = (mark: string) => lines.filter((line) => line.includes(mark)).length > lines.length / 2;
  return ['\t', ';', '|'].find(isUsual) ?? ',';
}

export const tooManyRows = (count: number): string =>
  `It has ${count > MAX_TABLE_ROWS + 1 ? count : `more than ${MAX_TABLE_ROWS}`} rows, and at most ${MAX_TABLE_ROWS} are read. Split it into several files.`;

export const tooManyColumns = `It has more than ${MAX_TABLE_COLUMNS} columns. Copy those that are needed to a sheet of their own.`;

/**
 * The text of a file: UTF-8, UTF-16 with its mark, or else Windows-1252 (of which Latin-1 is a part), as older spreadsheets
 * write it. Null for what is no text.
 */
export function decodeText(bytes: Uint8Array): string | null {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  const text = decoded(bytes);
  // Control characters other than tab and the ends of lines are in no table.
  return /[\x00-\x08\x0e-\x1a\x1c-\x1f]/.test(text) ? null : text;
}

function decoded(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('windows-1252').decode(bytes);
  }
}
