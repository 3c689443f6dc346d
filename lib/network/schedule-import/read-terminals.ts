import type { DrawingFluid } from '../drawing';
import type { ScheduledTerminal } from '../generate/scheduled-terminal';
import type { TableReading } from './guess-columns';
import { flowFromLoad } from './load-flow';
import { meaningOf, meanings, type Meaning } from './meanings';
import { readCell, type CellContext, type CellFault } from './read-cell';
import { decimalMarkOf } from './schedule-units';
import { cellText, type ScheduleTable } from './table';

/** One row of a schedule as it was read. */
export interface ReadRow {
  /** Within the table, from 0. */
  index: number;
  /** As the file numbers it, from 1. */
  number: number;
  /** What each cell says, with what was corrected. */
  texts: Record<Meaning, string>;
  faults: CellFault[];
  /** Why nothing is made of it: the person left it out, or it holds no terminal (a heading, an empty row). */
  leftOut: 'by-hand' | 'no-terminal' | null;
  /** Null where a fault stands in the way, or the row is left out. */
  terminal: ScheduledTerminal | null;
  /** True where the flow was worked out from load and temperatures. */
  isFlowFromLoad: boolean;
  /** °C, of the row where it has them, else of the loop. */
  supplyC: number;
  returnC: number;
}

/** What a person changed: texts by `cellKey`, and rows by index that they left out or brought back. */
export interface Corrections {
  texts: ReadonlyMap<string, string>;
  rows: ReadonlyMap<number, 'left-out' | 'brought-back'>;
}

export const noCorrections: Corrections = { texts: new Map(), rows: new Map() };
export const cellKey = (index: number, meaning: Meaning): string => `${index}:${meaning}`;

/**
 * Reads the rows of a schedule: SI quantities, each faulty cell with what is wrong in it, design flow from load and temperatures
 * where none is given (Q = P / (ρ c ΔT), see `designFlowOfLoad`). It reads what it is given and never throws for it.
 */
export function readTerminals(
  table: ScheduleTable,
  reading: TableReading,
  fluid: DrawingFluid,
  corrections: Corrections = noCorrections,
): ReadRow[] {
  const context = contextOf(table, reading);
  const tags = new Map<string, number>();
  const rows: ReadRow[] = [];
  for (let index = reading.firstRow; index < table.rows.length; index++) {
    const row = readRow(index, context, fluid, corrections);
    if (row) rows.push(row);
  }
  for (const row of rows) if (!row.leftOut) refuseSecondTag(row, tags);
  return rows;
}

function contextOf(table: ScheduleTable, reading: TableReading): CellContext {
  const marks = new Map(table.marks.map(({ row, column, kind }) => [`${row}:${column}`, kind]));
  const decimalMarks = Object.fromEntries(
    meanings.map((meaning) => {
      const { column } = reading.columns[meaning];
      const isFigure = column !== null && meaningOf[meaning].quantity !== null;
      return [meaning, isFigure ? decimalMarkOf(table.rows.slice(reading.firstRow).map((row) => row[column] ?? null)) : null];
    }),
  ) as CellContext['decimalMarks'];
  return { table, reading, marks, decimalMarks };
}

function readRow(index: number, context: CellContext, fluid: DrawingFluid, { texts: corrected, rows }: Corrections): ReadRow | null {
  const faults: CellFault[] = [];
  const texts = {} as Record<Meaning, string>;
  const si = {} as Record<Meaning, number | null>;
  for (const meaning of meanings) {
    const read = readCell(index, meaning, context, corrected.get(cellKey(index, meaning)));
    texts[meaning] = read.text;
    si[meaning] = read.si;
    if (read.fault) faults.push({ meaning, ...read.fault });
  }
  const said = textsIn(index, context);
  if (said.size === 0) return null;

  const byHand = rows.get(index);
  const leftOut = byHand === 'left-out' ? 'by-hand' : said.size <= 1 && byHand !== 'brought-back' ? 'no-terminal' : null;
  const supplyC = si.supply ?? fluid.supplyC;
  const returnC = si.return ?? fluid.returnC;
  const row: ReadRow = {
    index,
    number: context.table.firstRow + index,
    texts,
    faults: leftOut ? [] : faults,
    leftOut,
    terminal: null,
    isFlowFromLoad: false,
    supplyC,
    returnC,
  };
  if (leftOut) return row;

  const flow = flowFromLoad(si.load, si.flow, { ...fluid, supplyC, returnC }, faults);
  row.isFlowFromLoad = flow !== null && si.flow === null;
  if (faults.some(({ severity }) => severity === 'error') || flow === null || si.coilDrop === null) return row;
  row.terminal = {
    tag: texts.tag,
    storey: texts.storey,
    riser: texts.riser,
    room: texts.room,
    loadKw: si.load,
    designFlowLs: flow,
    coilDropKpa: si.coilDrop,
  };
  return row;
}

/** What a row says, each text once: a heading may be merged over all columns and so stand in each of them. */
function textsIn(index: number, { table, marks }: CellContext): Set<string> {
  const said = new Set<string>();
  table.rows[index]!.forEach((cell, column) => {
    const text = marks.get(`${index}:${column}`) === 'formula-without-result' ? `formula ${column}` : cellText(cell);
    if (text !== '') said.add(text);
  });
  return said;
}

/** Two stations of one name could not be told apart on site; the first keeps its tag. */
function refuseSecondTag(row: ReadRow, tags: Map<string, number>): void {
  const tag = row.texts.tag.toLowerCase();
  if (tag === '') return;
  const first = tags.get(tag);
  if (first === undefined) {
    tags.set(tag, row.number);
    return;
  }
  row.faults.push({ meaning: 'tag', severity: 'error', message: `${row.texts.tag} is already the tag of row ${first}.` });
  row.terminal = null;
}
