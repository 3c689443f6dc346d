'use client';

import { Plus, X } from 'lucide-react';
import { useState, type ClipboardEvent } from 'react';
import { toast } from 'sonner';
import { QuantityField } from '@/components/ui/quantity-field';
import { inputClass } from '@/components/ui/field';
import { classNames } from '@/components/ui/class-names';
import { unitFor, type Quantity } from '@/lib/units/quantities';
import { same } from '@/lib/network/merge-drawings';
import { useUnitChoice } from '../../shell/units-context';
import { pastedPoints, type PointColumn } from './pasted-points';

type Row = Record<string, number | null>;

interface PointTableProps {
  label: string;
  columns: { key: string; label: string; quantity: Quantity | null }[];
  points: Record<string, number>[];
  /** Gets the points once every cell of them is filled. */
  onCommit: (points: Record<string, number>[]) => void;
  disabled: boolean;
}

/** A small table of figures, typed or pasted from a spreadsheet. */
export function PointTable({ label, columns, points, onCommit, disabled }: PointTableProps) {
  const choice = useUnitChoice();
  const [rows, setRows] = useState<Row[]>(points);
  const [shown, setShown] = useState(points);
  if (!same(shown, points)) {
    setShown(points);
    setRows(points);
  }
  const units: PointColumn[] = columns.map((column) => ({ ...column, unit: column.quantity ? unitFor(column.quantity, choice) : '' }));
  const take = (next: Row[]) => {
    setRows(next);
    const isWhole = next.every((row) => columns.every(({ key }) => row[key] !== null && Number.isFinite(row[key])));
    if (isWhole && !same(next, points)) onCommit(next as Record<string, number>[]);
  };
  const paste = (event: ClipboardEvent) => {
    const pasted = pastedPoints(event.clipboardData.getData('text/plain'), units);
    if (!pasted) return;
    event.preventDefault();
    take(pasted);
    toast(`${pasted.length} points pasted`);
  };
  const set = (index: number, key: string, value: number | null) =>
    setRows(rows.map((row, i) => (i === index ? { ...row, [key]: value } : row)));

  return (
    <div onPaste={disabled ? undefined : paste} onBlur={() => take(rows)}>
      {rows.length > 0 && (
        <table className="w-full text-sm">
          <caption className="sr-only">{label}</caption>
          <thead>
            <tr>
              {units.map(({ key, label: head, unit }) => (
                <th key={key} className="px-1 py-1 text-right text-xs font-semibold">
                  {head} <span className="text-quiet font-normal">{unit}</span>
                </th>
              ))}
              <th className="w-8">
                <span className="sr-only">Remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, index) => (
              <tr key={index}>
                {columns.map(({ key, label: head, quantity }) => (
                  <td key={key} className="p-0.5">
                    <Cell
                      label={`${head}, point ${index + 1}`}
                      quantity={quantity}
                      value={row[key]}
                      disabled={disabled}
                      onChange={(value) => set(index, key, value)}
                    />
                  </td>
                ))}
                <td>
                  {!disabled && (
                    <button
                      type="button"
                      aria-label={`Remove point ${index + 1}`}
                      className="text-quiet hover:text-ink p-1.5"
                      onClick={() => take(rows.filter((_, i) => i !== index))}
                    >
                      <X size={14} />
                    </button>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {!disabled && (
        <div className="flex items-center gap-3 py-1.5 text-sm">
          <button
            type="button"
            className="text-petrol inline-flex min-h-8 items-center gap-1 font-semibold"
            onClick={() => setRows([...rows, Object.fromEntries(columns.map(({ key }) => [key, null]))])}
          >
            <Plus size={14} aria-hidden /> Add point
          </button>
          <textarea
            aria-label={`Paste ${label.toLowerCase()} from a spreadsheet`}
            placeholder="or paste rows here"
            rows={1}
            value=""
            onChange={() => undefined}
            className={classNames(inputClass, 'h-8 flex-1 resize-none py-1')}
          />
        </div>
      )}
    </div>
  );
}

interface CellProps {
  label: string;
  quantity: Quantity | null;
  value: number | null;
  onChange: (value: number | null) => void;
  disabled: boolean;
}

function Cell({ label, quantity, value, onChange, disabled }: CellProps) {
  if (quantity) {
    return (
      <QuantityField
        label={label}
        isLabelHidden
        quantity={quantity}
        value={value}
        onChange={onChange}
        disabled={disabled}
        className="[&_input]:h-8 [&_input]:pr-2.5 [&_input~span]:hidden"
      />
    );
  }
  return (
    <input
      aria-label={label}
      type="number"
      step="any"
      disabled={disabled}
      value={value ?? ''}
      onChange={(event) => onChange(event.target.value === '' ? null : Number(event.target.value))}
      className={classNames(inputClass, 'figures h-8 text-right')}
    />
  );
}
