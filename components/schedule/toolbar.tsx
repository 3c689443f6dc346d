'use client';

import { ArrowDownToLine, Download, Filter, Redo2, Search, Undo2 } from 'lucide-react';
import type { ReactNode } from 'react';
import type { RowOf } from '@/lib/network/schedule-column';
import { Button } from '../ui/button';
import { classNames } from '../ui/class-names';
import { inputClass } from '../ui/field';
import { ColumnsMenu } from './columns-menu';
import type { Editing } from './desk';
import type { TableView } from './use-table-view';

interface ToolbarProps<Row extends RowOf<unknown>> {
  view: TableView<Row>;
  edit: Editing | null;
  canFill: boolean;
  onFill: () => void;
  hasFilters: boolean;
  onFilters: () => void;
  onExport: () => void;
  isExporting: boolean;
}

/** Above the table: history and filling, finding, columns, export. */
export function Toolbar<Row extends RowOf<unknown>>(props: ToolbarProps<Row>) {
  const { view, edit, hasFilters } = props;
  return (
    <div role="toolbar" aria-label="Table" className="flex flex-wrap items-center gap-1.5 border-b px-3 py-1.5 print:hidden">
      {edit && (
        <div className="flex items-center">
          <Icon label="Undo (Ctrl Z)" isOff={!edit.canUndo} onPress={edit.undo}>
            <Undo2 size={18} aria-hidden />
          </Icon>
          <Icon label="Redo (Ctrl Shift Z)" isOff={!edit.canRedo} onPress={edit.redo}>
            <Redo2 size={18} aria-hidden />
          </Icon>
          <Icon label="Fill down (Ctrl D)" isOff={!props.canFill} onPress={props.onFill}>
            <ArrowDownToLine size={18} aria-hidden />
          </Icon>
        </div>
      )}
      <label className="relative min-w-32 flex-1 sm:max-w-60">
        <span className="sr-only">Find in the table</span>
        <Search size={15} aria-hidden className="text-quiet absolute top-1/2 left-2 -translate-y-1/2" />
        <input
          type="search"
          placeholder="Find in the table"
          className={classNames(inputClass, 'h-8 pl-7 text-sm pointer-coarse:h-11')}
          value={view.quick}
          onChange={(event) => view.setQuick(event.target.value)}
        />
      </label>
      <Button size="small" aria-pressed={hasFilters} className={hasFilters ? 'border-brass' : ''} onClick={props.onFilters}>
        <Filter size={15} aria-hidden /> Filters
      </Button>
      {view.isFiltered && (
        <Button look="quiet" size="small" onClick={view.clearFilters}>
          Show all rows
        </Button>
      )}
      <div className="ml-auto flex gap-1.5">
        <ColumnsMenu view={view} />
        <Button size="small" isPending={props.isExporting} pendingText="Writing…" onClick={props.onExport}>
          <Download size={15} aria-hidden /> Excel
        </Button>
      </div>
    </div>
  );
}

function Icon({ label, isOff, onPress, children }: { label: string; isOff: boolean; onPress: () => void; children: ReactNode }) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      disabled={isOff}
      onClick={onPress}
      className="hover:bg-well inline-flex size-8 items-center justify-center rounded disabled:opacity-35 pointer-coarse:size-11"
    >
      {children}
    </button>
  );
}
