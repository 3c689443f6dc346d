import type { z } from 'zod';
import type { Quantity } from '@/lib/units/quantities';
import type { ValveOffer } from './schedule-valve-offer';

/** What a cell holds: stored units for quantities, a choice's key, text; null where there is nothing. */
export type CellValue = string | number | null;

/** Why a value cannot stand in a cell, in words. */
export interface Refusal {
  refused: string;
}

/** What a value is checked against besides the row itself. */
export interface ScheduleContext {
  valves: ValveOffer;
}

/** A row of the schedule: one piece or pipe of the drawing with what was solved for it. */
export interface RowOf<Item> {
  /** Of the piece or pipe on the drawing. */
  id: string;
  tag: string;
  item: Item;
}

/** How the foot of a column sums it up. */
export type Total = 'sum' | 'mean' | 'most' | 'least';

export type Option = [value: string, words: string];

interface Column<Row extends RowOf<unknown>> {
  key: string;
  head: string;
  read: (row: Row) => CellValue;
  /** The piece or pipe with the value in it, or why it takes none; absent where the column is computed. */
  write?: (item: Row['item'], value: CellValue, context: ScheduleContext) => Row['item'] | Refusal;
  total?: Total;
  /** Stands in cells that hold nothing, and is read as nothing when typed. */
  emptyWord?: (row: Row) => string;
  /** Hidden until it is asked for. */
  isExtra?: boolean;
  widthRem?: number;
}

export interface TextColumn<Row extends RowOf<unknown>> extends Column<Row> {
  kind: 'text';
  longest?: number;
}

export interface QuantityColumn<Row extends RowOf<unknown>> extends Column<Row> {
  kind: 'quantity';
  quantity: Quantity;
  /** The range that the drawing allows. */
  range?: z.ZodType;
}

/** A plain number: a ratio, a count, per cent. */
export interface NumberColumn<Row extends RowOf<unknown>> extends Column<Row> {
  kind: 'number';
  unit: string | null;
  decimals: number;
  range?: z.ZodType;
}

export interface ChoiceColumn<Row extends RowOf<unknown>> extends Column<Row> {
  kind: 'choice';
  options: (item: Row['item'], context: ScheduleContext) => readonly Option[];
}

export type ScheduleColumn<Row extends RowOf<unknown>> = TextColumn<Row> | QuantityColumn<Row> | NumberColumn<Row> | ChoiceColumn<Row>;

export interface ScheduleTable<Row extends RowOf<unknown>> {
  key: 'terminals' | 'pipes' | 'valves' | 'pumps' | 'sources';
  name: string;
  of: 'equipment' | 'pipes';
  columns: ScheduleColumn<Row>[];
}

export const isFigure = <Row extends RowOf<unknown>>({ kind }: ScheduleColumn<Row>): boolean => kind === 'quantity' || kind === 'number';

export const isRefusal = (written: unknown): written is Refusal => typeof written === 'object' && written !== null && 'refused' in written;

/** The usual columns of yes and no. */
export const yesOrNo: readonly Option[] = [
  ['yes', 'yes'],
  ['no', 'no'],
];
