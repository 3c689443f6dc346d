'use client';

import { ChevronDown, ChevronUp, Columns3 } from 'lucide-react';
import { Popover } from 'radix-ui';
import type { ReactNode } from 'react';
import type { RowOf } from '@/lib/network/schedule-column';
import { buttonClass } from '../ui/button';
import type { TableView } from './use-table-view';

/** Which columns are shown, and in what order; this browser remembers it. */
export function ColumnsMenu<Row extends RowOf<unknown>>({ view }: { view: TableView<Row> }) {
  const movable = view.allColumns.filter(({ key }) => key !== 'tag');
  return (
    <Popover.Root>
      <Popover.Trigger className={buttonClass('secondary', 'small')}>
        <Columns3 size={15} aria-hidden /> Columns
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          align="end"
          sideOffset={4}
          collisionPadding={8}
          aria-label="Columns"
          className="bg-sheet text-ink z-50 flex max-h-[75dvh] w-72 flex-col rounded border p-1 shadow-lg"
        >
          <ul className="min-h-0 overflow-y-auto">
            {movable.map((column, index) => (
              <li key={column.key} className="hover:bg-well flex items-center gap-1 rounded pl-2">
                <label className="flex min-h-8 flex-1 items-center gap-2 text-sm pointer-coarse:min-h-11">
                  <input
                    type="checkbox"
                    className="accent-petrol size-4"
                    checked={!view.hidden.includes(column.key)}
                    onChange={(event) => view.showColumn(column.key, event.target.checked)}
                  />
                  {column.head}
                </label>
                <Move label={`Move ${column.head} earlier`} isOff={index === 0} onPress={() => view.moveColumn(column.key, -1)}>
                  <ChevronUp size={15} aria-hidden />
                </Move>
                <Move
                  label={`Move ${column.head} later`}
                  isOff={index === movable.length - 1}
                  onPress={() => view.moveColumn(column.key, 1)}
                >
                  <ChevronDown size={15} aria-hidden />
                </Move>
              </li>
            ))}
          </ul>
          <button
            type="button"
            disabled={view.isUsual}
            onClick={view.usualColumns}
            className="text-petrol mt-1 min-h-9 border-t px-2 text-left text-sm font-semibold hover:underline disabled:opacity-50"
          >
            Back to the usual columns
          </button>
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function Move({ label, isOff, onPress, children }: { label: string; isOff: boolean; onPress: () => void; children: ReactNode }) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      disabled={isOff}
      onClick={onPress}
      className="text-quiet hover:text-ink inline-flex size-7 items-center justify-center rounded disabled:opacity-30 pointer-coarse:size-10"
    >
      {children}
    </button>
  );
}
