import type { Cell, CellValue, Row, Workbook, Worksheet } from 'exceljs';

const textOf = (cell: Cell) => String(cell.text ?? '').trim();

/** The row of a sheet that names its columns: the first in which a cell says "Tag" or, on the sheet of readings, "Station". */
function headOf(sheet: Worksheet): Row {
  for (let number = 1; number <= 12; number++) {
    const row = sheet.getRow(number);
    const texts = (row.values as CellValue[]).map(String);
    if (texts.some((text) => text === 'Tag' || text === 'Station')) return row;
  }
  throw new Error(`${sheet.name} has no head row`);
}

const sheetOf = (workbook: Workbook, name: string): Worksheet => {
  const sheet = workbook.getWorksheet(name);
  if (!sheet) throw new Error(`the workbook has no sheet ${name}`);
  return sheet;
};

export function columnOf(workbook: Workbook, sheetName: string, head: string): number {
  const row = headOf(sheetOf(workbook, sheetName));
  for (let column = 1; column <= row.cellCount; column++) if (textOf(row.getCell(column)).startsWith(head)) return column;
  throw new Error(`${sheetName} has no column ${head}`);
}

/** The rows of figures: those below the head whose first cell says something and whose design or flow is a number. */
export function rowsOf(workbook: Workbook, sheetName: string): Row[] {
  const sheet = sheetOf(workbook, sheetName);
  const rows: Row[] = [];
  for (let number = headOf(sheet).number + 1; number <= sheet.rowCount; number++) {
    const row = sheet.getRow(number);
    const hasFigure = (row.values as CellValue[]).some((value) => typeof value === 'number');
    if (textOf(row.getCell(1)) && hasFigure) rows.push(row);
  }
  return rows;
}

/** A figure of one row, by the head of its column. */
export function cell(workbook: Workbook, sheetName: string, row: Row, head: string): unknown {
  const found = row.getCell(columnOf(workbook, sheetName, head));
  return found.formula ? found.result : found.value;
}
