import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';

export const rowFilters = ['all', 'faulty', 'to-check', 'left-out'] as const;
export type RowFilter = (typeof rowFilters)[number];

export const filterWords: Record<RowFilter, string> = { all: 'All', faulty: 'Faulty', 'to-check': 'To check', 'left-out': 'Left out' };

export const isFaulty = (row: ReadRow): boolean => row.leftOut === null && row.terminal === null;
const isToCheck = (row: ReadRow): boolean => row.leftOut === null && row.faults.some(({ severity }) => severity === 'warning');

const belongs: Record<RowFilter, (row: ReadRow) => boolean> = {
  all: () => true,
  faulty: isFaulty,
  'to-check': isToCheck,
  'left-out': ({ leftOut }) => leftOut !== null,
};

export const countOf = (rows: readonly ReadRow[], filter: RowFilter): number => rows.filter(belongs[filter]).length;

/** The rows of a filter. Those that were touched since stay, so that a row does not vanish under the hand that puts it right. */
export const filtered = (rows: readonly ReadRow[], filter: RowFilter, touched: ReadonlySet<number>): ReadRow[] =>
  rows.filter((row) => belongs[filter](row) || (filter === 'faulty' && touched.has(row.index)));
