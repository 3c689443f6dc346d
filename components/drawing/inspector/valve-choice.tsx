'use client';

import { useQuery } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { inputClass } from '@/components/ui/field';
import { QuantityField } from '@/components/ui/quantity-field';
import { classNames } from '@/components/ui/class-names';
import { copiedValve, offeredValves } from '@/lib/catalogue/chosen-entries';
import { catalogueQuery } from '@/lib/client/catalogue';
import type { ChosenValve } from '@/lib/network/drawing';
import { same } from '@/lib/network/merge-drawings';
import { genericValves, genericValveSource } from '@/lib/network/valve-families';
import { PointTable } from './point-table';
import { rowClass } from './rows';

interface ValveChoiceProps {
  valve: ChosenValve;
  /** The chosen units have different valves. */
  isMixed?: boolean;
  disabled: boolean;
  onCommit: (change: Partial<ChosenValve>) => void;
}

const OWN = 'own';

/**
 * Which balancing valve: one of the organisation's catalogue, a generic one, or one's own table of settings and Kv; where it stands, and
 * whether it stays so. The figures are copied into the drawing, which keeps them when the catalogue changes.
 */
export function ValveChoice({ valve, isMixed, disabled, onCommit }: ValveChoiceProps) {
  const id = useId();
  const families = useQuery(catalogueQuery).data?.valveFamilies ?? [];
  const generic = genericValves.find(({ name }) => name === valve.name);
  const offered = offeredValves(families).find(({ name }) => name === valve.name);
  const isAsOffered = offered !== undefined && same(offered.kvTable, valve.kvTable);
  const first = valve.kvTable[0]?.setting;
  const last = valve.kvTable.at(-1)?.setting;
  const choose = (name: string) => {
    const chosen = offeredValves(families).find((it) => it.name === name) ?? genericValves.find((it) => it.name === name);
    onCommit(chosen ? copiedValve(chosen) : { name: 'Own valve', stepTurns: null });
  };
  return (
    <>
      <div className={rowClass}>
        <label htmlFor={`${id}-valve`}>Valve</label>
        <select
          id={`${id}-valve`}
          disabled={disabled}
          className={classNames(inputClass, 'h-8 px-1.5 pointer-coarse:h-11')}
          value={isMixed ? '' : generic || isAsOffered ? valve.name : valve.name ? OWN : ''}
          onChange={(event) => choose(event.target.value)}
        >
          <option value="" disabled>
            {isMixed ? 'several' : 'choose…'}
          </option>
          {families.map((family) => (
            <optgroup key={family.id} label={family.name}>
              {offeredValves([family]).map(({ name, nominal, kvs }) => (
                <option key={name} value={name}>
                  {nominal}, Kvs {kvs}
                </option>
              ))}
            </optgroup>
          ))}
          <optgroup label="Generic, Evenhead’s own data">
            {genericValves.map(({ name, nominal, kvs }) => (
              <option key={name} value={name}>
                Generic {nominal}, Kvs {kvs}
              </option>
            ))}
          </optgroup>
          <option value={OWN}>Own table</option>
        </select>
      </div>
      {!isMixed && isAsOffered && <p className="text-quiet pt-1 text-xs">{valve.name}, copied from the catalogue.</p>}
      {!isMixed && offered && !isAsOffered && (
        <p className="text-brass pt-1 text-xs">
          The catalogue has other figures for this valve now. The drawing keeps those below until you choose it again.
        </p>
      )}
      {!isMixed && generic && <p className="text-quiet pt-1 text-xs">{genericValveSource}</p>}
      {!isMixed && !generic && !isAsOffered && valve.name !== '' && (
        <>
          <div className={rowClass}>
            <label htmlFor={`${id}-name`}>Name</label>
            <input
              id={`${id}-name`}
              key={valve.name}
              defaultValue={valve.name}
              disabled={disabled}
              maxLength={200}
              onBlur={(event) => event.target.value !== valve.name && onCommit({ name: event.target.value.trim() || 'Own valve' })}
              className={classNames(inputClass, 'h-8')}
            />
          </div>
          <PointTable
            label="Settings and Kv"
            columns={[
              { key: 'setting', label: 'Setting', quantity: 'setting' },
              { key: 'kv', label: 'Kv', quantity: 'valveCoefficient' },
              ...(valve.kvTable.some(({ measuringKv }) => measuringKv !== undefined)
                ? [{ key: 'measuringKv', label: 'Measuring', quantity: 'valveCoefficient' as const }]
                : []),
            ]}
            points={valve.kvTable}
            disabled={disabled}
            onCommit={(points) => onCommit({ kvTable: points as ChosenValve['kvTable'] })}
          />
        </>
      )}
      {(valve.kvTable.length > 1 || isMixed) && (
        <>
          <StandsAt
            key={`${valve.settingTurns}`}
            valve={valve}
            range={first === undefined ? '' : `${first} to ${last}`}
            disabled={disabled}
            onCommit={onCommit}
          />
          <div className={rowClass}>
            <label htmlFor={`${id}-locked`}>Stays so in the balance</label>
            <input
              id={`${id}-locked`}
              type="checkbox"
              disabled={disabled}
              checked={valve.isLocked}
              onChange={(event) => onCommit({ isLocked: event.target.checked })}
              className="accent-petrol size-5 justify-self-end"
            />
          </div>
        </>
      )}
    </>
  );
}

function StandsAt({ valve, range, disabled, onCommit }: ValveChoiceProps & { range: string }) {
  const label = 'Stands at';
  return (
    <div className={rowClass}>
      <span aria-hidden>
        {label} <span className="text-quiet text-xs">{range}</span>
      </span>
      <SettingField label={label} valve={valve} disabled={disabled} onCommit={onCommit} />
    </div>
  );
}

function SettingField({ label, valve, disabled, onCommit }: ValveChoiceProps & { label: string }) {
  const [typed, setTyped] = useState<{ si: number | null; isUnread: boolean }>({ si: valve.settingTurns, isUnread: false });
  const take = () => {
    if (!typed.isUnread && typed.si !== valve.settingTurns) onCommit({ settingTurns: typed.si });
  };
  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        take();
      }}
    >
      <QuantityField
        label={label}
        isLabelHidden
        quantity="setting"
        value={typed.si}
        placeholder="open"
        disabled={disabled}
        onChange={(si, { message }) => setTyped({ si, isUnread: message !== null })}
        onBlur={take}
        className="[&_input]:h-8 [&_input]:pr-[4.2rem] pointer-coarse:[&_input]:h-11"
      />
    </form>
  );
}
