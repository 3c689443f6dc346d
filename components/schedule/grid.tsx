'use client';

import { useVirtualizer, type Range, defaultRangeExtractor } from '@tanstack/react-virtual';
import { useRouter } from 'next/navigation';
import { useEffect, useId, useRef, useSyncExternalStore, type MouseEvent, type PointerEvent } from 'react';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import { isFigure, type RowOf, type ScheduleTable } from '@/lib/network/schedule-column';
import type { UnitChoice } from '@/lib/units/quantities';
import { classNames } from '../ui/class-names';
import { CellEntry } from './cell-entry';
import type { ScheduleDesk } from './desk';
import { GridFoot } from './grid-foot';
import { GridHead } from './grid-head';
import { cellId, GridRow, placeOnDrawing } from './grid-row';
import type { Cells } from './use-cells';
import type { GridEdits } from './use-grid-edits';
import { useGridKeys } from './use-grid-keys';
import type { RowSelection } from './use-row-selection';
import type { TableView } from './use-table-view';

interface GridProps<Row extends RowOf<unknown>> {
  table: ScheduleTable<Row>;
  view: TableView<Row>;
  cells: Cells;
  edits: GridEdits;
  selection: RowSelection;
  desk: ScheduleDesk;
  units: UnitChoice;
  count: number;
  hasFilters: boolean;
  band: StripBand | null;
  markOf: (row: Row) => string | null;
}

const ROW_PX = 34;
const BOX_COLUMN_REM = 2.4;

