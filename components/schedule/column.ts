import type { ReactNode } from 'react';

export interface ScheduleColumn<Row> {
  key: string;
  head: string;
  unit?: ReactNode;
  isFigure?: boolean;
  /** What the column is sorted by; what is missing comes last either way. */
  sortBy: (row: Row) => string | number | null;
  show: (row: Row) => ReactNode;
}
