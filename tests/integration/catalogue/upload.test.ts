import ExcelJS from 'exceljs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { POST } from '@/app/api/catalogue/upload/route';
import { pumpColumns, valveColumns } from '@/lib/catalogue/figure-columns';
import { placeTable } from '@/lib/catalogue/place-table';
import { readPumpRows } from '@/lib/catalogue/read-pump-rows';
import { readValveRows } from '@/lib/catalogue/read-valve-rows';
import { uploadedCells } from '@/lib/catalogue/uploaded-cells';
import { closeWorkbookPool } from '@/lib/server/schedule-import/workbook-pool';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';

const suite = withDatabase();
let made: MadeOrganization;
beforeAll(async () => {
  made = await makeOrganization(suite.db);
  signInAs(made.designer);
});
afterAll(closeWorkbookPool);

async function upload(fileName: string, content: Buffer | string | ReadableStream) {
  const request = new Request(`http://127.0.0.1/api?${new URLSearchParams({ fileName })}`, {
    method: 'POST',
    headers: { host: '127.0.0.1', origin: 'http://127.0.0.1' },
    body: content instanceof ReadableStream ? content : Buffer.from(content),
    duplex: 'half',
  } as RequestInit);
  const response = await POST(request, { params: Promise.resolve({}) });
  return { status: response.status, body: await response.json() };
}

async function workbook(fill: (sheet: ExcelJS.Worksheet) => void): Promise<Buffer> {
  const book = new ExcelJS.Workbook();
  fill(book.addWorksheet('Chart'));
  return Buffer.from(await book.xlsx.writeBuffer());
}

const units = {
  setting: 'turns',
  kv: 'Kv',
  measuringKv: 'Kv',
  step: 'turns',
  flowLs: 'L/s',
  headM: 'm',
  efficiency: '%',
  suctionHeadM: 'm',
};
const placed = (body: { table: Parameters<typeof uploadedCells>[0] }, columns: typeof valveColumns | typeof pumpColumns) => {
  const found = placeTable(uploadedCells(body.table).cells, columns);
  if (!found.ok) throw new Error(found.message);
  return found;
};

describe('an uploaded workbook', () => {
  it('with a chart of settings by size gives the sizes, figure for figure', async () => {
    const file = await workbook((sheet) =>
      sheet.addRows([['Kv of the house valve'], ['Setting', 'DN15', 'DN20'], [0.5, 0.13, 0.51], [2, 1, 1.9], [4, 2.4, 5.7]]),
    );
    const { status, body } = await upload('chart.xlsx', file);
    expect(status).toBe(200);
    const { sizes, faults } = readValveRows(placed(body, valveColumns).rows, units);
    expect(faults).toEqual([]);
    expect(sizes.map(({ nominal }) => nominal)).toEqual(['DN15', 'DN20']);
    expect(sizes[1]!.points).toEqual([
      { setting: 0.5, kv: 0.51 },
      { setting: 2, kv: 1.9 },
      { setting: 4, kv: 5.7 },
    ]);
  });

  it('with merged sizes is read as it shows, and text, 1e9 and a formula that was never calculated are named by their cells', async () => {
    const file = await workbook((sheet) => {
      sheet.addRows([
        ['Size', 'Setting', 'Kv'],
        ['DN15', 1, 0.4],
        [null, 2, 'abc'],
        [null, 3, 1e9],
        [null, 4, { formula: 'C2*6' }],
      ]);
      sheet.mergeCells('A2:A5');
    });
    const { rows } = placed((await upload('chart.xlsx', file)).body, valveColumns);
    const { faults } = readValveRows(rows, units);
    expect(rows.map(([size]) => size)).toEqual(['DN15', 'DN15', 'DN15', 'DN15']);
    expect(faults.map(({ row, column }) => [row, column])).toEqual([
      [1, 'kv'],
      [3, 'kv'],
    ]);
    rows[1]![2] = '0.8';
    rows[3]![2] = '2.4';
    expect(readValveRows(rows, units).faults.map(({ row, column }) => [row, column])).toContainEqual([2, 'kv']);
  });

  it('of a pump brings the units that its headings name', async () => {
    const { body } = await upload('pump.csv', 'Flow (m3/h);Head (ft);NPSHr (m)\n0;40;\n36;30;2,5\n72;10;4\n');
    const found = placed(body, pumpColumns);
    const { points, faults } = readPumpRows(found.rows, { ...units, ...found.units });
    expect(faults).toEqual([]);
    expect(points.map(({ flowLs }) => flowLs)).toEqual([0, 10, 20]);
    expect(points[1]!.headM).toBeCloseTo(9.144, 9);
    expect(points[1]!.suctionHeadM).toBe(2.5);
  });
});

describe('a file that is none', () => {
  it.each([
    ['a workbook cut short', 'a.xlsx', Buffer.from('PK\x03\x04 and nothing more', 'latin1'), /damaged|no workbook/],
    ['text named as a workbook', 'a.xlsx', 'Setting;DN15\n1;2\n', /its content is none/],
    ['a picture named as text', 'a.csv', Buffer.from('\x89PNG\r\n\x1a\n\0\0', 'latin1'), /neither a workbook/],
    ['an empty one', 'a.csv', '', /empty/],
  ])('%s is refused with the reason', async (_, name, content, reason) => {
    const { status, body } = await upload(name, content);
    expect(status).toBe(422);
    expect(body.title).toMatch(reason);
  });

  it('a hundred megabytes are not read to their end', async () => {
    let sent = 0;
    const endless = new ReadableStream({
      pull(controller) {
        if (sent >= 100 << 20) return controller.close();
        sent += 1 << 20;
        controller.enqueue(new Uint8Array(1 << 20));
      },
    });
    expect((await upload('a.xlsx', endless)).status).toBe(413);
    expect(sent).toBeLessThan(20 << 20);
  });

  it('is for those who keep the catalogue', async () => {
    signInAs(made.technician);
    expect((await upload('a.csv', 'Setting;DN15\n1;2\n')).status).toBe(403);
    signInAs(made.designer);
  });
});
