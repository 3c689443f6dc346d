'use client';

import { useMemo, useState } from 'react';
import type { RowOf, ScheduleColumn } from '@/lib/network/schedule-column';
import type { CellRange } from '@/lib/network/schedule-block';

export interface CellPlace {
  id: string;
  key: string;
}

/** The cell that keys go to and the range that reaches from its anchor; both by row and column, so that sorting takes them along. */
export function useCells<Row extends RowOf<unknown>>(rows: readonly Row[], columns: readonly ScheduleColumn<Row>[], first: string | null) {
  const rowIds = useMemo(() => rows.map(({ id }) => id), [rows]);
  const keys = useMemo(() => columns.map(({ key }) => key), [columns]);
  const rowAt = useMemo(() => new Map(rowIds.map((id, index) => [id, index])), [rowIds]);
  const [at, setAt] = useState<{ active: CellPlace; anchor: CellPlace } | null>(null);

  const usual: CellPlace | null = rowIds.length ? { id: first !== null && rowAt.has(first) ? first : rowIds[0], key: keys[0] } : null;
  const isThere = (place: CellPlace | undefined) => place !== undefined && rowAt.has(place.id) && keys.includes(place.key);
  const active = isThere(at?.active) ? at!.active : usual;
  const anchor = isThere(at?.active) && isThere(at?.anchor) ? at!.anchor : active;
  const indexOf = (place: CellPlace) => ({ row: rowAt.get(place.id)!, column: keys.indexOf(place.key) });
  const [from, to] = active && anchor ? [indexOf(anchor), indexOf(active)] : [null, null];
  const range: CellRange | null = from &&
    to && {
      top: Math.min(from.row, to.row),
      bottom: Math.max(from.row, to.row),
      left: Math.min(from.column, to.column),
      right: Math.max(from.column, to.column),
    };

  const go = (place: CellPlace, isExtending = false) => setAt({ active: place, anchor: isExtending && anchor ? anchor : place });
  const placeAt = (row: number, column: number): CellPlace => ({
    id: rowIds[Math.max(0, Math.min(rowIds.length - 1, row))],
    key: keys[Math.max(0, Math.min(keys.length - 1, column))],
  });
  return {
    rowIds,
    keys,
    active,
    activeRow: to?.row ?? null,
    activeColumn: to?.column ?? null,
    range,
    go,
    placeAt,
    /** False at the edge of the table, where there is nowhere to go. */
    move: (rowsDown: number, columnsRight: number, isExtending = false): boolean => {
      if (!to) return false;
      const [row, column] = [to.row + rowsDown, to.column + columnsRight];
      if (column < 0 || column >= keys.length) return false;
      go(placeAt(row, column), isExtending);
      return true;
    },
    all: () => {
      if (rowIds.length) setAt({ anchor: placeAt(0, 0), active: placeAt(rowIds.length - 1, keys.length - 1) });
    },
  };
}

export type Cells = ReturnType<typeof useCells>;
