import ExcelJS from 'exceljs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { POST } from '@/app/api/loops/[loopId]/schedule-upload/route';
import { readDraft } from '@/lib/server/loops/read-draft';
import { closeWorkbookPool, readWorkbookOffThread } from '@/lib/server/schedule-import/workbook-pool';
import { withDatabase } from '../../make/database';
import { makeOrganization, type MadeOrganization } from '../../make/organization';
import { signInAs } from '../../make/session';
import { makeZip, sheetOf, workbookParts } from '../../make/zip';

const suite = withDatabase();
let made: MadeOrganization;
beforeAll(async () => {
  made = await makeOrganization(suite.db);
});
afterAll(closeWorkbookPool);

async function upload(fileName: string, content: Buffer | string | ReadableStream, query: Record<string, string> = {}) {
  signInAs(made.designer);
  const request = new Request(`http://127.0.0.1/api?${new URLSearchParams({ fileName, ...query })}`, {
    method: 'POST',
    headers: { host: '127.0.0.1', origin: 'http://127.0.0.1' },
    body: content instanceof ReadableStream ? content : Buffer.from(content),
    duplex: 'half',
  } as RequestInit);
  const response = await POST(request, { params: Promise.resolve({ loopId: made.loopId }) });
  return { status: response.status, body: await response.json() };
}

async function workbookFile(fill: (workbook: ExcelJS.Workbook) => void): Promise<Buffer> {
  const workbook = new ExcelJS.Workbook();
  fill(workbook);
  return Buffer.from(await workbook.xlsx.writeBuffer());
}

const small = (sheet: ExcelJS.Worksheet) =>
  sheet.addRows([
    ['Tag', 'Flow (L/s)'],
    ['FC-1', 0.2],
    ['FC-2', 0.3],
  ]);
const row = (number: number, cell: string) => `<row r="${number}"><c r="A${number}">${cell}</c></row>`;
const twoRows = row(1, '<v>1</v>') + row(2, '<v>2</v>');

describe('a schedule file', () => {
  it('is read as text and numbers, and nothing is stored', async () => {
    const before = await readDraft(made.organizationId, made.loopId);
    const { status, body } = await upload('schedule.xlsx', await workbookFile((workbook) => small(workbook.addWorksheet('Fan coils'))));
    expect(status).toBe(200);
    expect(body).toEqual({
      table: {
        rows: [
          ['Tag', 'Flow (L/s)'],
          ['FC-1', 0.2],
          ['FC-2', 0.3],
        ],
        marks: [],
        firstRow: 1,
      },
      sheet: 'Fan coils',
      sheets: ['Fan coils'],
    });
    expect(await readDraft(made.organizationId, made.loopId)).toEqual(before);
  });

  it('with several sheets gives the first that holds something, or the one asked for; hidden ones are not offered', async () => {
    const file = await workbookFile((workbook) => {
      workbook.addWorksheet('Cover').addRow(['Library']);
      small(workbook.addWorksheet('Level 1'));
      workbook.addWorksheet('Level 2').addRows([['Tag'], ['FC-9']]);
      small(workbook.addWorksheet('Lists', { state: 'hidden' }));
    });
    expect((await upload('a.xlsx', file)).body).toMatchObject({ sheet: 'Level 1', sheets: ['Cover', 'Level 1', 'Level 2'] });
    expect((await upload('a.xlsx', file, { sheet: 'Level 2' })).body.table.rows).toEqual([['Tag'], ['FC-9']]);
    expect(await upload('a.xlsx', file, { sheet: 'Lists' })).toMatchObject({
      status: 422,
      body: { title: 'The workbook has no sheet “Lists”.' },
    });
  });

  it('with formulas, merged cells, dates and dressed text is read as it shows, each marked', async () => {
    const file = await workbookFile((workbook) => {
      const sheet = workbook.addWorksheet('S');
      sheet.addRow(['Title above']);
      sheet.addRow([]);
      sheet.addRows([
        ['Tag', 'Level', 'Load', 'Flow'],
        ['A', 'Level 1', { formula: '2*2.1', result: 4.2 }, { formula: 'C4/25' }],
        ['B', null, 3, new Date('2026-05-01')],
      ]);
      sheet.addRow([
        { richText: [{ text: 'F' }, { text: 'C' }] },
        { text: 'Level 2', hyperlink: 'https://site.example' },
        { error: '#N/A' },
        true,
      ]);
      sheet.mergeCells('B4:B5');
    });
    const { table } = (await upload('a.xlsx', file)).body;
    expect(table.rows.slice(2)).toEqual([
      ['Tag', 'Level', 'Load', 'Flow'],
      ['A', 'Level 1', 4.2, null],
      ['B', 'Level 1', 3, '2026-05-01'],
      ['FC', 'Level 2', '#N/A', 'TRUE'],
    ]);
    expect(table.marks).toEqual([
      { row: 3, column: 2, kind: 'formula' },
      { row: 3, column: 3, kind: 'formula-without-result' },
      { row: 4, column: 1, kind: 'merged' },
      { row: 4, column: 3, kind: 'date' },
    ]);
  });

  it.each([
    ['UTF-8 with its mark', Buffer.from('\uFEFFTag;Riser\nFC-1;Süd', 'utf8')],
    ['Latin-1', Buffer.from('Tag;Riser\nFC-1;Süd', 'latin1')],
    ['UTF-16', Buffer.from('\uFEFFTag;Riser\nFC-1;Süd', 'utf16le')],
  ])('of text in %s keeps its letters', async (_, file) => {
    expect((await upload('schedule.csv', file)).body.table.rows).toEqual([
      ['Tag', 'Riser'],
      ['FC-1', 'Süd'],
    ]);
  });

  it('of 5000 rows is read', async () => {
    const file = await workbookFile((workbook) => {
      const sheet = workbook.addWorksheet('S');
      sheet.addRow(['Tag', 'Storey', 'Load (kW)', 'Coil drop (kPa)']);
      for (let number = 1; number <= 5000; number++) sheet.addRow([`FC-${number}`, `Level ${number % 9}`, 4.2, 14]);
    });
    expect((await upload('schedule.xlsx', file)).body.table.rows).toHaveLength(5001);
  });
});

