import type { Cell, Style, Workbook, Worksheet } from 'exceljs';

/** A formula comes with its value, so that a reader which does not calculate shows it too. */
export interface Formula {
  formula: string;
  result: string | number;
}
/** A text is always stored as a text, whatever it begins with: only `Formula` makes a formula. What is missing is an empty cell. */
export type CellContent = string | number | Date | Formula | null;

export interface Column<Row> {
  key: string;
  head: string;
  /** Stands under the name, in the head. */
  unit?: string;
  /** In characters. */
  width: number;
  /** Number format; figures with one are set to the right. */
  format?: string;
  /** `cell` gives the address of another column's cell in the same row. */
  content: (row: Row, cell: (key: string) => string) => CellContent;
}

export const formats = {
  flow: '0.000',
  pressure: '0.00',
  head: '0.00',
  power: '0.00',
  percent: '0.0%',
  signedPercent: '+0.0%;-0.0%;0.0%',
  turns: '0.00',
  kv: '0.00',
  whole: '0',
  moment: 'yyyy-mm-dd hh:mm',
  day: 'yyyy-mm-dd',
} as const;

export const inks = {
  ink: 'FF16232B',
  quiet: 'FF53636B',
  rule: 'FFD9D5C9',
  well: 'FFF1EEE5',
  low: 'FF4A4FB5',
  high: 'FFB4571A',
  brass: 'FF8F6210',
} as const;

/** One typeface for all cells, in the size of a printed table. */
export const typeface = { name: 'Calibri', size: 11, color: { argb: inks.ink } } as const;

/** Row of the heads; what stands above is the sheet's title. */
export const headRow = 4;
export const firstRow = headRow + 1;

export interface SheetFrame {
  title: string;
  /** Below the title and in the foot of each printed page: which report this is. */
  reference: string;
}

/** A sheet set up to be printed: A4 landscape, as wide as the page, numbered. */
export function addSheet(workbook: Workbook, name: string, { title, reference }: SheetFrame): Worksheet {
  const sheet = workbook.addWorksheet(name, {
    pageSetup: {
      paperSize: 9,
      orientation: 'landscape',
      fitToPage: true,
      fitToWidth: 1,
      fitToHeight: 0,
      margins: { left: 0.5, right: 0.5, top: 0.5, bottom: 0.7, header: 0.3, footer: 0.3 },
    },
    // In the codes of a page's foot an ampersand begins a code, and all of it may have 255 characters.
    headerFooter: { oddFooter: `&L${reference.slice(0, 100).replaceAll('&', '&&')}&R&A, page &P of &N` },
  });
  sheet.getCell('A1').value = title;
  sheet.getCell('A1').font = { ...typeface, size: 16, bold: true };
  sheet.getCell('A2').value = reference;
  sheet.getCell('A2').font = { ...typeface, color: { argb: inks.quiet } };
  return sheet;
}

/** One row an item under frozen, filtered heads that are printed again on each page. */
export function addTable<Row>(sheet: Worksheet, columns: Column<Row>[], rows: Row[]): void {
  columns.forEach((column, i) => (sheet.getColumn(i + 1).width = column.width));
  writeHeads(sheet, headRow, columns);
  writeRows(sheet, firstRow, columns, rows);
  if (rows.length === 0) write(sheet.getCell(firstRow, 1), 'Nothing to list.');
  sheet.views = [{ state: 'frozen', xSplit: 1, ySplit: headRow }];
  sheet.autoFilter = { from: { row: headRow, column: 1 }, to: { row: Math.max(headRow, headRow + rows.length), column: columns.length } };
  sheet.pageSetup.printTitlesRow = `${headRow}:${headRow}`;
}

export function writeHeads<Row>(sheet: Worksheet, row: number, columns: Column<Row>[]): void {
  sheet.getRow(row).height = lineHeight * linesOf(columns, ({ head, unit }) => (unit ? `${head}\n${unit}` : head)) + 3;
  columns.forEach((column, i) => {
    const cell = sheet.getCell(row, i + 1);
    cell.value = column.unit ? `${column.head}\n${column.unit}` : column.head;
    cell.font = { ...typeface, bold: true };
    cell.fill = { type: 'pattern', pattern: 'solid', fgColor: { argb: inks.well } };
    cell.border = { bottom: { style: 'medium', color: { argb: inks.ink } } };
    cell.alignment = { wrapText: true, vertical: 'bottom', ...sideOf(column.format) };
  });
}

export function writeRows<Row>(sheet: Worksheet, from: number, columns: Column<Row>[], rows: Row[]): void {
  const letterOf = new Map(columns.map(({ key }, i) => [key, sheet.getColumn(i + 1).letter]));
  rows.forEach((row, at) => {
    const address = (key: string) => {
      const letter = letterOf.get(key);
      if (!letter) throw new Error(`no column ${key}`);
      return `${letter}${from + at}`;
    };
    const contents = new Map(columns.map((column) => [column.key, column.content(row, address)]));
    columns.forEach((column, i) => write(sheet.getCell(from + at, i + 1), contents.get(column.key) ?? null, column.format));
    const lines = linesOf(columns, ({ key }) => contents.get(key));
    if (lines > 1) sheet.getRow(from + at).height = lineHeight * lines;
  });
}

/** `label` is a quiet name before its value; `value` stands to the left whatever it is. */
export type Look = 'table' | 'label' | 'value';

export function write(cell: Cell, content: CellContent, format?: string, look: Look = 'table'): void {
  if (content !== null && content !== '') cell.value = content;
  cell.style = styleOf(format, look);
}

const styles = new Map<string, Partial<Style>>();

/** One object for all cells of a look: the library then writes the look once and not a cell at a time. Never to be changed. */
function styleOf(format: string | undefined, look: Look): Partial<Style> {
  const key = `${look} ${format ?? ''}`;
  const known = styles.get(key);
  if (known) return known;
  const style: Partial<Style> = {
    ...(format && { numFmt: format }),
    font: look === 'label' ? { ...typeface, color: { argb: inks.quiet } } : typeface,
    alignment: { vertical: 'top', wrapText: look === 'value' || !format, ...sideOf(look === 'value' ? undefined : format) },
    border: { bottom: { style: 'hair', color: { argb: inks.rule } } },
  };
  styles.set(key, style);
  return style;
}

const lineHeight = 15;

/** Lines that the longest text of a row takes in its column: not every program sets a row's height by itself. */
function linesOf<Row>(columns: Column<Row>[], textOf: (column: Column<Row>) => unknown): number {
  const lines = columns.map((column) => {
    const text = textOf(column);
    if (typeof text !== 'string') return 1;
    return text.split('\n').reduce((sum, line) => sum + Math.max(1, Math.ceil(line.length / column.width)), 0);
  });
  return Math.max(1, ...lines);
}

/** Figures to the right, words to the left and off the figure before them. */
const sideOf = (format: string | undefined) => (format ? { horizontal: 'right' as const } : { horizontal: 'left' as const, indent: 1 });
