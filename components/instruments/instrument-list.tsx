'use client';

import { useState } from 'react';
import type { Instrument } from '@/lib/api/commissioning';
import { isOverdue } from '@/lib/commissioning/calibration';
import { Button } from '../ui/button';
import { InstrumentDialog } from './instrument-dialog';
import { InstrumentRow } from './instrument-row';

interface InstrumentListProps {
  instruments: Instrument[];
  mayManage: boolean;
  /** The server's moment, ISO: both sides then mark the same meters overdue. */
  now: string;
}

/** The meters of the organisation: those in use first, the overdue among them marked, then the retired. */
export function InstrumentList({ instruments, mayManage, now }: InstrumentListProps) {
  const [open, setOpen] = useState<{ instrument: Instrument | null } | null>(null);
  const inUse = instruments.filter(({ isRetired }) => !isRetired);
  const retired = instruments.filter(({ isRetired }) => isRetired);
  const overdue = inUse.filter((instrument) => isOverdue(instrument, new Date(now))).length;
  const rows = (shown: Instrument[]) =>
    shown.map((instrument) => (
      <InstrumentRow
        key={instrument.id}
        instrument={instrument}
        isOverdue={isOverdue(instrument, new Date(now))}
        onChange={mayManage ? () => setOpen({ instrument }) : null}
      />
    ));
  return (
    <>
      <div className="mb-4 flex flex-wrap items-end justify-between gap-3">
        <div>
          <h1>Instruments</h1>
          <p className="text-quiet">
            {inUse.length === 1 ? '1 meter in use' : `${inUse.length} meters in use`}
            {overdue > 0 && <span className="text-high font-semibold">, ▴ {overdue} overdue for calibration</span>}
          </p>
        </div>
        {mayManage && (
          <Button look="primary" onClick={() => setOpen({ instrument: null })}>
            Add a meter
          </Button>
        )}
      </div>
      {instruments.length === 0 ? (
        <div className="rounded border border-dashed px-6 py-12 text-center">
          <h2>No meters yet</h2>
          <p className="text-quiet mx-auto mt-1 max-w-md">
            Every reading names the meter it was taken with, its accuracy and its calibration.{' '}
            {mayManage ? 'Add the first one.' : 'Technicians and administrators add them.'}
          </p>
        </div>
      ) : (
        <ul className="bg-sheet divide-y rounded border">{rows(inUse)}</ul>
      )}
      {retired.length > 0 && (
        <section aria-labelledby="retired" className="mt-8">
          <h2 id="retired" className="mb-2">
            Retired
          </h2>
          <ul className="bg-sheet divide-y rounded border opacity-80">{rows(retired)}</ul>
        </section>
      )}
      <InstrumentDialog instrument={open?.instrument ?? null} isOpen={open !== null} onClose={() => setOpen(null)} />
    </>
  );
}
