'use client';

import { LocateFixed } from 'lucide-react';
import Link from 'next/link';
import type { CSSProperties, ReactNode } from 'react';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { CellRange } from '@/lib/network/schedule-block';
import { isFigure, type RowOf, type ScheduleColumn, type ScheduleContext } from '@/lib/network/schedule-column';
import { cellWords } from '@/lib/network/schedule-entry';
import type { UnitChoice } from '@/lib/units/quantities';
import { classNames } from '../ui/class-names';
import { Deviation } from '../ui/deviation';

interface GridRowProps<Row extends RowOf<unknown>> {
  row: Row;
  index: number;
  /** Of the row on the page; the head comes before. */
  ariaRow: number;
  columns: readonly ScheduleColumn<Row>[];
  units: UnitChoice;
  context: ScheduleContext;
  style: CSSProperties;
  gridId: string;
  band: StripBand | null;
  isOld: boolean;
  isSelected: boolean;
  canEdit: boolean;
  onToggle: () => void;
  range: CellRange | null;
  active: { row: number; column: number } | null;
  mark: string | null;
  drawingHref: string;
  /** The field in the cell that is typed into. */
  entryOf: (column: ScheduleColumn<Row>) => ReactNode;
}

export const cellId = (gridId: string, row: number, column: number) => `${gridId}-${row}-${column}`;

/** The Drawing, with the row's piece or pipe selected and in the middle. */
export const placeOnDrawing = (drawingHref: string, id: string) => `${drawingHref}?select=${encodeURIComponent(id)}`;

/** One piece or pipe: its box, its name with the way to its place on the drawing, and its cells. */
export function GridRow<Row extends RowOf<unknown>>(props: GridRowProps<Row>) {
  const { row, index, columns, units, context, range, active, isSelected, canEdit } = props;
  const isInRange = (column: number) =>
    range !== null && index >= range.top && index <= range.bottom && column >= range.left && column <= range.right;
  const ground = isSelected ? 'bg-well' : 'bg-sheet';
  return (
    <div
      role="row"
      aria-rowindex={props.ariaRow}
      aria-selected={isSelected}
      className={classNames('group grid border-b text-sm', ground, active?.row === index ? 'z-20' : 'z-0')}
      style={props.style}
    >
      <div
        role="gridcell"
        className={classNames(
          'sticky left-0 z-10 flex items-center justify-center',
          ground,
          isSelected && 'shadow-[inset_3px_0_0_var(--brass)]',
        )}
      >
        <input
          type="checkbox"
          tabIndex={-1}
          aria-label={`Select ${row.tag}`}
          className="accent-petrol size-4 pointer-coarse:size-5"
          checked={isSelected}
          onChange={props.onToggle}
        />
      </div>
      {columns.map((column, at) => {
        const isActive = active?.row === index && active.column === at;
        const entry = props.entryOf(column);
        const isComputed = canEdit && !column.write;
        return (
          <div
            key={column.key}
            id={cellId(props.gridId, index, at)}
            role={at === 0 ? 'rowheader' : 'gridcell'}
            aria-colindex={at + 2}
            aria-readonly={isComputed || undefined}
            aria-selected={isInRange(at)}
            data-row={index}
            data-column={at}
            className={classNames(
              'flex min-w-0 items-center px-2 select-none',
              at === 0 ? `sticky left-[2.4rem] z-10 font-semibold shadow-[inset_-1px_0_0_var(--rule)] ${ground}` : 'relative',
              isFigure(column) && 'figures justify-end',
              isComputed && at !== 0 && 'text-quiet',
              isComputed && isFigure(column) && props.isOld && 'italic',
              isInRange(at) && 'bg-[color-mix(in_srgb,var(--brass)_14%,var(--sheet))]!',
              isActive && 'outline-brass outline-2 -outline-offset-2',
            )}
          >
            {entry ?? <CellWords {...props} column={column} words={cellWords(column, row, units, context)} />}
            {at === 0 && !entry && (
              <>
                {props.mark && <span className="border-brass text-brass ml-2 rounded border px-1 text-xs font-semibold">{props.mark}</span>}
                <Link
                  href={placeOnDrawing(props.drawingHref, row.id)}
                  prefetch={false}
                  tabIndex={-1}
                  aria-label={`Show ${row.tag} in the Drawing`}
                  title="Show in the Drawing (Ctrl Enter)"
                  className="text-petrol hover:bg-well ml-auto inline-flex size-6 shrink-0 items-center justify-center rounded opacity-0 group-hover:opacity-100 print:hidden pointer-coarse:opacity-100"
                >
                  <LocateFixed size={14} aria-hidden />
                </Link>
              </>
            )}
          </div>
        );
      })}
    </div>
  );
}

function CellWords<Row extends RowOf<unknown>>({
  column,
  row,
  band,
  words,
}: GridRowProps<Row> & { column: ScheduleColumn<Row>; words: string }) {
  const value = column.read(row);
  if (column.key === 'percent' && typeof value === 'number' && band) {
    return <Deviation percent={value} verdict={value < band.lowerPercent ? 'low' : value > band.upperPercent ? 'high' : 'within'} />;
  }
  if (words === '') return <span className="text-quiet">{isFigure(column) && !column.write ? '–' : ''}</span>;
  return <span className={classNames('truncate', value === null && 'text-quiet font-sans')}>{words}</span>;
}
