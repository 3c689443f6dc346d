'use client';

import { X } from 'lucide-react';
import { useId, useRef, type ClipboardEvent, type KeyboardEvent } from 'react';
import { toast } from 'sonner';
import type { CellFault } from '@/lib/catalogue/read-valve-rows';
import { unitsOfColumn, type FigureColumn } from '@/lib/catalogue/figure-columns';
import { placeTable } from '@/lib/catalogue/place-table';
import { uploadedCells } from '@/lib/catalogue/uploaded-cells';
import { readDelimitedText } from '@/lib/network/schedule-import/delimited-text';
import { classNames } from '../ui/class-names';

/** A table as it is typed: the text of its cells, and the unit that each column's figures are in. */
export interface Grid {
  rows: string[][];
  units: Record<string, string>;
}

interface FigureGridProps {
  label: string;
  columns: readonly FigureColumn[];
  grid: Grid;
  faults: readonly CellFault<string>[];
  /** `isBlock`: pasted, so that it can be judged as a whole at once. */
  onChange: (grid: Grid, isBlock?: boolean) => void;
}

const isBlank = (row: readonly string[]) => row.every((cell) => cell.trim() === '');
const cellInput =
  'hover:bg-well focus:bg-well aria-[invalid=true]:text-high aria-[invalid=true]:border-high h-8 w-full border border-transparent bg-transparent px-2 aria-[invalid=true]:border-dashed aria-[invalid=true]:font-bold pointer-coarse:h-11';

/** Cells as in a spreadsheet: typed, moved through with Enter and the arrows, and pasted as a block, headings and all. */
export function FigureGrid({ label, columns, grid, faults, onChange }: FigureGridProps) {
  const id = useId();
  const table = useRef<HTMLTableElement>(null);
  const { rows, units } = grid;
  const faultAt = new Map(faults.map((fault) => [`${fault.row}:${fault.column}`, fault.message]));
  const shown = [...rows, columns.map(() => '')];

  const put = (next: string[][], isBlock = false) => {
    const end = next.findLastIndex((row) => !isBlank(row));
    onChange({ rows: next.slice(0, end + 1), units }, isBlock);
  };
  const set = (row: number, column: number, text: string) =>
    put(shown.map((cells, i) => (i === row ? cells.map((cell, j) => (j === column ? text : cell)) : cells)));

  const paste = (event: ClipboardEvent, row: number, column: number) => {
    const text = event.clipboardData.getData('text/plain');
    if (!/[\t\n;]/.test(text.trim())) return;
    event.preventDefault();
    const read = readDelimitedText(text);
    if (!read.ok) return void toast.error(read.message);
    const { cells } = uploadedCells(read.table);
    const before = grid;
    if (row === 0 && column === 0) {
      const placed = placeTable(cells, columns);
      if (!placed.ok) return void toast.error(placed.message);
      onChange({ rows: placed.rows, units: { ...units, ...placed.units } }, true);
    } else {
      const next = Array.from({ length: Math.max(rows.length, row + cells.length) }, (_, i) => [...(rows[i] ?? columns.map(() => ''))]);
      cells.forEach((block, i) => block.forEach((cell, j) => column + j < columns.length && (next[row + i]![column + j] = cell)));
      put(next, true);
    }
    toast(`${cells.length} rows pasted`, { action: { label: 'Undo', onClick: () => onChange(before) } });
  };

  const move = (event: KeyboardEvent, row: number, column: number) => {
    const step = { ArrowDown: 1, ArrowUp: -1, Enter: event.shiftKey ? -1 : 1 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    table.current?.querySelector<HTMLInputElement>(`[data-cell="${row + step}:${column}"]`)?.focus();
  };

  return (
    <div className="max-h-[32rem] overflow-auto rounded border" role="region" aria-label={label} tabIndex={0}>
      <table ref={table} className="w-full border-collapse text-sm">
        <caption className="sr-only">{label}</caption>
        <thead>
          <tr>
            <th className="bg-sheet sticky top-0 z-10 w-9 shadow-[inset_0_-1px_0_var(--ink)]">
              <span className="sr-only">Row</span>
            </th>
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={classNames(
                  'bg-sheet sticky top-0 z-10 min-w-20 px-2 py-1.5 align-bottom text-xs leading-tight font-semibold shadow-[inset_0_-1px_0_var(--ink)]',
                  column.quantity === 'words' ? 'text-left' : 'text-right',
                )}
              >
                {column.label}
                {!column.isRequired && <span className="text-quiet block font-normal">if known</span>}
                <UnitChoice
                  column={column}
                  unit={units[column.key] ?? ''}
                  onChoose={(unit) => onChange({ rows, units: { ...units, [column.key]: unit } })}
                />
              </th>
            ))}
            <th className="bg-sheet sticky top-0 z-10 w-8 shadow-[inset_0_-1px_0_var(--ink)]">
              <span className="sr-only">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.map((cells, row) => (
            <tr key={row} className="border-b last:border-b-0">
              <td className="text-quiet figures px-2 text-right text-xs">{row < rows.length ? row + 1 : ''}</td>
              {columns.map((column, index) => {
                const fault = faultAt.get(`${row}:${column.key}`);
                return (
                  <td key={column.key} className="border-l p-0">
                    <input
                      data-cell={`${row}:${index}`}
                      aria-label={`${column.label}, row ${row + 1}`}
                      aria-invalid={Boolean(fault)}
                      aria-describedby={fault ? `${id}-${row}-${column.key}` : undefined}
                      title={fault}
                      value={cells[index] ?? ''}
                      autoComplete="off"
                      maxLength={300}
                      onChange={(event) => set(row, index, event.target.value)}
                      onPaste={(event) => paste(event, row, index)}
                      onKeyDown={(event) => move(event, row, index)}
                      className={classNames(cellInput, column.quantity !== 'words' && 'figures text-right')}
                    />
                    {fault && (
                      <span id={`${id}-${row}-${column.key}`} className="sr-only">
                        {fault}
                      </span>
                    )}
                  </td>
                );
              })}
              <td className="border-l text-center">
                {row < rows.length && (
                  <button
                    type="button"
                    aria-label={`Remove row ${row + 1}`}
                    className="text-quiet hover:text-ink inline-flex size-7 items-center justify-center"
                    onClick={() => put(rows.filter((_, i) => i !== row))}
                  >
                    <X size={14} />
                  </button>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function UnitChoice({ column, unit, onChoose }: { column: FigureColumn; unit: string; onChoose: (unit: string) => void }) {
  const units = unitsOfColumn(column);
  if (units.length < 2) return <span className="text-quiet block font-normal">{units[0] ?? '\u00a0'}</span>;
  return (
    <select
      aria-label={`Unit of ${column.label.toLowerCase()}`}
      value={unit}
      onChange={(event) => onChoose(event.target.value)}
      className="bg-well mt-0.5 ml-auto block h-6 max-w-full rounded border px-1 text-xs font-normal pointer-coarse:h-9"
    >
      {units.map((each) => (
        <option key={each}>{each}</option>
      ))}
    </select>
  );
}
