import ExcelJS, { type CellValue, type Worksheet } from 'exceljs';
import { beforeAll, expect, it } from 'vitest';
import { summaryOf } from '@/lib/api/report-judgement';
import { buildWorkbook } from '@/lib/server/reports/workbook/build-workbook';
import { entry, reportContent, station } from '../../../make/report';

const wrong = entry('r-1', 'FC-1', 0.4, { isCorrected: true });
const right = entry('r-2', 'FC-1', 0.19, { correctsReadingId: 'r-1', note: 'Hoses were crossed', takenAt: '2026-03-02T10:15:00.000Z' });
const low = entry('r-3', 'FC-2', 0.15, { isInstrumentOverdue: true });
const trap = '=HYPERLINK("http://test.example","press")';
const content = reportContent(
  [
    station('FC-1', { reading: right }),
    station('FC-2', { reading: low, room: trap }),
    station('+FC-3', { room: '\t=1+1' }),
    station('@FC-4', { reading: entry('r-4', '@FC-4', 0.22), room: '-2' }),
  ],
  [wrong, right, low],
);
const signature = {
  id: 's-1',
  meaning: 'submitted' as const,
  note: '=2+2',
  submission: 1,
  personName: 'Tobin Ashgrove',
  personRole: 'technician',
  contentSha256: 'a'.repeat(64),
  signedAt: '2026-03-03T12:00:00.000Z',
};

let workbook: ExcelJS.Workbook;
beforeAll(async () => {
  const bytes = await buildWorkbook({
    content,
    contentSha256: 'a'.repeat(64),
    state: 'submitted',
    signatures: [signature],
    acceptedNumber: null,
    at: new Date('2026-03-03T13:00:00Z'),
  });
  workbook = new ExcelJS.Workbook();
  await workbook.xlsx.load(bytes as unknown as ArrayBuffer);
});

const headOf = (value: CellValue) => String(value).replace('\n', ', ');

/** The rows of a sheet's table by the names of its heads. */
function table(name: string): Record<string, CellValue>[] {
  const sheet = workbook.getWorksheet(name)!;
  const heads = (sheet.getRow(4).values as CellValue[]).slice(1).map(headOf);
  const rows: Record<string, CellValue>[] = [];
  for (let row = 5; row <= sheet.rowCount; row++)
    rows.push(Object.fromEntries(heads.map((head, i) => [head, sheet.getCell(row, i + 1).value])));
  return rows;
}

function* cellsOf(sheet: Worksheet): Generator<ExcelJS.Cell> {
  for (let row = 1; row <= sheet.rowCount; row++)
    for (let column = 1; column <= sheet.columnCount; column++) yield sheet.getCell(row, column);
}

it('has one sheet for each thing that is handed over', () => {
  expect(workbook.worksheets.map(({ name }) => name)).toEqual([
    'Cover',
    'Terminals',
    'Valves',
    'Pump',
    'Readings',
    'Rounds',
    'Revision',
    'Instruments',
    'Cautions',
  ]);
});

it('per cent of design is a formula that carries its value', () => {
  const [first] = table('Terminals');
  expect(first['Of design, %']).toEqual({ formula: 'IF(ISNUMBER(E5),E5/D5,"")', result: 0.19 / 0.2 });
  expect(first['Design flow, L/s']).toBe(0.2);
});

it('the verdict is judged by the bands on the cover, and its value is that of the page', () => {
  const rows = table('Terminals');
  const verdicts = rows.map((row) => row.Verdict as { formula: string; result: string });
  expect(verdicts.map(({ result }) => result)).toEqual(['within', 'low', 'not measured', 'within']);
  for (const { formula } of verdicts) expect(formula).toMatch(/terminal_lower_band.*terminal_upper_band/);
  const cover = workbook.getWorksheet('Cover')!;
  const [address] = workbook.definedNames.getRanges('terminal_lower_band').ranges;
  expect(cover.getCell(address.split('!')[1]).value).toBe(-0.1);
});

