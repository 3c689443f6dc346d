import type { WhatIsUnknown } from '@/lib/balancing/most-telling-reading';
import { Figure } from '../../ui/figure';
import { Sheet } from '../../ui/sheet';
import type { Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';
import { stationFinder } from './station-finder';

const LISTED = 8;

/** What cannot be known from the readings so far, and the one further reading that would tell most. */
export function UnknownSheet({ commissioning, unknown }: { commissioning: Commissioning; unknown: WhatIsUnknown }) {
  const stationOf = stationFinder(commissioning);
  const [best] = unknown.readings;
  const station = best && stationOf(best.link);
  if (unknown.terminals.length === 0) return null;
  const listed = unknown.terminals.slice(0, LISTED);
  return (
    <Sheet title="What the readings do not tell">
      <p>
        Known worse than to ±3 %:{' '}
        {listed.map(({ link, spreadPercent }, at) => (
          <span key={link}>
            {at > 0 && ', '}
            {stationOf(link)?.tag ?? link} <span className="figures text-quiet">±{spreadPercent.toFixed(1)} %</span>
          </span>
        ))}
        {unknown.terminals.length > LISTED && ` and ${unknown.terminals.length - LISTED} more`}.
      </p>
      {best && station && (
        <p className="mt-2">
          One reading would tell most:{' '}
          <PlaceLink href={`${commissioning.base}/stations/${station.id}`} className="font-bold">
            {station.tag}
          </PlaceLink>
          , {best.quantity === 'flowLs' ? 'its flow by a meter of its own' : 'its differential pressure'} (about{' '}
          <Figure quantity={best.quantity === 'flowLs' ? 'flow' : 'pressure'} si={best.expected} hasUnit />
          ). It takes away <span className="figures">{(100 * best.varianceReduction).toFixed(0)} %</span> of what is uncertain.
        </p>
      )}
    </Sheet>
  );
}
