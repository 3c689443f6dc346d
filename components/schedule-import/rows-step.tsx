'use client';

import { useState } from 'react';
import type { DrawingFluid } from '@/lib/network/drawing';
import type { ReadRow } from '@/lib/network/schedule-import/read-terminals';
import { Button } from '../ui/button';
import { classNames } from '../ui/class-names';
import { Figure } from '../ui/figure';
import { FlowWorking } from './flow-working';
import { countOf, filtered, filterWords, isFaulty, rowFilters, type RowFilter } from './row-filter';
import { RowTable } from './row-table';
import { Step } from './step';
import type { Schedule } from './use-schedule';

const noneWords: Record<RowFilter, string> = {
  all: 'There is no row below the heads.',
  faulty: 'No row is faulty.',
  'to-check': 'Nothing to check.',
  'left-out': 'No row is left out.',
};

/** Every row as it will be drawn, each faulty cell named, to be put right here or left out. */
export function RowsStep({ schedule, fluid }: { schedule: Schedule; fluid: DrawingFluid }) {
  const { rows } = schedule;
  const [filter, setFilter] = useState<RowFilter>('all');
  const [touched, setTouched] = useState<ReadonlySet<number>>(new Set());
  const [shownWorking, setShownWorking] = useState<ReadRow | null>(null);
  const shown = filtered(rows, filter, touched);
  const faulty = rows.filter(isFaulty);
  const touch = (index: number) => setTouched(new Set(touched).add(index));

  if (schedule.state!.reading.columns.tag.column === null) {
    return (
      <Step number={3} title="Check the rows">
        <p className="text-quiet">Say above which column holds the tag; then the rows are listed here.</p>
      </Step>
    );
  }
  return (
    <Step number={3} title="Check the rows" outcome={<Sum rows={rows} />}>
      <div className="mb-3 flex flex-wrap items-center justify-between gap-3">
        <div role="group" aria-label="Rows to show" className="flex flex-wrap gap-x-5">
          {rowFilters.map((it) => (
            <button
              key={it}
              type="button"
              aria-pressed={filter === it}
              onClick={() => {
                setFilter(it);
                setTouched(new Set());
              }}
              className={classNames(
                'min-h-11 border-b-2 font-semibold whitespace-nowrap',
                filter === it ? 'border-brass' : 'text-quiet hover:text-ink border-transparent',
              )}
            >
              {filterWords[it]} <span className="figures text-quiet ml-1 text-xs font-normal">{countOf(rows, it)}</span>
            </button>
          ))}
        </div>
        {faulty.length > 0 && (
          <Button
            size="small"
            onClick={() =>
              schedule.leaveOut(
                faulty.map(({ index }) => index),
                'left-out',
              )
            }
          >
            Leave out {faulty.length === 1 ? 'the faulty row' : `all ${faulty.length} faulty rows`}
          </Button>
        )}
      </div>
      {shown.length === 0 ? (
        <p className="text-quiet border-t py-6">{noneWords[filter]}</p>
      ) : (
        <RowTable
          key={filter}
          rows={shown}
          reading={schedule.state!.reading}
          onCorrect={(index, meaning, text) => {
            touch(index);
            schedule.correct(index, meaning, text);
          }}
          onLeaveOut={(index, how) => {
            touch(index);
            schedule.leaveOut([index], how);
          }}
          onShowWorking={setShownWorking}
        />
      )}
      <FlowWorking row={shownWorking} fluid={fluid} onClose={() => setShownWorking(null)} />
    </Step>
  );
}

function Sum({ rows }: { rows: readonly ReadRow[] }) {
  const terminals = rows.flatMap(({ terminal }) => (terminal ? [terminal] : []));
  const loadKw = terminals.reduce((sum, terminal) => sum + (terminal.loadKw ?? 0), 0);
  return (
    <>
      {terminals.length} {terminals.length === 1 ? 'terminal' : 'terminals'},{' '}
      <Figure quantity="flow" si={terminals.reduce((sum, { designFlowLs }) => sum + designFlowLs, 0)} hasUnit />
      {loadKw > 0 && (
        <>
          , <Figure quantity="power" si={loadKw} hasUnit />
        </>
      )}
    </>
  );
}
