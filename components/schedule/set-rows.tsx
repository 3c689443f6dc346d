'use client';

import { useId, useState } from 'react';
import type { RowOf, ScheduleContext } from '@/lib/network/schedule-column';
import { unitOfColumn } from '@/lib/network/schedule-entry';
import type { UnitChoice } from '@/lib/units/quantities';
import { Button } from '../ui/button';
import { inputClass } from '../ui/field';
import { classNames } from '../ui/class-names';
import type { TableView } from './use-table-view';

interface SetRowsProps<Row extends RowOf<unknown>> {
  rows: readonly Row[];
  view: TableView<Row>;
  units: UnitChoice;
  context: ScheduleContext;
  /** False where nothing was set. */
  onSet: (ids: readonly string[], key: string, text: string) => boolean;
  onClear: () => void;
}

/** Gives one column of all selected rows the same value. */
export function SetRows<Row extends RowOf<unknown>>({ rows, view, units, context, onSet, onClear }: SetRowsProps<Row>) {
  const settable = view.columns.filter(({ write, key }) => write && key !== 'tag');
  const [key, setKey] = useState<string | null>(null);
  const [text, setText] = useState('');
  const [columnId, valueId] = [useId(), useId()];
  const column = settable.find((it) => it.key === key) ?? settable.at(0);
  const options =
    column?.kind === 'choice'
      ? column.options((rows.find(({ item }) => column.options(item, context).length) ?? rows[0]).item, context)
      : [];
  return (
    <form
      aria-label="Selected rows"
      className="bg-well flex flex-wrap items-center gap-2 border-b px-3 py-1.5 text-sm print:hidden"
      onSubmit={(event) => {
        event.preventDefault();
        if (
          column &&
          onSet(
            rows.map(({ id }) => id),
            column.key,
            text,
          )
        )
          setText('');
      }}
    >
      <span className="font-semibold">
        {rows.length} {rows.length === 1 ? 'row' : 'rows'} selected
      </span>
      {column && (
        <>
          <span className="ml-3 flex items-center gap-1.5">
            <label htmlFor={columnId}>Set</label>
            <select
              id={columnId}
              className={classNames(inputClass, 'bg-sheet h-8 w-auto px-1.5 pointer-coarse:h-11')}
              value={column.key}
              onChange={(event) => {
                setKey(event.target.value);
                setText('');
              }}
            >
              {settable.map((it) => (
                <option key={it.key} value={it.key}>
                  {it.head}
                </option>
              ))}
            </select>
          </span>
          <span className="flex items-center gap-1.5">
            <label htmlFor={valueId}>to</label>
            {column.kind === 'choice' ? (
              <select
                id={valueId}
                className={classNames(inputClass, 'bg-sheet h-8 w-auto max-w-56 px-1.5 pointer-coarse:h-11')}
                value={text}
                onChange={(event) => setText(event.target.value)}
              >
                <option value="" disabled>
                  choose…
                </option>
                {options.map(([value, words]) => (
                  <option key={value} value={value}>
                    {words}
                  </option>
                ))}
              </select>
            ) : (
              <input
                id={valueId}
                className={classNames(inputClass, 'bg-sheet h-8 w-32 pointer-coarse:h-11', column.kind !== 'text' && 'figures text-right')}
                value={text}
                autoComplete="off"
                onChange={(event) => setText(event.target.value)}
              />
            )}
            <span className="text-quiet">{unitOfColumn(column, units)}</span>
          </span>
          <Button type="submit" size="small" disabled={column.kind === 'choice' && text === ''}>
            Set all
          </Button>
        </>
      )}
      <Button look="quiet" size="small" onClick={onClear}>
        Select none
      </Button>
    </form>
  );
}
