import { bandFor, verdictOf } from '@/lib/api/report-judgement';
import type { ToleranceRule } from '@/lib/api/projects';
import type { ReportContent, ReportStation } from '@/lib/api/reports';
import type { ConditionalFormattingRule, Worksheet } from 'exceljs';
import { formats, inks, type Column, type Formula } from './sheet-table';

/** Names of the cells on the cover that hold a band, as parts of one: −0.1 is 10 % below design. */
export const bandName = ({ stationKind, rank }: Pick<ToleranceRule, 'stationKind' | 'rank'>, end: 'lower' | 'upper'): string =>
  (rank ?? 'all') === 'all' ? `${stationKind}_${end}_band` : `${stationKind}_${rank}_${end}_band`;

export const methodWords = {
  'valve-drop': 'valve drop',
  'direct-flow': 'direct flow',
  'coil-differential': 'coil differential',
  'pump-differential': 'pump differential on its curve',
  'heat-balance': 'heat balance',
} as const;
export const rankWords = { all: '', index: ', index unit', small: ', under 0.1 L/s', main: ', mains and risers' } as const;
export const kindWords = { terminal: 'Terminal', branch: 'Branch or main', pump: 'Pump' } as const;

/** Per cent of design and verdict as formulas, so that the reader sees where they come from and can follow a change. */
export function measuredColumns<Row>(content: ReportContent, stationOf: (row: Row) => ReportStation): Column<Row>[] {
  const reading = (row: Row) => stationOf(row).reading;
  return [
    {
      key: 'measured',
      head: 'Measured flow',
      unit: 'L/s',
      width: 11,
      format: formats.flow,
      content: (row) => reading(row)?.flowLs ?? null,
    },
    {
      key: 'percent',
      head: 'Of design',
      unit: '%',
      width: 10,
      format: formats.percent,
      content: (row, cell) => {
        const { designFlowLs } = stationOf(row);
        const measured = reading(row);
        return {
          formula: `IF(ISNUMBER(${cell('measured')}),${cell('measured')}/${cell('design')},"")`,
          result: measured ? measured.flowLs / designFlowLs : '',
        };
      },
    },
    { key: 'verdict', head: 'Verdict', width: 14, content: (row, cell) => verdictFormula(content, stationOf(row), cell('percent')) },
  ];
}

function verdictFormula(content: ReportContent, station: ReportStation, percent: string): Formula | string {
  const verdict = verdictOf(content, station);
  const band = bandFor(content, station);
  if (!band) return verdict ?? 'not measured';
  const [lower, upper] = [bandName(band, 'lower'), bandName(band, 'upper')];
  // Rounded, so that a flow on the band's very edge is not judged by the last bit of a division.
  const part = `ROUND(${percent},9)`;
  const judged = `IF(${part}<ROUND(1+${lower},9),"low",IF(${part}>ROUND(1+${upper},9),"high","within"))`;
  return { formula: `IF(ISNUMBER(${percent}),${judged},"not measured")`, result: verdict ?? 'not measured' };
}

/** Low and high in their colours; the word stands in the cell, so that the colour carries nothing alone. */
export function colourVerdicts(sheet: Worksheet, columns: { key: string }[], firstRow: number, rows: number): void {
  const letter = sheet.getColumn(columns.findIndex(({ key }) => key === 'verdict') + 1).letter;
  if (rows === 0) return;
  const rule = (word: string, argb: string, priority: number): ConditionalFormattingRule => ({
    type: 'expression',
    formulae: [`$${letter}${firstRow}="${word}"`],
    priority,
    style: { font: { bold: true, color: { argb } } },
  });
  sheet.addConditionalFormatting({
    ref: `${letter}${firstRow}:${letter}${firstRow + rows - 1}`,
    rules: [rule('low', inks.low, 1), rule('high', inks.high, 2), rule('not measured', inks.quiet, 3)],
  });
}
