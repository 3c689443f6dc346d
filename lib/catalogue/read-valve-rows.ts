import type { KvPoint } from '@/lib/network/drawing';
import { readFigure, valveColumns, type ValveCell } from './figure-columns';
import { faultsOfValvePoints } from './valve-points';

/** A cell that cannot be used: its row, counted from 0 as the table shows them, and why. */
export interface CellFault<Key extends string> {
  row: number;
  column: Key;
  message: string;
}

interface ReadSize {
  nominal: string;
  stepTurns: number | null;
  points: KvPoint[];
}

interface Line {
  row: number;
  nominal: string;
  figures: Partial<Record<ValveCell, number>>;
  isWhole: boolean;
}

const MOST_SIZES = 40;
const LONGEST_SIZE = 20;

/**
 * The sizes of a valve family from the rows of its table, and every cell that stands in the way. An empty size goes on with the one above;
 * a measuring Kv in the first row of a size alone is that of a fixed orifice and holds at all its settings.
 */
export function readValveRows(
  rows: readonly (readonly string[])[],
  units: Record<string, string>,
): { sizes: ReadSize[]; faults: CellFault<ValveCell>[] } {
  const faults: CellFault<ValveCell>[] = [];
  const bySize = new Map<string, Line[]>();
  let nominal = '';
  rows.forEach((cells, row) => {
    if (cells.every((cell) => cell.trim() === '')) return;
    nominal = cells[0]?.trim() || nominal;
    if (!nominal) faults.push({ row, column: 'nominal', message: 'Which size is this? For example DN25.' });
    else if (nominal.length > LONGEST_SIZE)
      faults.push({ row, column: 'nominal', message: `A size has up to ${LONGEST_SIZE} characters.` });
    const line = readLine(cells, row, nominal, units);
    faults.push(...line.faults);
    bySize.set(nominal, [...(bySize.get(nominal) ?? []), line]);
  });
  if (bySize.size === 0) faults.push({ row: 0, column: 'setting', message: 'The table is empty.' });
  if (bySize.size > MOST_SIZES)
    faults.push({ row: [...bySize.values()][MOST_SIZES]![0]!.row, column: 'nominal', message: `A family has up to ${MOST_SIZES} sizes.` });
  const sizes = [...bySize].map(([name, lines]) => {
    const size = sizeOf(name, lines);
    faults.push(...size.faults);
    return { nominal: name, stepTurns: size.stepTurns, points: size.points };
  });
  return { sizes, faults: faults.sort((a, b) => a.row - b.row) };
}

function readLine(
  cells: readonly string[],
  row: number,
  nominal: string,
  units: Record<string, string>,
): Line & { faults: CellFault<ValveCell>[] } {
  const faults: CellFault<ValveCell>[] = [];
  const figures: Partial<Record<ValveCell, number>> = {};
  valveColumns.forEach((column, index) => {
    const text = cells[index]?.trim() ?? '';
    if (column.quantity === 'words') return;
    if (text === '') {
      if (column.isRequired) faults.push({ row, column: column.key, message: `${column.label} is missing.` });
      return;
    }
    const read = readFigure(column, text, units[column.key] ?? '');
    if (read.ok) figures[column.key] = read.value;
    else faults.push({ row, column: column.key, message: read.message });
  });
  return { row, nominal, figures, isWhole: faults.length === 0, faults };
}

function sizeOf(nominal: string, lines: Line[]): Omit<ReadSize, 'nominal'> & { faults: CellFault<ValveCell>[] } {
  const whole = lines.filter(({ isWhole }) => isWhole);
  const fixed = whole.slice(1).every(({ figures }) => figures.measuringKv === undefined) ? whole[0]?.figures.measuringKv : undefined;
  const sorted = whole.toSorted((a, b) => a.figures.setting! - b.figures.setting!);
  const points = sorted.map(({ figures: { setting, kv, measuringKv = fixed } }) => ({
    setting: setting!,
    kv: kv!,
    ...(measuringKv === undefined ? {} : { measuringKv }),
  }));
  // With a line missing, "two settings or more" would be said of a table that has them.
  const judged = whole.length < lines.length ? [] : faultsOfValvePoints(points);
  const faults: CellFault<ValveCell>[] = judged.map(({ index, column, message }) => ({
    row: sorted[index]!.row,
    column,
    message: `${nominal}: ${message}`,
  }));
  const steps = lines.filter(({ figures }) => figures.step !== undefined);
  const stepTurns = steps[0]?.figures.step ?? null;
  if (stepTurns !== null && !(stepTurns > 0 && stepTurns <= 100))
    faults.push({ row: steps[0]!.row, column: 'step', message: 'A step is above 0, up to 100 turns.' });
  const other = steps.find(({ figures }) => figures.step !== stepTurns);
  if (other) faults.push({ row: other.row, column: 'step', message: `${nominal} has one step, given above as ${stepTurns}.` });
  return { stepTurns, points, faults };
}
