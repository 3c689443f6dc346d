'use client';

import type { RowOf, ScheduleTable } from '@/lib/network/schedule-column';
import type { Selection } from './desk';

/** The rows that are selected here are the pieces and pipes that are selected on the Drawing. */
export function useRowSelection<Row extends RowOf<unknown>>(table: ScheduleTable<Row>, rows: readonly Row[], selection: Selection) {
  const chosen = selection[table.of];
  const selected = rows.filter(({ id }) => chosen.has(id));
  const set = (change: (ids: Set<string>) => void) => {
    const next = new Set(chosen);
    change(next);
    selection.select(table.of, next);
  };
  const isAll = rows.length > 0 && selected.length === rows.length;
  return {
    selected,
    isAll,
    isSome: selected.length > 0,
    has: (id: string) => chosen.has(id),
    toggle: (id: string) => set((ids) => (ids.has(id) ? ids.delete(id) : ids.add(id))),
    toggleAll: () => set((ids) => rows.forEach(({ id }) => (isAll ? ids.delete(id) : ids.add(id)))),
    clear: () => set((ids) => rows.forEach(({ id }) => ids.delete(id))),
  };
}

export type RowSelection = Omit<ReturnType<typeof useRowSelection>, 'selected'>;
