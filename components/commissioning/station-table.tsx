import type { Reading, Station } from '@/lib/api/commissioning';
import { Deviation } from '../ui/deviation';
import { Figure, UnitName } from '../ui/figure';
import { waitingAt, type Commissioning } from './commissioning-context';
import { PlaceLink } from './place-link';

const kindWords = { terminal: '', branch: 'branch', pump: 'pump' } as const;

interface StationTableProps {
  storey: string;
  stations: Station[];
  commissioning: Commissioning;
}

/** The stations of one storey in walking order: design, the round before, this round. A row opens its station. */
export function StationTable({ storey, stations, commissioning }: StationTableProps) {
  const { standing, lastStanding, base, shownRound } = commissioning;
  const left = stations.filter(({ id }) => !standing.has(id) && waitingAt(commissioning, id).length === 0).length;
  const name = storey || 'Without a storey';
  return (
    <section aria-label={name} className="bg-sheet rounded border">
      <div className="flex min-h-12 items-center justify-between gap-3 border-b px-4">
        <h2>{name}</h2>
        {shownRound && (
          <span className="text-quiet text-sm">
            {left === 0 ? (
              'all measured'
            ) : (
              <>
                <span className="figures">{left}</span> of <span className="figures">{stations.length}</span> left
              </>
            )}
          </span>
        )}
      </div>
      <div role="table" aria-label={`Stations, ${name}`}>
        <div
          role="row"
          className="text-quiet hidden gap-x-4 border-b px-4 py-1.5 text-sm sm:grid sm:grid-cols-[minmax(7rem,1.2fr)_minmax(0,1.6fr)_5.5rem_6.5rem_6.5rem_6.5rem]"
        >
          <span role="columnheader">Station</span>
          <span role="columnheader">Room</span>
          <span role="columnheader" className="text-right">
            Design, <UnitName quantity="flow" />
          </span>
          <span role="columnheader" className="text-right">
            Last round, %
          </span>
          <span role="columnheader" className="text-right">
            {shownRound ? `Round ${shownRound.number}` : 'This round'}, <UnitName quantity="flow" />
          </span>
          <span role="columnheader" className="text-right">
            Of design, %
          </span>
        </div>
        {stations.map((station) => (
          <PlaceLink
            key={station.id}
            role="row"
            href={`${base}/stations/${station.id}`}
            className="text-ink hover:bg-well grid min-h-14 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b px-4 py-1.5 no-underline last:border-b-0 sm:grid-cols-[minmax(7rem,1.2fr)_minmax(0,1.6fr)_5.5rem_6.5rem_6.5rem_6.5rem]"
          >
            <span role="cell" className="truncate text-lg font-bold">
              {station.tag} <span className="text-quiet text-sm font-normal">{kindWords[station.kind]}</span>
            </span>
            <span role="cell" className="text-quiet hidden truncate sm:block">
              {station.room}
            </span>
            <span role="cell" className="text-quiet sm:text-ink order-3 text-sm sm:order-none sm:text-right sm:text-base">
              <span className="sm:hidden">design </span>
              <Figure quantity="flow" si={station.designFlowLs} />
            </span>
            <span role="cell" className="hidden text-right sm:block">
              <PerCent reading={lastStanding.get(station.id)} />
            </span>
            <span role="cell" className="order-4 text-right sm:order-none">
              <Figure quantity="flow" si={standing.get(station.id)?.flowLs} className="text-sm sm:text-base" />
            </span>
            <span role="cell" className="text-right text-lg">
              {waitingAt(commissioning, station.id).length > 0 ? (
                <span className="text-brass text-sm font-semibold">on this tablet</span>
              ) : (
                <PerCent reading={standing.get(station.id)} isLeft={Boolean(shownRound)} />
              )}
            </span>
          </PlaceLink>
        ))}
      </div>
    </section>
  );
}

const PerCent = ({ reading, isLeft }: { reading?: Reading; isLeft?: boolean }) =>
  reading ? (
    <Deviation percent={reading.percentOfDesign} verdict={reading.verdict} />
  ) : (
    <span className="text-quiet text-sm">{isLeft ? 'left' : '–'}</span>
  );
