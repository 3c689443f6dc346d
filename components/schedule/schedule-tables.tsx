'use client';

import { useSearchParams } from 'next/navigation';
import type { Schedule } from '@/lib/network/schedule-rows';
import { pipeTable } from '@/lib/network/schedule-pipes';
import { pumpTable, sourceTable } from '@/lib/network/schedule-plant';
import { terminalTable } from '@/lib/network/schedule-terminals';
import { valveTable } from '@/lib/network/schedule-valves';
import { classNames } from '../ui/class-names';
import type { ScheduleDesk, Selection } from './desk';
import { ScheduleTable } from './schedule-table';

const tables = [terminalTable, pipeTable, valveTable, pumpTable, sourceTable] as const;

/** The tables of the loop, one at a time; which one stands in the address, so that it can be shared. */
export function ScheduleTables({ desk }: { desk: ScheduleDesk }) {
  const asked = useSearchParams().get('table');
  const { schedule, selection } = desk;
  const open = tables.find(({ key }) => key === asked)?.key ?? tableOfSelection(schedule, selection) ?? 'terminals';
  const show = (key: string) => window.history.replaceState(null, '', `?table=${key}`);
  return (
    <div className="bg-sheet flex min-h-0 flex-1 flex-col rounded border print:border-0">
      <div role="group" aria-label="Tables" className="flex gap-5 overflow-x-auto overflow-y-hidden border-b px-4 print:hidden">
        {tables.map(({ key, name }) => (
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
      {open === 'terminals' && (
        <ScheduleTable
          table={terminalTable}
          rows={schedule.terminals}
          desk={desk}
          band={desk.bands.terminal}
          markOf={({ isIndex }) => (isIndex ? 'index' : null)}
        />
      )}
      {open === 'pipes' && <ScheduleTable table={pipeTable} rows={schedule.pipes} desk={desk} band={null} />}
      {open === 'valves' && <ScheduleTable table={valveTable} rows={schedule.valves} desk={desk} band={desk.bands.branch} />}
      {open === 'pumps' && <ScheduleTable table={pumpTable} rows={schedule.pumps} desk={desk} band={null} />}
      {open === 'sources' && <ScheduleTable table={sourceTable} rows={schedule.sources} desk={desk} band={null} />}
    </div>
  );
}

/** What was selected on the Drawing is what one comes to see. */
function tableOfSelection(schedule: Schedule, selection: Selection) {
  if (selection.equipment.size + selection.pipes.size === 0) return null;
  return tables.find(({ key, of }) => schedule[key].some(({ id }) => selection[of].has(id)))?.key ?? null;
}
