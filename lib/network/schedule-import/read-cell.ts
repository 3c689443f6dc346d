import { toUnit } from '@/lib/units/format-quantity';
import { unitsOf } from '@/lib/units/quantities';
import type { TableReading } from './guess-columns';
import { meaningOf, type Meaning } from './meanings';
import { readFigure, type DecimalMark } from './schedule-units';
import { cellText, oneLine, type CellMark, type ScheduleTable, type TableCell } from './table';

/** A cell that cannot be used (`error`), or can but should be looked at (`warning`). */
export interface CellFault {
  meaning: Meaning;
  severity: 'error' | 'warning';
  message: string;
}

export interface CellContext {
  table: ScheduleTable;
  reading: TableReading;
  /** By `row:column`. */
  marks: ReadonlyMap<string, CellMark['kind']>;
  decimalMarks: Record<Meaning, DecimalMark>;
}

interface ReadCell {
  text: string;
  si: number | null;
  fault: Omit<CellFault, 'meaning'> | null;
}

const longest: Partial<Record<Meaning, number>> = { tag: 40, storey: 60, riser: 40, room: 200 };
const needed: Partial<Record<Meaning, string>> = {
  tag: 'The tag is missing.',
  storey: 'The storey is missing.',
  coilDrop: 'The coil drop is missing.',
};

const error = (message: string) => ({ severity: 'error' as const, message });

/** Reads one cell by its meaning; `corrected` is what a person typed in its place. */
export function readCell(index: number, meaning: Meaning, context: CellContext, corrected: string | undefined): ReadCell {
  const { column, unit, whenEmpty } = context.reading.columns[meaning];
  const inTable = column === null ? null : (context.table.rows[index]?.[column] ?? null);
  const mark = corrected === undefined && column !== null ? context.marks.get(`${index}:${column}`) : undefined;
  const own: TableCell = corrected === undefined ? inTable : oneLine(corrected);
  const isOwn = cellText(own) !== '';
  const text = isOwn ? cellText(own) : oneLine(whenEmpty);
  const answer = (si: number | null, fault: ReadCell['fault']): ReadCell => ({ text, si, fault });

  if (mark === 'formula-without-result')
    return answer(null, error('This formula was never calculated: open and save the workbook in a spreadsheet, or type the value here.'));
  if (text === '') return answer(null, needed[meaning] ? error(needed[meaning]) : null);
  const { quantity } = meaningOf[meaning];
  if (quantity === null) return answer(null, text.length > longest[meaning]! ? error(`Longer than ${longest[meaning]} characters.`) : null);
  if (mark === 'date') return answer(null, error(`${text} is a date: the spreadsheet may have made it of a figure. Type the figure.`));

  // A person corrects in the unit of the column, one cell at a time; the column's doubtful cells are read as its others show.
  const read = readFigure(quantity, isOwn ? own : text, unit!, context.decimalMarks[meaning]);
  if (!read.ok) return answer(null, error(read.message));
  const outside = outOfRange(meaning, read.si, unit!);
  if (outside) return answer(outside.severity === 'error' ? null : read.si, outside);
  if (mark === 'merged')
    return answer(read.si, {
      severity: 'warning',
      message: 'Merged cells: their one value was taken for each of their rows. Is it meant for each?',
    });
  if (read.ownUnit)
    return answer(read.si, { severity: 'warning', message: `In ${read.ownUnit}, as the cell says; the column is in ${unit}.` });
  return answer(read.si, null);
}

function outOfRange(meaning: Meaning, si: number, unit: string): ReadCell['fault'] {
  const { quantity, range, usual, name } = meaningOf[meaning];
  if (!quantity || !range) return null;
  if (quantity !== 'temperature' && si <= 0) return error(`${name} must be above 0.`);
  const shown = (value: number) => {
    const inUnit = unitsOf(quantity).includes(unit) ? unit : unitsOf(quantity)[0]!;
    return `${Number(toUnit(quantity, value, inUnit).toPrecision(3))} ${inUnit}`;
  };
  if (si < range.least || si > range.most)
    return error(
      `No terminal has that: ${name.toLowerCase()} is from ${shown(range.least)} to ${shown(range.most)}. Check the unit and the digits.`,
    );
  if (usual && (si < usual.least || si > usual.most))
    return { severity: 'warning', message: `Unusual: most are from ${shown(usual.least)} to ${shown(usual.most)}. Check the unit.` };
  return null;
}
