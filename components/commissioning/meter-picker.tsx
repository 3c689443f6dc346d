import Link from 'next/link';
import { useId } from 'react';
import { isOverdue } from '@/lib/commissioning/calibration';
import { readingMethods } from '@/lib/commissioning/reading-methods';
import { dayWords } from '../instruments/instrument-words';
import { useNow } from './use-now';
import type { Entry } from './use-entry';

const meterWords = { 'differential-pressure': 'differential pressure meter', flow: 'flow meter', temperature: 'thermometer' } as const;

/** The meter that is read; the device remembers it for the next station. */
export function MeterPicker({ entry }: { entry: Entry }) {
  const { meters, meter } = entry;
  const now = useNow();
  const id = useId();
  if (meters.length === 0) {
    return (
      <p className="text-quiet text-sm">
        No {meterWords[readingMethods[entry.typed.method].instrument]} is in the list.{' '}
        <Link href="/instruments">Add it under Instruments</Link>.
      </p>
    );
  }
  return (
    <div className="flex min-w-0 flex-wrap items-center gap-x-2">
      <label htmlFor={id} className="text-quiet">
        Meter
      </label>
      <select
        id={id}
        value={meter?.id ?? ''}
        onChange={(event) => entry.chooseMeter(event.target.value)}
        className="bg-sheet h-12 max-w-full min-w-0 rounded border px-2 font-semibold"
      >
        {!meter && <option value="">Choose the meter</option>}
        {meters.map(({ id: meterId, serial, name }) => (
          <option key={meterId} value={meterId}>
            {serial}, {name}
          </option>
        ))}
      </select>
      {meter && now && isOverdue(meter, now) ? (
        <span className="text-high font-semibold">▴ overdue since {dayWords(meter.calibrationDueOn!)}</span>
      ) : (
        meter && (
          <span className="text-quiet text-sm">{meter.calibrationDueOn ? `due ${dayWords(meter.calibrationDueOn)}` : 'no due date'}</span>
        )
      )}
    </div>
  );
}
