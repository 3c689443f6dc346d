import ExcelJS from 'exceljs';
import { expect, it } from 'vitest';
import { fillWorkbook } from '@/lib/client/schedule-workbook';
import type { TerminalUnit } from '@/lib/network/drawing';
import { scheduleOf } from '@/lib/network/schedule-rows';
import { terminalTable } from '@/lib/network/schedule-terminals';
import { noValveOffer } from '@/lib/network/schedule-valve-offer';
import { ladder } from '../../make/drawing';

/** The workbook as it is when it has been written and opened again. */
async function opened() {
  const drawing = ladder([0.2, 0.3]);
  const first = drawing.equipment.find((piece): piece is TerminalUnit => piece.kind === 'terminalUnit')!;
  first.room = '=HYPERLINK("x")';
  const rows = scheduleOf(drawing, { solve: null, balance: null }).terminals;
  const columns = ['tag', 'room', 'design', 'flow'].map((key) => terminalTable.columns.find((column) => column.key === key)!);
  const workbook = new ExcelJS.Workbook();
  fillWorkbook(workbook, {
    name: 'Terminals',
    title: 'CHW-1, draft: terminals',
    columns,
    rows: [rows[1], rows[0]],
    units: { flow: 'm³/h' },
    context: { valves: noValveOffer },
  });
  const again = new ExcelJS.Workbook();
  await again.xlsx.load(await workbook.xlsx.writeBuffer());
  return again.getWorksheet('Terminals')!;
}

const sheet = await opened();
const valuesOf = (row: number) => [1, 2, 3, 4].map((column) => sheet.getRow(row).getCell(column).value);

it('the file holds the columns and rows in the order in which they were seen, with the units in the head', () => {
  expect(valuesOf(3)).toEqual(['Terminal', 'Room', 'Design flow (m³/h)', 'Flow now (m³/h)']);
  expect([4, 5].map((row) => sheet.getRow(row).getCell(1).value)).toEqual(['FC-2', 'FC-1']);
  expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 3 });
});

it('figures are numbers in the unit that was read, with its decimals, and what is missing is an empty cell', () => {
  expect(sheet.getCell('C4').value).toBe(1.08);
  expect(sheet.getCell('C4').numFmt).toBe('0.00');
  expect(sheet.getCell('D4').value).toBeNull();
});

it('a text that begins like a formula stays a text', () => {
  expect(sheet.getCell('B5').type).toBe(ExcelJS.ValueType.String);
  expect(sheet.getCell('B5').value).toBe('=HYPERLINK("x")');
});

it('the foot sums what was seen', () => {
  expect(sheet.getCell('A6').value).toBe('2 rows');
  expect(sheet.getCell('C6').value).toBeCloseTo(1.8, 9);
});
