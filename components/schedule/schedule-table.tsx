'use client';

import { useState } from 'react';
import { toast } from 'sonner';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import { downloadWorkbook } from '@/lib/client/schedule-workbook';
import type { RowOf, ScheduleTable as Table } from '@/lib/network/schedule-column';
import { useUnitChoice } from '../shell/units-context';
import type { ScheduleDesk } from './desk';
import { Grid } from './grid';
import { RefusedCells } from './refused-cells';
import { SetRows } from './set-rows';
import { Toolbar } from './toolbar';
import { useCells } from './use-cells';
import { useGridEdits } from './use-grid-edits';
import { useRowSelection } from './use-row-selection';
import { useTableView } from './use-table-view';

interface ScheduleTableProps<Row extends RowOf<unknown>> {
  table: Table<Row>;
  rows: Row[];
  desk: ScheduleDesk;
  band: StripBand | null;
  markOf?: (row: Row) => string | null;
}

const noMark = () => null;

/** One table with all that is done to it. */
export function ScheduleTable<Row extends RowOf<unknown>>({ table, rows, desk, band, markOf = noMark }: ScheduleTableProps<Row>) {
  const units = useUnitChoice();
  const { context, personId, edit } = desk;
  const view = useTableView({ table, rows, units, context, personId });
  const selection = useRowSelection(table, view.rows, desk.selection);
  const cells = useCells(view.rows, view.columns, selection.selected.at(0)?.id ?? null);
  const edits = useGridEdits({ table, view, cells, desk, units });
  const [hasFilters, setFilters] = useState(false);
  const [isExporting, setExporting] = useState(false);

  const exportSeen = async () => {
    setExporting(true);
    try {
      const seen = {
        name: table.name,
        title: `${desk.title}: ${table.name.toLowerCase()}`,
        columns: view.columns,
        rows: view.rows,
        units,
        context,
      };
      await downloadWorkbook(seen, `${desk.title.replace(/[^\p{L}\p{N}._-]+/gu, '-')}-${table.key}.xlsx`);
    } catch (error) {
      // Offline the workbook's library cannot be fetched; nothing else goes wrong here that a person could mend.
      toast('The workbook could not be written. Check the connection and try again.');
      throw error;
    } finally {
      setExporting(false);
    }
  };

  return (
    <>
      <Toolbar
        view={view}
        edit={edit}
        canFill={cells.range !== null && cells.range.bottom > cells.range.top}
        onFill={edits.fillDown}
        hasFilters={hasFilters}
        onFilters={() => setFilters(!hasFilters)}
        onExport={() => void exportSeen()}
        isExporting={isExporting}
      />
      {edit && selection.selected.length > 0 && (
        <SetRows rows={selection.selected} view={view} units={units} context={context} onSet={edits.setRows} onClear={selection.clear} />
      )}
      {edits.refused && (
        <RefusedCells
          {...edits.refused}
          tagOf={(id) => rows.find((row) => row.id === id)?.tag ?? id}
          onGo={cells.go}
          onDismiss={edits.dismiss}
        />
      )}
      {rows.length === 0 ? (
        <p className="text-quiet p-6">None on this drawing.</p>
      ) : (
        <Grid
          table={table}
          view={view}
          cells={cells}
          edits={edits}
          selection={selection}
          desk={desk}
          units={units}
          count={rows.length}
          hasFilters={hasFilters}
          band={band}
          markOf={markOf}
        />
      )}
    </>
  );
}
