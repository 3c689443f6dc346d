'use client';

import { useState } from 'react';
import { toast } from 'sonner';
import type { RowOf, ScheduleTable } from '@/lib/network/schedule-column';
import { isFigure } from '@/lib/network/schedule-column';
import { blockText, fillDownEdits, parseBlock, pasteEdits } from '@/lib/network/schedule-block';
import type { CellEdit, CellFault } from '@/lib/network/schedule-edits';
import { typedWords } from '@/lib/network/schedule-entry';
import type { UnitChoice } from '@/lib/units/quantities';
import type { ScheduleDesk } from './desk';
import type { CellPlace, Cells } from './use-cells';
import type { TableView } from './use-table-view';

/** A cell being typed into; what was refused stays in it until it is put right or left with Escape. */
export interface OpenEntry extends CellPlace {
  /** What it began with. */
  text: string;
  /** Replaces the cell rather than going on from it. */
  isFresh: boolean;
  message: string | null;
}

interface Refused {
  title: string;
  faults: CellFault[];
}

interface EditOptions<Row extends RowOf<unknown>> {
  table: ScheduleTable<Row>;
  view: TableView<Row>;
  cells: Cells;
  desk: ScheduleDesk;
  units: UnitChoice;
}

/** Typing, pasting and filling: each one step of the history, each all or nothing. */
export function useGridEdits<Row extends RowOf<unknown>>({ table, view, cells, desk, units }: EditOptions<Row>) {
  const { edit, context } = desk;
  const [entry, setEntry] = useState<OpenEntry | null>(null);
  const [refused, setRefused] = useState<Refused | null>(null);
  const rowOf = (id: string) => view.rows.find((row) => row.id === id);
  const columnOf = (key: string) => view.columns.find((column) => column.key === key);

  const begin = (place: CellPlace | null, typed?: string) => {
    const [column, row] = place ? [columnOf(place.key), rowOf(place.id)] : [];
    if (!edit || !place || !column || !row) return;
    const open = entry?.message ? document.querySelector<HTMLElement>('[data-cell-entry]') : null;
    if (open) {
      // What was refused is put right or left first; it is not thrown away.
      open.focus();
      return;
    }
    if (!column.write) {
      toast(`${column.head} is not typed here: it follows from the drawing.`);
      return;
    }
    if (column.kind === 'choice' && column.options(row.item, context).length === 0) {
      toast(`There is nothing to choose for ${column.head.toLowerCase()} of ${row.tag}.`);
      return;
    }
    setEntry({ ...place, text: typed ?? typedWords(column, row, units, context), isFresh: typed !== undefined, message: null });
  };

  /** Takes what was typed; false where it is refused, and the cell stays open. */
  const commit = (text: string): boolean => {
    if (!entry || !edit) return true;
    const [column, row] = [columnOf(entry.key), rowOf(entry.id)];
    if (column && row && text === typedWords(column, row, units, context)) {
      setEntry(null);
      return true;
    }
    const [fault] = edit.apply(table, [{ id: entry.id, key: entry.key, text }]);
    setEntry(fault ? { ...entry, message: fault.message } : null);
    return !fault;
  };

  const applyAll = (edits: readonly CellEdit[], what: string, done: string) => {
    if (!edit || edits.length === 0) return false;
    const faults = edit.apply(table, edits);
    const cellsOf = (count: number) => `${count} ${count === 1 ? 'cell' : 'cells'}`;
    if (faults.length) {
      const takes = faults.length === 1 ? 'one cell cannot take' : `${cellsOf(faults.length)} cannot take`;
      setRefused({ title: `Nothing was ${what}: ${takes} what was given.`, faults });
    } else {
      setRefused(null);
      toast(`${done} ${cellsOf(edits.length)}. Ctrl Z takes it back.`);
    }
    return faults.length === 0;
  };

  const copy = (event: ClipboardEvent) => {
    if (!cells.range) return;
    event.preventDefault();
    const { top, bottom, left, right } = cells.range;
    const block = view.rows
      .slice(top, bottom + 1)
      .map((row) =>
        view.columns
          .slice(left, right + 1)
          .map((column) => ({ text: typedWords(column, row, units, context), isFigure: isFigure(column) })),
      );
    event.clipboardData?.setData('text/plain', blockText(block));
  };

  const paste = (event: ClipboardEvent) => {
    if (!cells.range || !edit) return;
    event.preventDefault();
    const pasted = pasteEdits(parseBlock(event.clipboardData?.getData('text/plain') ?? ''), cells.range, cells);
    if (pasted.ok) applyAll(pasted.edits, 'pasted', 'Pasted');
    else setRefused({ title: `Nothing was pasted. ${pasted.message}`, faults: [] });
  };

  const fillDown = () => {
    if (!cells.range || cells.range.top === cells.range.bottom) return;
    const edits = fillDownEdits(cells.range, cells, (id, key) => columnOf(key)!.read(rowOf(id)!));
    applyAll(edits, 'filled', 'Filled');
  };

  const clear = () => {
    if (!cells.range || !edit) return;
    const { top, bottom, left, right } = cells.range;
    const edits = cells.rowIds
      .slice(top, bottom + 1)
      .flatMap((id) => cells.keys.slice(left, right + 1).map((key) => ({ id, key, text: '' })));
    applyAll(edits, 'cleared', 'Cleared');
  };

  const setRows = (ids: readonly string[], key: string, text: string) =>
    applyAll(
      ids.map((id) => ({ id, key, text })),
      'set',
      'Set',
    );

  return {
    entry,
    begin,
    commit,
    leave: () => setEntry(null),
    copy,
    paste,
    fillDown,
    clear,
    setRows,
    refused,
    dismiss: () => setRefused(null),
  };
}

export type GridEdits = ReturnType<typeof useGridEdits>;