it('counts on the cover are formulas over the verdict column and agree with the summary', () => {
  const verdictColumn = (workbook.getWorksheet('Terminals')!.getRow(4).values as CellValue[]).findIndex((head) => head === 'Verdict');
  const letter = workbook.getWorksheet('Terminals')!.getColumn(verdictColumn).letter;
  const counts = [...cellsOf(workbook.getWorksheet('Cover')!)].filter(({ formula }) => formula?.startsWith('COUNTIF'));
  const { within, low: short, high, notMeasured } = summaryOf(content);
  expect(counts.map(({ result }) => result)).toEqual([within, short, high, notMeasured.length]);
  for (const { formula } of counts) expect(formula).toContain(`Terminals!$${letter}:$${letter}`);
});

it('what nobody measured is an empty cell, not a nought', () => {
  const unmeasured = table('Terminals').find(({ Tag }) => Tag === '+FC-3')!;
  for (const head of ['Measured flow, L/s', 'Setting, turns', 'Drop read, kPa', 'Uncertainty, ± % of flow', 'Taken, UTC', 'Round'])
    expect(unmeasured[head]).toBeNull();
  // The value of that formula is the empty text, which the reader gives as none.
  expect(unmeasured['Of design, %']).toEqual({ formula: 'IF(ISNUMBER(E7),E7/D7,"")' });
  expect(table('Pump')[0]['Shaft power, kW']).toBeNull();
});

it('a text that looks like a formula stays a text in every sheet', () => {
  expect(table('Terminals').map(({ Room }) => Room)).toEqual(['1.04', trap, '\t=1+1', '-2']);
  expect(table('Terminals').map(({ Tag }) => Tag)).toContain('@FC-4');
  const ours = /^(IF\(ISNUMBER|COUNTIF\()/;
  for (const sheet of workbook.worksheets) {
    for (const cell of cellsOf(sheet)) if (cell.type === ExcelJS.ValueType.Formula) expect(cell.formula).toMatch(ours);
  }
  const notes = [...cellsOf(workbook.getWorksheet('Cover')!)].filter(({ value }) => value === '=2+2');
  expect(notes.map(({ type }) => type)).toEqual([ExcelJS.ValueType.String]);
});

it('dates are dates', () => {
  expect(table('Terminals')[0]['Taken, UTC']).toEqual(new Date('2026-03-02T10:15:00Z'));
  expect(table('Instruments')[0]['Due on']).toEqual(new Date('2026-03-14T00:00:00Z'));
});

it('every entry is there, what was put right with its reason', () => {
  const rows = table('Readings');
  expect(rows.map(({ Standing }) => Standing)).toEqual(['put right later', 'counts', 'counts']);
  expect(rows[0]['Why it was put right']).toBe('Hoses were crossed');
  expect(rows[0]['Flow, L/s']).toBe(0.4);
  expect(rows[0]['As it was typed']).toBe('drop 74 mbar');
  expect(table('Instruments')[0]['Of them when overdue']).toBe(1);
});

it('tables have frozen and filtered heads and print as wide as a page of A4, numbered', () => {
  for (const name of ['Terminals', 'Valves', 'Pump', 'Readings', 'Instruments']) {
    const sheet = workbook.getWorksheet(name)!;
    expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 4 });
    expect(sheet.autoFilter).toBeTruthy();
    expect(sheet.pageSetup).toMatchObject({
      paperSize: 9,
      orientation: 'landscape',
      fitToPage: true,
      fitToWidth: 1,
      fitToHeight: 0,
      printTitlesRow: '4:4',
    });
    expect(sheet.headerFooter.oddFooter).toContain('&P of &N');
  }
});

it('the cover carries the flow strip as a picture', async () => {
  const [picture] = workbook.getWorksheet('Cover')!.getImages();
  const { buffer } = workbook.getImage(Number(picture.imageId));
  expect([...new Uint8Array(buffer!).slice(1, 4)].map((byte) => String.fromCharCode(byte)).join('')).toBe('PNG');
});