/** The cells. Only the rows in view are in the page; the focus stays on the table, and the active cell is named by it. */
export function Grid<Row extends RowOf<unknown>>(props: GridProps<Row>) {
  const { table, view, cells, edits, selection, desk, units } = props;
  const gridId = useId();
  const router = useRouter();
  const scroller = useRef<HTMLDivElement>(null);
  const { rows, columns } = view;
  const { activeRow, activeColumn } = cells;
  const isPrinting = useIsPrinting();
  const virtual = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW_PX,
    getItemKey: (index) => rows[index].id,
    overscan: 8,
    // Before it is measured, and on the server: a screenful.
    initialRect: { width: 1200, height: 700 },
    // What the head and the foot cover.
    scrollPaddingEnd: props.hasFilters ? 140 : 105,
    // The active cell stays in the page wherever the table is scrolled to: it holds what is being typed.
    rangeExtractor: (range: Range) => {
      if (isPrinting) return rows.map((_, index) => index);
      const inView = defaultRangeExtractor(range);
      if (activeRow === null || activeRow >= rows.length || inView.includes(activeRow)) return inView;
      return [...inView, activeRow].sort((a, b) => a - b);
    },
  });
  const widths = columns.map((column) => column.widthRem ?? (isFigure(column) ? 5.4 : 7));
  const template = `${BOX_COLUMN_REM}rem ${widths.map((rem) => `minmax(${rem}rem, ${rem}fr)`).join(' ')}`;
  const minWidth = `${widths.reduce((sum, rem) => sum + rem, BOX_COLUMN_REM)}rem`;
  const headRows = props.hasFilters ? 2 : 1;

  useEffect(() => {
    if (activeRow === null || activeColumn === null) return;
    virtual.scrollToIndex(activeRow, { align: 'auto' });
    const frame = requestAnimationFrame(() =>
      document.getElementById(cellId(gridId, activeRow, activeColumn))?.scrollIntoView({ block: 'nearest', inline: 'nearest' }),
    );
    return () => cancelAnimationFrame(frame);
  }, [activeRow, activeColumn, gridId, virtual]);

  // A page copies and pastes where its caret last stood, not where the focus is: so it is asked for at the document.
  const { copy, paste } = edits;
  useEffect(() => {
    const ifHere = (act: (event: ClipboardEvent) => void) => (event: ClipboardEvent) => {
      if (document.activeElement === scroller.current) act(event);
    };
    const [copyHere, pasteHere] = [ifHere(copy), ifHere(paste)];
    document.addEventListener('copy', copyHere);
    document.addEventListener('paste', pasteHere);
    return () => {
      document.removeEventListener('copy', copyHere);
      document.removeEventListener('paste', pasteHere);
    };
  }, [copy, paste]);

  const press = useGridKeys({
    cells,
    edits,
    pageRows: () => Math.max(1, Math.floor((scroller.current?.clientHeight ?? 0) / ROW_PX) - 3),
    toggleRow: selection.toggle,
    showRow: (id) => router.push(placeOnDrawing(desk.drawingHref, id)),
  });
  const placeOf = (event: MouseEvent) => {
    const cell = (event.target as Element).closest<HTMLElement>('[data-row]');
    return cell && cells.placeAt(Number(cell.dataset.row), Number(cell.dataset.column));
  };
  const isActive = (place: { id: string; key: string }) => place.id === cells.active?.id && place.key === cells.active.key;
  const wasActive = useRef(false);
  const pointerDown = (event: PointerEvent) => {
    const place = placeOf(event);
    if (!place || (event.target as Element).closest('input, select, a, button')) return;
    wasActive.current = isActive(place) && document.activeElement === scroller.current && !event.shiftKey;
    if (!event.shiftKey && isActive(place)) return;
    cells.go(place, event.shiftKey);
  };
  const pointerOver = (event: PointerEvent) => {
    const place = event.pointerType === 'mouse' && event.buttons === 1 && !edits.entry ? placeOf(event) : null;
    if (place && !isActive(place) && document.activeElement === scroller.current) cells.go(place, true);
  };
  const click = (event: MouseEvent) => {
    const place = placeOf(event);
    if (place && isActive(place) && (wasActive.current || event.detail === 2) && !edits.entry) edits.begin(place);
  };

  return (
    <div
      ref={scroller}
      role="grid"
      aria-label={table.name}
      aria-rowcount={rows.length + headRows + 1}
      aria-colcount={columns.length + 1}
      aria-multiselectable
      aria-readonly={desk.edit === null}
      aria-activedescendant={activeRow === null || activeColumn === null ? undefined : cellId(gridId, activeRow, activeColumn)}
      tabIndex={0}
      className={classNames(
        'flex min-h-0 flex-1 scroll-pb-10 scroll-pl-48 flex-col overflow-auto overscroll-contain outline-offset-[-2px] print:overflow-visible',
        props.hasFilters ? 'scroll-pt-28' : 'scroll-pt-16',
      )}
      onKeyDown={press}
      onPointerDown={pointerDown}
      onPointerOver={pointerOver}
      onClick={click}
    >
      <div className="flex min-h-full w-full flex-col" style={{ minWidth }}>
        <GridHead view={view} units={units} template={template} hasFilters={props.hasFilters} selection={selection} />
        <div role="rowgroup" className="relative" style={{ height: virtual.getTotalSize() }}>
          {virtual.getVirtualItems().map(({ index, start, key }) => {
            const row = rows[index];
            return (
              <GridRow
                key={key}
                row={row}
                index={index}
                ariaRow={index + headRows + 1}
                columns={columns}
                units={units}
                context={desk.context}
                style={{ gridTemplateColumns: template, height: ROW_PX, position: 'absolute', insetInline: 0, top: start }}
                gridId={gridId}
                band={props.band}
                isOld={desk.isOld}
                isSelected={selection.has(row.id)}
                canEdit={desk.edit !== null}
                onToggle={() => selection.toggle(row.id)}
                range={cells.range}
                active={activeRow === null || activeColumn === null ? null : { row: activeRow, column: activeColumn }}
                mark={props.markOf(row)}
                drawingHref={desk.drawingHref}
                entryOf={(column) =>
                  edits.entry?.id === row.id && edits.entry.key === column.key ? (
                    <CellEntry
                      entry={edits.entry}
                      column={column}
                      row={row}
                      context={desk.context}
                      commit={edits.commit}
                      leave={edits.leave}
                      onDone={(rowsDown, columnsRight) => {
                        cells.move(rowsDown, columnsRight);
                        scroller.current?.focus({ preventScroll: true });
                      }}
                    />
                  ) : null
                }
              />
            );
          })}
        </div>
        <GridFoot
          rows={rows}
          count={props.count}
          columns={columns}
          units={units}
          template={template}
          ariaRow={rows.length + headRows + 1}
        />
      </div>
    </div>
  );
}

/** On paper there is nothing to scroll: all rows are in the page then. */
function useIsPrinting(): boolean {
  return useSyncExternalStore(
    (listener) => {
      const query = window.matchMedia('print');
      query.addEventListener('change', listener);
      return () => query.removeEventListener('change', listener);
    },
    () => window.matchMedia('print').matches,
    () => false,
  );
}
