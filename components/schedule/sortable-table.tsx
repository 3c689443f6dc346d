'use client';

import Link from 'next/link';
import { useMemo, useState } from 'react';
import { nextSorting, sortRows, type Sorting } from '@/lib/client/sort-rows';
import { Button } from '../ui/button';
import { Figures, Head, RowName, TableFrame, Words } from '../ui/table';
import type { ScheduleColumn } from './column';

const MOST_AT_FIRST = 300;

interface SortableTableProps<Row> {
  label: string;
  /** Of the column that names the row and leads to its place on the drawing. */
  nameHead: string;
  columns: ScheduleColumn<Row>[];
  rows: Row[];
  mark?: (row: Row) => string | null;
  drawingHref: string;
}

export function SortableTable<Row extends { id: string; tag: string }>({
  label,
  nameHead,
  columns,
  rows,
  mark,
  drawingHref,
}: SortableTableProps<Row>) {
  const [sorting, setSorting] = useState<Sorting | null>({ key: 'tag', isDescending: false });
  const [showsAll, setShowsAll] = useState(false);
  const sorted = useMemo(() => {
    if (!sorting) return rows;
    const sortBy = sorting.key === 'tag' ? ({ tag }: Row) => tag : columns.find(({ key }) => key === sorting.key)!.sortBy;
    return sortRows(rows, sortBy, sorting.isDescending);
  }, [rows, columns, sorting]);
  const shown = showsAll ? sorted : sorted.slice(0, MOST_AT_FIRST);
  const sortable = (key: string) => ({
    'aria-sort': sorting?.key !== key ? ('none' as const) : sorting.isDescending ? ('descending' as const) : ('ascending' as const),
  });
  const press = (key: string) => setSorting(nextSorting(sorting, key));

  return (
    <TableFrame label={label} className="min-h-0 flex-1">
      <thead>
        <tr>
          <Head className="left-0 z-20!" {...sortable('tag')}>
            <SortButton head={nameHead} sorting={sorting?.key === 'tag' ? sorting : null} onPress={() => press('tag')} />
          </Head>
          {columns.map(({ key, head, unit, isFigure }) => (
            <Head key={key} unit={unit} isFigure={isFigure} {...sortable(key)}>
              <SortButton head={head} sorting={sorting?.key === key ? sorting : null} onPress={() => press(key)} />
            </Head>
          ))}
        </tr>
      </thead>
      <tbody>
        {shown.map((row) => (
          <tr key={row.id} className="hover:bg-well break-inside-avoid">
            <RowName className="bg-sheet sticky left-0">
              <Link href={`${drawingHref}?select=${encodeURIComponent(row.id)}`} prefetch={false} className="no-underline hover:underline">
                {row.tag}
              </Link>
              {mark?.(row) && <span className="border-brass text-brass ml-2 rounded border px-1 text-xs font-semibold">{mark(row)}</span>}
            </RowName>
            {columns.map(({ key, isFigure, show }) =>
              isFigure ? (
                <Figures key={key}>{show(row)}</Figures>
              ) : (
                <Words key={key} className="whitespace-nowrap">
                  {show(row)}
                </Words>
              ),
            )}
          </tr>
        ))}
        {shown.length < sorted.length && (
          <tr>
            <td colSpan={columns.length + 1} className="p-4">
              <Button onClick={() => setShowsAll(true)}>Show all {sorted.length}</Button>
            </td>
          </tr>
        )}
      </tbody>
    </TableFrame>
  );
}

function SortButton({ head, sorting, onPress }: { head: string; sorting: Sorting | null; onPress: () => void }) {
  return (
    <button
      type="button"
      onClick={onPress}
      className="hover:text-ink min-h-6 font-semibold text-[inherit] hover:underline"
      title={`Sort by ${head.toLowerCase()}`}
    >
      {head}
      <span aria-hidden className="text-brass">
        {sorting && (sorting.isDescending ? ' ↓' : ' ↑')}
      </span>
    </button>
  );
}
