import ExcelJS from 'exceljs';
import { addCautions } from './cautions';
import { addCover } from './cover';
import { addInstruments } from './instruments';
import { addPump } from './pump';
import { addReadings } from './readings';
import type { ReportOnPaper } from './report-on-paper';
import { addRevision } from './revision';
import { addRounds } from './rounds';
import { addSite } from './site';
import { addTerminals } from './terminals';
import { addValves } from './valves';

/** The report as a spreadsheet file (Office Open XML). */
export async function buildWorkbook(report: ReportOnPaper): Promise<Buffer> {
  const workbook = new ExcelJS.Workbook();
  workbook.creator = 'Evenhead';
  workbook.created = report.at;
  workbook.modified = report.at;
  workbook.title = `Commissioning report, ${report.content.loop.name}`;
  await addCover(workbook, report);
  addTerminals(workbook, report);
  addValves(workbook, report);
  addPump(workbook, report);
  addReadings(workbook, report);
  addRounds(workbook, report);
  addSite(workbook, report);
  addRevision(workbook, report);
  addInstruments(workbook, report);
  addCautions(workbook, report);
  return Buffer.from(await workbook.xlsx.writeBuffer());
}
