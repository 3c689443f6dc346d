'use client';

import { useId } from 'react';
import { columnName } from '@/lib/network/schedule-import/guess-columns';
import { meaningOf, meanings, type Meaning } from '@/lib/network/schedule-import/meanings';
import { scheduleUnitsOf } from '@/lib/network/schedule-import/schedule-units';
import { cellText } from '@/lib/network/schedule-import/table';
import { classNames } from '../ui/class-names';
import { inputClass, SelectField } from '../ui/field';
import { Step } from './step';
import type { Schedule } from './use-schedule';

const LAST_HEAD_ROW = 30;

const remarks: Record<Meaning, string> = {
  tag: 'needed',
  storey: 'needed',
  riser: 'one riser where empty',
  room: '',
  load: 'load or flow is needed',
  flow: 'from load and temperatures where empty',
  coilDrop: 'needed',
  supply: 'the loop’s where empty',
  return: 'the loop’s where empty',
};
/** What a whole schedule may have in common. */
const mayBeAssumed: readonly Meaning[] = ['storey', 'riser', 'coilDrop', 'supply', 'return'];

const rowLayout =
  'grid-cols-[minmax(0,1fr)_6.5rem] gap-x-3 gap-y-1.5 sm:grid-cols-[12rem_minmax(0,1fr)_6.5rem] lg:grid-cols-[13rem_minmax(0,1.2fr)_7rem_9rem_minmax(0,1fr)]';

/** Which column holds what, in which unit, and what holds where a cell is empty. */
export function ColumnsStep({ schedule }: { schedule: Schedule }) {
  const { brought, reading, isRemembered } = schedule.state!;
  const { table } = brought;
  const found = meanings.filter((meaning) => reading.columns[meaning].column !== null).length;
  return (
    <Step
      number={2}
      title="Say what the columns are"
      outcome={isRemembered ? 'As you chose for these heads before' : `${found} of ${meanings.length} found`}
    >
      <div className="max-w-xs">
        <SelectField
          label="The heads stand in"
          value={reading.headRow ?? ''}
          onChange={(event) => schedule.chooseHead(event.target.value === '' ? null : Number(event.target.value))}
        >
          <option value="">no row, there are none</option>
          {table.rows.slice(0, LAST_HEAD_ROW).map((row, index) => (
            <option key={index} value={index}>
              row {table.firstRow + index}: {row.map(cellText).filter(Boolean).join(', ').slice(0, 60)}
            </option>
          ))}
        </SelectField>
      </div>
      <div aria-hidden className={classNames(rowLayout, 'text-quiet mt-4 hidden py-1 text-xs font-semibold lg:grid')}>
        <span>What</span>
        <span>Column</span>
        <span>Unit</span>
        <span>Where empty</span>
        <span>First cells</span>
      </div>
      <ul className="max-lg:mt-4">
        {meanings.map((meaning) => (
          <MeaningRow key={meaning} meaning={meaning} schedule={schedule} />
        ))}
      </ul>
    </Step>
  );
}

function MeaningRow({ meaning, schedule }: { meaning: Meaning; schedule: Schedule }) {
  const id = useId();
  const { brought, reading } = schedule.state!;
  const { table } = brought;
  const { name, quantity } = meaningOf[meaning];
  const { column, unit, whenEmpty } = reading.columns[meaning];
  const samples =
    column === null
      ? []
      : table.rows
          .slice(reading.firstRow)
          .map((row) => cellText(row[column]))
          .filter(Boolean)
          .slice(0, 3);
  return (
    <li className={classNames(rowLayout, 'grid items-center border-t py-2')}>
      <div className="max-sm:col-span-2">
        <label htmlFor={`${id}-column`} className="font-semibold">
          {name}
        </label>
        {remarks[meaning] && (
          <p id={`${id}-remark`} className="text-quiet text-xs">
            {remarks[meaning]}
          </p>
        )}
      </div>
      <select
        id={`${id}-column`}
        aria-describedby={remarks[meaning] ? `${id}-remark` : undefined}
        value={column ?? ''}
        onChange={(event) => schedule.chooseColumn(meaning, { column: event.target.value === '' ? null : Number(event.target.value) })}
        className={classNames(inputClass, 'h-10 min-w-0', column === null && 'text-quiet', quantity === null && 'max-sm:col-span-2')}
      >
        <option value="">in no column</option>
        {table.rows[0]?.map((_, index) => (
          <option key={index} value={index}>
            {columnName(table, reading.headRow, index)}
          </option>
        ))}
      </select>
      {quantity === null ? (
        <span className="max-sm:hidden" />
      ) : (
        <select
          aria-label={`Unit of ${name.toLowerCase()}`}
          value={unit ?? ''}
          onChange={(event) => schedule.chooseColumn(meaning, { unit: event.target.value })}
          className={classNames(inputClass, 'h-10')}
        >
          {scheduleUnitsOf(quantity).map((it) => (
            <option key={it}>{it}</option>
          ))}
        </select>
      )}
      {mayBeAssumed.includes(meaning) ? (
        <div className="flex items-center gap-2 max-lg:col-span-2 max-lg:sm:col-start-2">
          <label htmlFor={`${id}-empty`} className="text-quiet text-sm whitespace-nowrap lg:sr-only">
            <span className="sr-only">{name} </span>where empty
          </label>
          <input
            id={`${id}-empty`}
            value={whenEmpty}
            maxLength={60}
            autoComplete="off"
            onChange={(event) => schedule.chooseColumn(meaning, { whenEmpty: event.target.value })}
            className={classNames(inputClass, 'h-10 max-lg:max-w-44')}
          />
        </div>
      ) : (
        <span className="max-lg:hidden" />
      )}
      <p className="figures text-quiet truncate text-xs max-lg:col-span-2 max-lg:sm:col-start-2">{samples.join(' \u00b7 ')}</p>
    </li>
  );
}
