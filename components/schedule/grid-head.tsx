'use client';

import { isFigure, type RowOf } from '@/lib/network/schedule-column';
import { unitOfColumn } from '@/lib/network/schedule-entry';
import type { UnitChoice } from '@/lib/units/quantities';
import { classNames } from '../ui/class-names';
import { inputClass } from '../ui/field';
import type { TableView } from './use-table-view';

interface GridHeadProps<Row extends RowOf<unknown>> {
  view: TableView<Row>;
  units: UnitChoice;
  template: string;
  hasFilters: boolean;
  selection: { isAll: boolean; isSome: boolean; toggleAll: () => void };
}

/** Names, units and sorting of the columns, and below them the filters. */
export function GridHead<Row extends RowOf<unknown>>({ view, units, template, hasFilters, selection }: GridHeadProps<Row>) {
  return (
    <div role="rowgroup" className="bg-sheet sticky top-0 z-30 shadow-[inset_0_-1px_0_var(--ink)] print:static">
      <div role="row" aria-rowindex={1} className="grid" style={{ gridTemplateColumns: template }}>
        <div
          role="columnheader"
          className="bg-sheet sticky left-0 z-10 flex items-end justify-center pb-2 shadow-[inset_0_-1px_0_var(--ink)]"
        >
          <input
            type="checkbox"
            aria-label="Select all rows that are shown"
            className="accent-petrol size-4 pointer-coarse:size-5"
            checked={selection.isAll}
            ref={(box) => {
              if (box) box.indeterminate = selection.isSome && !selection.isAll;
            }}
            onChange={selection.toggleAll}
          />
        </div>
        {view.columns.map((column, index) => {
          const sorting = view.sorting?.id === column.key ? view.sorting : null;
          const unit = unitOfColumn(column, units);
          return (
            <div
              key={column.key}
              role="columnheader"
              aria-sort={sorting ? (sorting.desc ? 'descending' : 'ascending') : 'none'}
              className={classNames(
                'text-quiet flex flex-col justify-end px-2 py-1.5 text-xs leading-tight font-semibold',
                isFigure(column) ? 'items-end text-right' : 'items-start',
                index === 0 && 'bg-sheet sticky left-[2.4rem] z-10 shadow-[inset_0_-1px_0_var(--ink),inset_-1px_0_0_var(--rule)]',
              )}
            >
              <button
                type="button"
                className="hover:text-ink min-h-6 font-semibold text-[inherit] hover:underline"
                title={`Sort by ${column.head.toLowerCase()}`}
                onClick={() => view.sortBy(column.key)}
              >
                {column.head}
                <span aria-hidden className="text-brass">
                  {sorting && (sorting.desc ? ' ↓' : ' ↑')}
                </span>
              </button>
              {isFigure(column) && <span className="block min-h-3.5 font-normal">{unit}</span>}
            </div>
          );
        })}
      </div>
      {hasFilters && (
        <div role="row" aria-rowindex={2} className="grid pb-1.5" style={{ gridTemplateColumns: template }}>
          <div role="gridcell" className="bg-sheet sticky left-0 z-10" />
          {view.columns.map((column, index) => (
            <div key={column.key} role="gridcell" className={classNames('px-1', index === 0 && 'bg-sheet sticky left-[2.4rem] z-10')}>
              <input
                aria-label={`Filter ${column.head.toLowerCase()}`}
                placeholder={isFigure(column) ? '> 0' : 'holds'}
                className={classNames(inputClass, 'h-7 px-1.5 text-xs pointer-coarse:h-9', isFigure(column) && 'figures text-right')}
                value={view.filters[column.key] ?? ''}
                onChange={(event) => view.setFilter(column.key, event.target.value)}
              />
            </div>
          ))}
        </div>
      )}
    </div>
  );
}
