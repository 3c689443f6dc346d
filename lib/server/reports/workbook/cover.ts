import type { Workbook, Worksheet } from 'exceljs';
import type { LoopState } from '@/lib/api/loops';
import { stripOfReport, summaryOf } from '@/lib/api/report-judgement';
import type { Meaning, Signature } from '@/lib/api/reports';
import type { ToleranceRule } from '@/lib/api/projects';
import { cautionSentence } from '@/lib/commissioning/cautions';
import { bandName, kindWords, rankWords } from './measured-columns';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, formats, typeface, write, writeHeads, writeRows, type CellContent, type Column, type Formula } from './sheet-table';
import { stripBox, stripPicture } from './strip-picture';

export const standing: Record<LoopState, string> = {
  draft: 'Draft: nothing is issued',
  issued: 'Issued: not commissioned yet',
  'in-commissioning': 'In commissioning: not submitted',
  submitted: 'Submitted by the technician, not reviewed yet',
  reviewed: 'Reviewed by the designer, not accepted yet',
  accepted: 'Accepted by the owner',
};
const meaningWords: Record<Meaning, string> = { submitted: 'Submitted', reviewed: 'Reviewed', returned: 'Returned', accepted: 'Accepted' };
const mediumWords: Record<string, string> = {
  water: 'water',
  'propylene-glycol': 'propylene glycol',
  'ethylene-glycol': 'ethylene glycol',
};

const pictureRows = 6;

/** The first sheet: what it is about, how it stands, the bands that the other sheets judge by, and who signed. */
export async function addCover(workbook: Workbook, report: ReportOnPaper): Promise<void> {
  const sheet = addSheet(workbook, 'Cover', { title: `Commissioning report, ${report.content.loop.name}`, reference: referenceOf(report) });
  sheet.pageSetup.fitToHeight = 1;
  [26, 15, 18, 34, 20, 34].forEach((width, i) => (sheet.getColumn(i + 1).width = width));
  let row = writeFacts(sheet, 4, report) + 1;
  row = await placeStrip(sheet, workbook, row, report);
  row = writeSummary(sheet, row, report);
  row = writeBands(sheet, row, workbook, report.content.tolerances) + 1;
  row = writeSignatures(sheet, row, report.signatures) + 1;
  const closing = sheet.getCell(row, 1);
  sheet.mergeCells(row, 1, row, 6);
  closing.value = cautionSentence;
  closing.font = typeface;
  closing.alignment = { wrapText: true, vertical: 'top' };
  sheet.getRow(row).height = 32;
}

function writeFacts(sheet: Worksheet, from: number, { content, contentSha256, state, at, acceptedNumber }: ReportOnPaper): number {
  const { project, loop, revision, fluid, organization } = content;
  const mixture = fluid.massFraction > 0 ? `, ${(fluid.massFraction * 100).toFixed(0)} % by mass` : '';
  const facts: [string, CellContent, string?][] = [
    ['Organisation', organization],
    ['Project', project.name],
    ['Client', project.client],
    ['Building', project.building],
    ['Loop', `${loop.name}, ${loop.service} water`],
    ['Revision', `${revision.number}, issued by ${revision.issuedBy}${revision.note ? `: ${revision.note}` : ''}`],
    ['Fluid', `${mediumWords[fluid.medium] ?? fluid.medium}${mixture}, ${fluid.supplyC} °C supply, ${fluid.returnC} °C return`],
    ['State', acceptedNumber === null ? standing[state] : `${standing.accepted}, report ${acceptedNumber}`],
    ['Made, UTC', at, formats.moment],
    ['SHA-256 of the content', contentSha256],
  ];
  facts.forEach(([name, value, format], i) => {
    write(sheet.getCell(from + i, 1), name, undefined, 'label');
    sheet.mergeCells(from + i, 2, from + i, 6);
    write(sheet.getCell(from + i, 2), value, format, 'value');
  });
  return from + facts.length;
}

