'use client';

import { useVirtualizer } from '@tanstack/react-virtual';
import { useRef } from 'react';
import { meaningOf, type Meaning } from '@/lib/network/schedule-import/meanings';
import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';
import type { TableReading } from '@/lib/network/schedule-import/guess-columns';
import { UnitName } from '../ui/figure';
import { RowLine } from './row-line';

interface RowTableProps {
  rows: readonly ReadRow[];
  reading: TableReading;
  onCorrect: (index: number, meaning: Meaning, text: string) => void;
  onLeaveOut: (index: number, how: 'left-out' | 'brought-back') => void;
  onShowWorking: (row: ReadRow) => void;
}

const widths: Record<Meaning, string> = {
  tag: 'minmax(7rem,1fr)',
  storey: 'minmax(6.5rem,1fr)',
  riser: 'minmax(3.5rem,0.5fr)',
  room: 'minmax(8rem,2fr)',
  load: 'minmax(4.5rem,0.7fr)',
  flow: 'minmax(5rem,0.7fr)',
  coilDrop: 'minmax(4.5rem,0.7fr)',
  supply: 'minmax(4.5rem,0.7fr)',
  return: 'minmax(4.5rem,0.7fr)',
};
const always: readonly Meaning[] = ['tag', 'storey', 'flow', 'coilDrop'];
/** Shorter than the page's heads, which stand above ten columns. */
const heads: Partial<Record<Meaning, string>> = { flow: 'Flow', supply: 'Supply', return: 'Return' };

/** The rows of a schedule; only those in view are on the page, so that five thousand are as quick as fifty. */
export function RowTable({ rows, reading, onCorrect, onLeaveOut, onShowWorking }: RowTableProps) {
  const frame = useRef<HTMLDivElement>(null);
  const shown = (Object.keys(widths) as Meaning[]).filter((meaning) => {
    const { column, whenEmpty } = reading.columns[meaning];
    return always.includes(meaning) || column !== null || whenEmpty !== '';
  });
  const columns = ['2.5rem', ...shown.map((meaning) => widths[meaning]), 'minmax(5rem,0.7fr)', 'var(--action)'].join(' ');
  const lines = useVirtualizer({
    count: rows.length,
    getScrollElement: () => frame.current,
    estimateSize: (position) => 46 + 22 * (rows[position]?.faults.length ?? 0),
    getItemKey: (position) => rows[position]!.index,
    overscan: 8,
  });

  return (
    <div
      ref={frame}
      role="region"
      aria-label="Rows of the schedule"
      tabIndex={0}
      className="max-h-[min(36rem,70dvh)] overflow-auto border-y [--action:2.75rem] lg:[--action:6.5rem]"
    >
      <div role="table" aria-label="Schedule" aria-rowcount={rows.length + 1} style={{ minWidth: `${shown.length * 5.6 + 13}rem` }}>
        <div
          role="row"
          aria-rowindex={1}
          className="bg-sheet text-quiet border-b-ink sticky top-0 z-10 grid items-end gap-x-1 border-b px-3 py-1.5 text-xs font-semibold"
          style={{ gridTemplateColumns: columns }}
        >
          <span role="columnheader" className="text-right">
            Row
          </span>
          {shown.map((meaning) => {
            const { unit } = reading.columns[meaning];
            return (
              <span role="columnheader" key={meaning} className={`px-1.5 leading-tight ${unit ? 'text-right' : ''}`}>
                {heads[meaning] ?? meaningOf[meaning].name}
                {unit && <span className="block font-normal">{unit}</span>}
              </span>
            );
          })}
          <span role="columnheader" className="pr-1.5 text-right leading-tight">
            Design flow
            <span className="block font-normal">
              <UnitName quantity="flow" />
            </span>
          </span>
          <span role="columnheader" className="sr-only">
            Leave out or bring back
          </span>
        </div>
        <div role="rowgroup" className="relative" style={{ height: lines.getTotalSize() }}>
          {lines.getVirtualItems().map(({ index: position, key, start }) => {
            const row = rows[position]!;
            return (
              <div
                key={key}
                ref={lines.measureElement}
                data-index={position}
                role="row"
                aria-rowindex={position + 2}
                className="absolute inset-x-0 top-0"
                style={{ transform: `translateY(${start}px)` }}
              >
                <RowLine
                  row={row}
                  position={position}
                  shown={shown}
                  columns={columns}
                  onCorrect={(meaning, text) => onCorrect(row.index, meaning, text)}
                  onLeaveOut={(how) => onLeaveOut(row.index, how)}
                  onShowWorking={() => onShowWorking(row)}
                />
              </div>
            );
          })}
        </div>
      </div>
    </div>
  );
}