describe('a file that is no schedule is refused in a sentence, without an error of the server', () => {
  const bomb = Buffer.alloc(300 << 20, ' ');
  const parts = workbookParts(sheetOf(twoRows));
  const withSheet = (declaredBytes?: number) => [...parts.slice(0, 3), { name: 'xl/worksheets/sheet1.xml', content: bomb, declaredBytes }];
  const manyCells = Array.from(
    { length: 5100 },
    (_, at) => `<row r="${at + 1}">${`<c r="A${at + 1}"><v>1</v></c>`.repeat(200)}</row>`,
  ).join('');
  const manyFonts = `<styleSheet><fonts>${'<font/>'.repeat(5_000_000)}</fonts></styleSheet>`;
  const laughs = `<!DOCTYPE w [<!ENTITY a "haha">${'bcdefghi'.replace(/./g, (it) => `<!ENTITY ${it} "${`&${String.fromCharCode(it.charCodeAt(0) - 1)};`.repeat(10)}">`)}]>`;

  it.each<[string, string, () => Buffer | string, string | RegExp]>([
    ['an empty file', 'a.csv', () => '', 'empty'],
    [
      'a workbook that is random bytes',
      'a.xlsx',
      () => Buffer.from(Array.from({ length: 4000 }, (_, at) => (at * 7919) % 256)),
      'its content is none',
    ],
    ['a picture named as text', 'a.csv', () => Buffer.from('\x89PNG\r\n\x1a\n\0\0\0\rIHDR', 'latin1'), 'neither a workbook'],
    ['text named as a workbook', 'a.xlsx', () => 'Tag,Flow\nA,1\n', '.csv'],
    ['a workbook named as text', 'a.csv', () => makeZip(parts), '.xlsx'],
    ['text with another ending', 'a.exe', () => 'Tag,Flow\nA,1\n', 'cannot be read as rows'],
    ['an older workbook', 'a.xls', () => Buffer.from('d0cf11e0a1b11ae100000000', 'hex'), '.xls'],
    ['a workbook cut short', 'a.xlsx', () => makeZip(parts).subarray(0, 500), 'damaged'],
    ['a zip file of something else', 'a.xlsx', () => makeZip([{ name: 'letter.txt', content: 'hello' }]), 'no workbook'],
    ['a locked workbook', 'a.xlsx', () => makeZip(parts.map((part) => ({ ...part, isLocked: true }))), 'password'],
    ['a sheet that is not XML', 'a.xlsx', () => makeZip(workbookParts('<worksheet><sheetData><row>')), 'could not be read|no sheet|empty'],
    ['a sheet with nothing in it', 'a.xlsx', () => makeZip(workbookParts(sheetOf(''))), 'empty'],
    ['a zip bomb', 'a.xlsx', () => makeZip(withSheet()), 'unpacks to far more'],
    ['a zip bomb that hides its size', 'a.xlsx', () => makeZip(withSheet(1000)), 'unpacks to far more'],
    [
      'a zip of ten thousand parts',
      'a.xlsx',
      () => makeZip(Array.from({ length: 10_000 }, (_, at) => ({ name: `p${at}`, content: '' }))),
      'far more parts',
    ],
    ['a part listed twice', 'a.xlsx', () => makeZip([...parts, parts[3]!]), 'damaged'],
    ['entities that multiply', 'a.xlsx', () => makeZip(workbookParts(laughs + sheetOf(row(1, '<v>&i;</v>')))), /could not be read|empty/],
    [
      'a merge over the whole sheet',
      'a.xlsx',
      () => makeZip(workbookParts(sheetOf(twoRows, '<mergeCells count="1"><mergeCell ref="A1:XFD1048576"/></mergeCells>'))),
      'merged',
    ],
    [
      'a row a million below',
      'a.xlsx',
      () => makeZip(workbookParts(sheetOf(row(1, '<v>1</v>') + row(1_048_576, '<v>2</v>')))),
      'far below',
    ],
    ['a million cells', 'a.xlsx', () => makeZip(workbookParts(sheetOf(manyCells))), 'unpacks to far more'],
    ['millions of fonts', 'a.xlsx', () => makeZip([...parts, { name: 'xl/styles.xml', content: manyFonts }]), 'unpacks to far more'],
    [
      '6000 rows',
      'a.xlsx',
      () => makeZip(workbookParts(sheetOf(Array.from({ length: 6000 }, (_, at) => row(at + 1, '<v>1</v>')).join('')))),
      'at most 5200 are read',
    ],
    ['6000 lines', 'a.csv', () => 'FC,1\n'.repeat(6000), 'at most 5200 are read'],
    ['a quotation mark left open', 'a.csv', () => 'Tag,Room\nA,"hall\nB,store\n', 'not closed'],
  ])('%s', async (_, fileName, make, sentence) => {
    const { status, body } = await upload(fileName, make());
    expect({ status, code: body.code }).toEqual({ status: 422, code: 'schedule-unfit' });
    expect(body.title).toMatch(sentence instanceof RegExp ? sentence : new RegExp(sentence));
  });

  it('a hundred megabytes are not read to their end', async () => {
    let sent = 0;
    const stream = new ReadableStream({
      pull(controller) {
        sent += 1 << 20;
        if (sent > 100 << 20) controller.close();
        else controller.enqueue(new Uint8Array(1 << 20));
      },
    });
    expect(await upload('a.xlsx', stream)).toMatchObject({
      status: 413,
      body: { code: 'input-too-large', title: expect.stringContaining('10 MiB') },
    });
    expect(sent).toBeLessThan(20 << 20);
  });

  it('one that takes too long is given up', async () => {
    const task = { file: new Uint8Array(makeZip(parts)), sheet: undefined };
    await expect(readWorkbookOffThread(task, new AbortController().signal, 1)).rejects.toThrow('took too long');
  });

  it('and afterwards a good one is read as ever; names for whole sheets do it no harm', async () => {
    const names = '<definedNames><definedName name="all">Sheet!$A$1:$XFD$1048576</definedName></definedNames>';
    const { status, body } = await upload('a.xlsx', makeZip(workbookParts(sheetOf(twoRows), { names })));
    expect(status).toBe(200);
    expect(body.table.rows).toEqual([[1], [2]]);
  });
});

it('asks for the name of the file, and for a designer', async () => {
  expect((await upload('', 'a,b')).status).toBe(400);
  signInAs(made.technician);
  const request = new Request('http://127.0.0.1/api?fileName=a.csv', { method: 'POST', headers: { host: '127.0.0.1' }, body: 'a,b' });
  expect((await POST(request, { params: Promise.resolve({ loopId: made.loopId }) })).status).toBe(403);
});
