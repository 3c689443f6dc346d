import { cellText, type ScheduleTable } from '@/lib/network/schedule-import/table';

/** More digits than any data sheet has; what a spreadsheet's binary sums leave behind them is not shown. */
const DIGITS = 12;

/** The cells of an uploaded table as text, and what a person should know of how they came about. */
export function uploadedCells({ rows, marks }: ScheduleTable): { cells: string[][]; remarks: string[] } {
  const cells = rows.map((row) => row.map((cell) => cellText(typeof cell === 'number' ? Number(cell.toPrecision(DIGITS)) : cell)));
  for (const { kind, row, column } of marks) if (kind === 'formula-without-result') cells[row]![column] = 'formula without a result';
  const count = (kind: (typeof marks)[number]['kind']) => marks.filter((mark) => mark.kind === kind).length;
  const formulas = count('formula');
  const merged = count('merged');
  return {
    cells,
    remarks: [
      ...(formulas
        ? [`${formulas === 1 ? 'One cell holds a formula' : `${formulas} cells hold formulas`}: the last result was taken.`]
        : []),
      ...(merged ? ['Merged cells: each repeats what they say.'] : []),
    ],
  };
}
