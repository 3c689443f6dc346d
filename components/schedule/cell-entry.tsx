'use client';

import { useEffect, useId, useRef, type KeyboardEvent } from 'react';
import type { RowOf, ScheduleColumn, ScheduleContext } from '@/lib/network/schedule-column';
import { isFigure } from '@/lib/network/schedule-column';
import { classNames } from '../ui/class-names';
import type { OpenEntry } from './use-grid-edits';

interface CellEntryProps<Row extends RowOf<unknown>> {
  entry: OpenEntry;
  column: ScheduleColumn<Row>;
  row: Row;
  context: ScheduleContext;
  commit: (text: string) => boolean;
  leave: () => void;
  /** After a taken value: where the key pointed, or the cell itself. */
  onDone: (rowsDown: number, columnsRight: number) => void;
}

const field = 'absolute inset-0 z-20 w-full bg-sheet px-2 text-ink outline-2 -outline-offset-2 outline-brass';

/** The field in a cell. What is refused stays as it was typed, with the reason below it. */
export function CellEntry<Row extends RowOf<unknown>>(props: CellEntryProps<Row>) {
  const { entry, column, row, context, commit, leave, onDone } = props;
  const messageId = useId();
  const input = useRef<HTMLInputElement>(null);
  const select = useRef<HTMLSelectElement>(null);
  // A key or a press closes the field, and then its blur has nothing left to take.
  const isDone = useRef(false);
  useEffect(() => {
    const own = input.current ?? select.current;
    own?.focus({ preventScroll: true });
    if (entry.isFresh) input.current?.setSelectionRange(entry.text.length, entry.text.length);
    else input.current?.select();
    if (select.current) openChoices(select.current);
  }, [entry.isFresh, entry.text]);

  const take = (text: string, rowsDown: number, columnsRight: number) => {
    isDone.current = commit(text);
    if (isDone.current) onDone(rowsDown, columnsRight);
  };
  const press = (event: KeyboardEvent<HTMLInputElement | HTMLSelectElement>) => {
    event.stopPropagation();
    if (event.key === 'Escape') {
      isDone.current = true;
      leave();
      onDone(0, 0);
    } else if (event.key === 'Enter' && column.kind !== 'choice') {
      take(event.currentTarget.value, event.shiftKey ? -1 : 1, 0);
    } else if (event.key === 'Tab') {
      event.preventDefault();
      const columnsRight = event.shiftKey ? -1 : 1;
      if (column.kind !== 'choice') return take(event.currentTarget.value, 0, columnsRight);
      // A choice was taken when it was made.
      isDone.current = true;
      leave();
      onDone(0, columnsRight);
    }
  };
  const shared = {
    'data-cell-entry': true,
    'aria-label': `${column.head} of ${row.tag}`,
    'aria-invalid': entry.message !== null,
    'aria-describedby': entry.message ? messageId : undefined,
    onKeyDown: press,
  };
  return (
    <>
      {column.kind === 'choice' ? (
        <select
          ref={select}
          className={classNames(field, 'px-1')}
          defaultValue={String(column.read(row) ?? '')}
          onChange={(event) => take(event.target.value, 0, 0)}
          onBlur={() => !isDone.current && leave()}
          {...shared}
        >
          {column.read(row) === null && <option value="">choose…</option>}
          {column.options(row.item, context).map(([value, words]) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </select>
      ) : (
        <input
          ref={input}
          className={classNames(field, isFigure(column) && 'figures text-right', entry.message !== null && 'outline-high')}
          defaultValue={entry.text}
          autoComplete="off"
          inputMode={isFigure(column) ? 'decimal' : 'text'}
          onBlur={(event) => !isDone.current && commit(event.target.value)}
          {...shared}
        />
      )}
      {entry.message && (
        <p
          id={messageId}
          role="alert"
          className={classNames(
            'bg-sheet border-high text-high absolute top-full z-30 mt-0.5 w-max max-w-64 rounded border px-2 py-1 text-left font-sans text-xs whitespace-normal shadow-lg',
            isFigure(column) ? 'right-0' : 'left-0',
          )}
        >
          ▴ {entry.message}
        </p>
      )}
    </>
  );
}

/** Shows the choices at once, where the browser lets a page do so. */
function openChoices(select: HTMLSelectElement): void {
  try {
    select.showPicker();
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
}
