'use client';

import {
  columnFilteringFeature,
  columnOrderingFeature,
  columnVisibilityFeature,
  createFilteredRowModel,
  createSortedRowModel,
  rowSortingFeature,
  tableFeatures,
  useTable,
  type ColumnDef,
  type SortingState,
} from '@tanstack/react-table';
import { useMemo, useState, useSyncExternalStore } from 'react';
import { onLayoutChange, readLayout, rememberLayout, storedLayout } from '@/lib/client/schedule-layout';
import type { CellValue, RowOf, ScheduleColumn, ScheduleContext, ScheduleTable } from '@/lib/network/schedule-column';
import { filterOf, holdsWords } from '@/lib/network/schedule-filter';
import { compareCells, movedKey, orderedKeys } from '@/lib/network/schedule-order';
import type { UnitChoice } from '@/lib/units/quantities';

const features = tableFeatures({
  columnVisibilityFeature,
  columnOrderingFeature,
  columnFilteringFeature,
  rowSortingFeature,
  filteredRowModel: createFilteredRowModel(),
  sortedRowModel: createSortedRowModel(),
});

interface ViewOptions<Row extends RowOf<unknown>> {
  table: ScheduleTable<Row>;
  rows: Row[];
  units: UnitChoice;
  context: ScheduleContext;
  personId: string;
}

/** One table as it is seen: which rows and columns, in what order. The columns are remembered in this browser. */
export function useTableView<Row extends RowOf<unknown>>({ table, rows, units, context, personId }: ViewOptions<Row>) {
  const [sorting, setSorting] = useState<SortingState>([]);
  const [quick, setQuick] = useState('');
  const [filters, setFilters] = useState<Record<string, string>>({});
  const stored = useSyncExternalStore(
    onLayoutChange,
    () => storedLayout(personId, table.key),
    () => null,
  );
  const layout = useMemo(() => {
    const remembered = readLayout(stored);
    const keys = table.columns.map(({ key }) => key);
    const extra = table.columns.filter(({ isExtra }) => isExtra).map(({ key }) => key);
    return { order: orderedKeys(keys, remembered?.order ?? []), hidden: remembered?.hidden ?? extra, isUsual: remembered === null };
  }, [stored, table]);

  const columnByKey = useMemo(() => new Map(table.columns.map((column) => [column.key, column])), [table]);
  const definitions = useMemo(() => table.columns.map((column) => definitionOf(column)), [table]);
  const shown = useMemo(
    () => layout.order.filter((key) => key === 'tag' || !layout.hidden.includes(key)).map((key) => columnByKey.get(key)!),
    [layout, columnByKey],
  );
  const data = useMemo(
    () => (quick.trim() === '' ? rows : rows.filter((row) => holdsWords(row, quick, shown, units, context))),
    [rows, quick, shown, units, context],
  );
  const columnFilters = useMemo(
    () =>
      Object.entries(filters).flatMap(([id, typed]) => {
        const column = columnByKey.get(id);
        const value = column ? filterOf(column, typed, units, context) : null;
        return value ? [{ id, value }] : [];
      }),
    [filters, columnByKey, units, context],
  );
  const view = useTable<typeof features, Row>({
    features,
    columns: definitions,
    data,
    getRowId: (row) => row.id,
    state: {
      sorting,
      columnFilters,
      columnOrder: layout.order,
      columnVisibility: Object.fromEntries(layout.hidden.map((key) => [key, key === 'tag'])),
    },
    onSortingChange: setSorting,
  });

  const remember = (order: string[], hidden: string[]) => rememberLayout(personId, table.key, { order, hidden });
  return {
    rows: view.getRowModel().rows.map((row) => row.original),
    columns: view.getVisibleLeafColumns().map(({ id }) => columnByKey.get(id)!),
    allColumns: layout.order.map((key) => columnByKey.get(key)!),
    hidden: layout.hidden,
    isUsual: layout.isUsual,
    sorting: sorting.at(0) ?? null,
    /** Up, then down, then as drawn. */
    sortBy: (key: string) =>
      setSorting(([now]) => (now?.id !== key ? [{ id: key, desc: false }] : now.desc ? [] : [{ id: key, desc: true }])),
    quick,
    setQuick,
    filters,
    setFilter: (key: string, typed: string) => setFilters((before) => ({ ...before, [key]: typed })),
    clearFilters: () => {
      setQuick('');
      setFilters({});
    },
    isFiltered: quick.trim() !== '' || columnFilters.length > 0,
    showColumn: (key: string, isShown: boolean) =>
      remember(layout.order, isShown ? layout.hidden.filter((it) => it !== key) : [...layout.hidden, key]),
    moveColumn: (key: string, by: -1 | 1) => remember(movedKey(layout.order, key, by), layout.hidden),
    usualColumns: () => rememberLayout(personId, table.key, null),
  };
}

export type TableView<Row extends RowOf<unknown>> = ReturnType<typeof useTableView<Row>>;

const definitionOf = <Row extends RowOf<unknown>>(column: ScheduleColumn<Row>): ColumnDef<typeof features, Row> => ({
  id: column.key,
  // What is missing stands last either way.
  accessorFn: (row) => column.read(row) ?? undefined,
  sortUndefined: 'last',
  sortFn: (a, b, id) => compareCells(a.getValue<CellValue>(id), b.getValue<CellValue>(id)),
  filterFn: (row, _id, passes: (row: Row) => boolean) => passes(row.original),
});
