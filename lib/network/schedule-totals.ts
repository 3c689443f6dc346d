import type { RowOf, ScheduleColumn } from './schedule-column';

/** What the foot of a column says of its rows, in the column's stored unit; null where no row has a figure. */
export function totalOf<Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, rows: readonly Row[]): number | null {
  if (!column.total) return null;
  const values: number[] = [];
  for (const row of rows) {
    const value = column.read(row);
    if (typeof value === 'number') values.push(value);
  }
  if (values.length === 0) return null;
  const sum = values.reduce((before, value) => before + value, 0);
  switch (column.total) {
    case 'sum':
      return sum;
    case 'mean':
      return sum / values.length;
    case 'most':
      return values.reduce((before, value) => Math.max(before, value));
    case 'least':
      return values.reduce((before, value) => Math.min(before, value));
  }
}
