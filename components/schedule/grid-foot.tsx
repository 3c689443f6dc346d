'use client';

import { formatQuantity } from '@/lib/units/format-quantity';
import { unitFor, type UnitChoice } from '@/lib/units/quantities';
import { isFigure, type RowOf, type ScheduleColumn, type Total } from '@/lib/network/schedule-column';
import { totalOf } from '@/lib/network/schedule-totals';
import { classNames } from '../ui/class-names';

const totalWords: Record<Total, string> = { sum: 'sum', mean: 'mean', most: 'most', least: 'least' };

interface GridFootProps<Row extends RowOf<unknown>> {
  rows: readonly Row[];
  /** Of how many, where a filter leaves some out. */
  count: number;
  columns: readonly ScheduleColumn<Row>[];
  units: UnitChoice;
  template: string;
  ariaRow: number;
}

/** What the rows that are shown come to. */
export function GridFoot<Row extends RowOf<unknown>>({ rows, count, columns, units, template, ariaRow }: GridFootProps<Row>) {
  return (
    <div role="rowgroup" className="bg-sheet sticky bottom-0 z-20 mt-auto shadow-[inset_0_1px_0_var(--ink)] print:static">
      <div role="row" aria-rowindex={ariaRow} className="grid min-h-9 text-sm" style={{ gridTemplateColumns: template }}>
        <div role="gridcell" className="bg-sheet sticky left-0 z-10 shadow-[inset_0_1px_0_var(--ink)]" />
        {columns.map((column, index) => (
          <div
            key={column.key}
            role="gridcell"
            className={classNames(
              'flex items-center px-2 py-1 font-semibold',
              isFigure(column) && 'flex-col items-end! justify-center leading-tight',
              index === 0 && 'bg-sheet sticky left-[2.4rem] z-10 shadow-[inset_0_1px_0_var(--ink),inset_-1px_0_0_var(--rule)]',
            )}
          >
            {index === 0 ? (
              <span>{rows.length === count ? `${count} ${count === 1 ? 'row' : 'rows'}` : `${rows.length} of ${count}`}</span>
            ) : (
              <FootFigure column={column} value={totalOf(column, rows)} units={units} />
            )}
          </div>
        ))}
      </div>
    </div>
  );
}

function FootFigure<Row extends RowOf<unknown>>({
  column,
  value,
  units,
}: {
  column: ScheduleColumn<Row>;
  value: number | null;
  units: UnitChoice;
}) {
  if (value === null || !column.total) return null;
  const text =
    column.kind === 'quantity'
      ? formatQuantity(column.quantity, value, unitFor(column.quantity, units))
      : value.toFixed(column.kind === 'number' ? column.decimals : 0);
  return (
    <>
      <span className="text-quiet font-sans text-[0.68rem] font-normal">{totalWords[column.total]}</span>
      <span className="figures">{text}</span>
    </>
  );
}
