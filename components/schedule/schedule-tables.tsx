'use client';

import { useSearchParams } from 'next/navigation';
import { useMemo } from 'react';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { Schedule } from '@/lib/network/schedule-rows';
import { classNames } from '../ui/class-names';
import { pipeColumns, pumpColumns, sourceColumns, terminalColumns, valveColumns } from './schedule-columns';
import { SortableTable } from './sortable-table';

const tables = [
  ['terminals', 'Terminals'],
  ['valves', 'Balancing valves'],
  ['pipes', 'Pipes'],
  ['pumps', 'Pumps'],
  ['sources', 'Source'],
] as const;

interface ScheduleTablesProps {
  schedule: Schedule;
  bands: { terminal: StripBand; branch: StripBand };
  drawingHref: string;
}

/** The tables of the loop, one at a time; which one stands in the address, so that it can be shared. */
export function ScheduleTables({ schedule, bands, drawingHref }: ScheduleTablesProps) {
  const asked = useSearchParams().get('table');
  const open = tables.find(([key]) => key === asked)?.[0] ?? 'terminals';
  const columns = useMemo(() => ({ terminals: terminalColumns(bands.terminal), valves: valveColumns(bands.branch) }), [bands]);
  const show = (key: string) => window.history.replaceState(null, '', `?table=${key}`);

  return (
    <div className="bg-sheet flex min-h-0 flex-1 flex-col rounded border print:border-0">
      <div role="group" aria-label="Tables" className="flex gap-5 overflow-x-auto border-b px-4 print:hidden">
        {tables.map(([key, name]) => (
          <button
            key={key}
            type="button"
            aria-pressed={open === key}
            onClick={() => show(key)}
            className={classNames(
              'min-h-11 border-b-2 font-semibold whitespace-nowrap',
              open === key ? 'border-brass' : 'text-quiet hover:text-ink border-transparent',
            )}
          >
            {name} <span className="figures text-quiet ml-1 text-xs font-normal">{schedule[key].length}</span>
          </button>
        ))}
      </div>
      {schedule[open].length === 0 ? (
        <p className="text-quiet p-6">None on this drawing.</p>
      ) : (
        <>
          {open === 'terminals' && (
            <SortableTable
              label="Terminals"
              nameHead="Terminal"
              columns={columns.terminals}
              rows={schedule.terminals}
              mark={({ isIndex }) => (isIndex ? 'index' : null)}
              drawingHref={drawingHref}
            />
          )}
          {open === 'valves' && (
            <SortableTable
              label="Balancing valves"
              nameHead="Valve"
              columns={columns.valves}
              rows={schedule.valves}
              drawingHref={drawingHref}
            />
          )}
          {open === 'pipes' && (
            <SortableTable label="Pipes" nameHead="From – to" columns={pipeColumns} rows={schedule.pipes} drawingHref={drawingHref} />
          )}
          {open === 'pumps' && (
            <SortableTable label="Pumps" nameHead="Pump" columns={pumpColumns} rows={schedule.pumps} drawingHref={drawingHref} />
          )}
          {open === 'sources' && (
            <SortableTable label="Source" nameHead="Source" columns={sourceColumns} rows={schedule.sources} drawingHref={drawingHref} />
          )}
        </>
      )}
    </div>
  );
}
