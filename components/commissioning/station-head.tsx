import type { Station } from '@/lib/api/commissioning';
import { formatQuantity } from '@/lib/units/format-quantity';
import { Figure } from '../ui/figure';
import { placeOf, type Commissioning } from './commissioning-context';

/** Whose flow it is, where it is, what it should be, and what the valve should be set to. */
export function StationHead({ commissioning, station }: { commissioning: Commissioning; station: Station }) {
  const { settingTurns, expectedDropKpa, valveName } = station;
  const stands = (commissioning.standing.get(station.id) ?? commissioning.lastStanding.get(station.id))?.settingTurns ?? null;
  return (
    <>
      <div className="flex items-end justify-between gap-4">
        <div className="min-w-0">
          <h1 className="truncate text-[2rem] leading-tight font-bold">{station.tag}</h1>
          <p className="text-quiet truncate text-lg">
            {placeOf(station)}
            {valveName && <span className="hidden sm:inline"> · {valveName}</span>}
          </p>
        </div>
        <div className="shrink-0 text-right">
          <p className="text-quiet text-sm">design flow</p>
          <Figure quantity="flow" si={station.designFlowLs} hasUnit className="text-2xl" />
        </div>
      </div>
      {settingTurns !== null && (
        <p className="border-l-brass bg-sheet rounded-r border-l-4 px-4 py-3">
          <strong>
            {commissioning.isEntryOpen ? 'Set the valve to' : 'Scheduled setting'}{' '}
            <span className="figures text-brass">{formatQuantity('setting', settingTurns, 'turns')}</span> turns
          </strong>
          {stands !== null && (
            <span className="text-quiet">
              {' '}
              (it was read at <span className="figures">{formatQuantity('setting', stands, 'turns')}</span>)
            </span>
          )}
          .
          {expectedDropKpa !== null && (
            <span className="text-quiet">
              {' '}
              At design flow the meter then shows <Figure quantity="pressure" si={expectedDropKpa} hasUnit className="text-ink font-bold" />
              .
            </span>
          )}
        </p>
      )}
    </>
  );
}
