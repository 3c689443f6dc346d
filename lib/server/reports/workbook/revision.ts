import type { Workbook } from 'exceljs';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, firstRow, formats, write, type CellContent, type Column } from './sheet-table';

/** The frozen design that was commissioned: note, issue, what changed against the one before, and how its figures were found. */
export function addRevision(workbook: Workbook, report: ReportOnPaper): void {
  const { revision, balance, fluid } = report.content;
  const sheet = addSheet(workbook, 'Revision', { title: `Revision ${revision.number}`, reference: referenceOf(report) });
  const columns: Column<string>[] = [
    { key: 'change', head: 'Changed against the revision before', width: 60, content: (change) => change },
  ];
  addTable(sheet, columns, revision.changes);
  const facts: [string, CellContent, string?][] = [
    ['Issued by', revision.issuedBy],
    ['Issued, UTC', new Date(revision.issuedAt), formats.moment],
    ['Note', revision.note],
    ['Density at mean temperature, kg/m³', fluid.densityKgM3, '0.0'],
    ['Viscosity at mean temperature, mPa s', fluid.viscosityMPaS, '0.000'],
    ['Settings found by', 'a balance of the whole loop for design flow at every terminal'],
    ['Converged', balance.converged ? 'yes' : 'no'],
    ['Iterations', balance.solution?.iterations ?? null, formats.whole],
    ['Largest flow left over at a node, L/s', balance.solution?.residuals.continuityLs ?? null, '0.0E+00'],
    ['Largest drop left over around a loop, Pa', balance.solution?.residuals.loopPa ?? null, '0.0E+00'],
  ];
  sheet.getColumn(3).width = 42;
  sheet.getColumn(4).width = 60;
  facts.forEach(([name, content, format], i) => {
    write(sheet.getCell(firstRow + i, 3), name, undefined, 'label');
    write(sheet.getCell(firstRow + i, 4), content, format, 'value');
  });
}
