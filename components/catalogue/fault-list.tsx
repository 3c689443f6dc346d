'use client';

import type { FigureColumn } from '@/lib/catalogue/figure-columns';
import type { CellFault } from '@/lib/catalogue/read-valve-rows';
import { Notice } from '../ui/notice';

const SHOWN = 8;

/** Every cell that stands in the way, by row and column. */
export function FaultList({ faults, columns }: { faults: readonly CellFault<string>[]; columns: readonly FigureColumn[] }) {
  if (faults.length === 0) return null;
  const nameOf = (key: string) => columns.find((column) => column.key === key)?.label ?? key;
  return (
    <Notice
      tone="high"
      title={
        faults.length === 1 ? 'One cell cannot be used; nothing is stored' : `${faults.length} cells cannot be used; nothing is stored`
      }
    >
      <ul className="mt-1 flex flex-col gap-0.5">
        {faults.slice(0, SHOWN).map(({ row, column, message }) => (
          <li key={`${row}:${column}:${message}`}>
            <strong className="text-ink font-semibold">
              Row {row + 1}, {nameOf(column)}:
            </strong>{' '}
            {message}
          </li>
        ))}
        {faults.length > SHOWN && <li>and {faults.length - SHOWN} more, marked in the table.</li>}
      </ul>
    </Notice>
  );
}