async function placeStrip(sheet: Worksheet, workbook: Workbook, row: number, { content }: ReportOnPaper): Promise<number> {
  const { strip, band } = stripOfReport(content);
  if (strip.length === 0) return row;
  heading(
    sheet,
    row,
    'Flow strip: one mark a terminal in walking order, its height is the per cent of design, the tolerance band behind it',
  );
  const image = workbook.addImage({ buffer: (await stripPicture(strip, band)) as unknown as ArrayBuffer, extension: 'png' });
  sheet.addImage(image, { tl: { col: 0, row }, ext: stripBox });
  for (let i = 1; i <= pictureRows; i++) sheet.getRow(row + i).height = (stripBox.height * 0.75) / pictureRows;
  return row + pictureRows + 2;
}

function writeSummary(sheet: Worksheet, row: number, { content }: ReportOnPaper): number {
  const { within, low, high, notMeasured } = summaryOf(content);
  heading(sheet, row, 'Terminals');
  const counts: [string, number][] = [
    ['within', within],
    ['low', low],
    ['high', high],
    ['not measured', notMeasured.length],
  ];
  counts.forEach(([verdict, result], i) => {
    write(sheet.getCell(row + 1 + i, 1), verdict);
    const count: Formula = { formula: `COUNTIF(Terminals!$G:$G,A${row + 1 + i})`, result };
    write(sheet.getCell(row + 1 + i, 2), count, formats.whole);
  });
  return row + 2 + counts.length;
}

/** The bands get names, by which the formulas of the other sheets judge. */
function writeBands(sheet: Worksheet, row: number, workbook: Workbook, tolerances: ToleranceRule[]): number {
  const columns: Column<ToleranceRule>[] = [
    {
      key: 'kind',
      head: 'Tolerance of',
      width: 26,
      content: ({ stationKind, rank }) => `${kindWords[stationKind]}${rankWords[rank ?? 'all']}`,
    },
    {
      key: 'lower',
      head: 'Lower',
      unit: '% from design',
      width: 15,
      format: formats.signedPercent,
      content: ({ lowerPercent }) => lowerPercent / 100,
    },
    {
      key: 'upper',
      head: 'Upper',
      unit: '% from design',
      width: 15,
      format: formats.signedPercent,
      content: ({ upperPercent }) => upperPercent / 100,
    },
    { key: 'source', head: 'Source', width: 34, content: ({ source }) => source },
  ];
  writeHeads(sheet, row, columns);
  writeRows(sheet, row + 1, columns, tolerances);
  tolerances.forEach((rule, i) => {
    workbook.definedNames.add(`Cover!$B$${row + 1 + i}`, bandName(rule, 'lower'));
    workbook.definedNames.add(`Cover!$C$${row + 1 + i}`, bandName(rule, 'upper'));
  });
  return row + 1 + tolerances.length;
}

function writeSignatures(sheet: Worksheet, row: number, signatures: Signature[]): number {
  const columns: Column<Signature>[] = [
    {
      key: 'meaning',
      head: 'Signature',
      width: 26,
      content: ({ meaning, submission }) => `${meaningWords[meaning]}, submission ${submission}`,
    },
    { key: 'role', head: 'As', width: 14, content: ({ personRole }) => personRole },
    { key: 'at', head: 'Signed', unit: 'UTC', width: 14, format: formats.moment, content: ({ signedAt }) => new Date(signedAt) },
    { key: 'name', head: 'By', width: 34, content: ({ personName }) => personName },
    { key: 'sha', head: 'SHA-256 signed', width: 18, content: ({ contentSha256 }) => contentSha256.slice(0, 16) },
    { key: 'note', head: 'Note', width: 34, content: ({ note }) => note },
  ];
  writeHeads(sheet, row, columns);
  writeRows(sheet, row + 1, columns, signatures);
  if (signatures.length === 0) write(sheet.getCell(row + 1, 1), 'Nobody has signed yet.');
  return row + 1 + Math.max(1, signatures.length);
}

function heading(sheet: Worksheet, row: number, text: string): void {
  sheet.getCell(row, 1).value = text;
  sheet.getCell(row, 1).font = { ...typeface, bold: true };
}
