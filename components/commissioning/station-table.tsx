import type { Reading, Station } from '@/lib/api/commissioning';
import { Deviation } from '../ui/deviation';
import { Figure, UnitName } from '../ui/figure';
import { waitingAt, type Commissioning } from './commissioning-context';
import { PlaceLink } from './place-link';

const kindWords = { terminal: '', branch: 'branch', pump: 'pump' } as const;

/** From a tablet's width on; on a phone a station takes two lines. */
const columns = 'sm:grid-cols-[minmax(7rem,1.2fr)_minmax(0,1.6fr)_5.5rem_6.5rem_6.5rem_6.5rem]';

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
      <div>
        <div aria-hidden className={`text-quiet hidden gap-x-4 border-b px-4 py-1.5 text-sm sm:grid ${columns}`}>
          <span>Station</span>
          <span>Room</span>
          <span className="text-right">
            Design, <UnitName quantity="flow" />
          </span>
          <span className="text-right">Last round, %</span>
          <span className="text-right">
            {shownRound ? `Round ${shownRound.number}` : 'This round'}, <UnitName quantity="flow" />
          </span>
          <span className="text-right">Of design, %</span>
        </div>
        {stations.map((station) => (
          <PlaceLink
            key={station.id}
            href={`${base}/stations/${station.id}`}
            className={`text-ink hover:bg-well grid min-h-14 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b px-4 py-1.5 no-underline last:border-b-0 ${columns}`}
          >
            <span className="truncate text-lg font-bold">
              {station.tag} <span className="text-quiet text-sm font-normal">{kindWords[station.kind]}</span>
            </span>
            <span className="text-quiet hidden truncate sm:block">{station.room}</span>
            <span className="text-quiet sm:text-ink order-3 text-sm sm:order-none sm:text-right sm:text-base">
              <span className="sm:sr-only">design </span>
              <Figure quantity="flow" si={station.designFlowLs} />
            </span>
            <span className="hidden text-right sm:block">
              <span className="sr-only">last round </span>
              <PerCent reading={lastStanding.get(station.id)} />
            </span>
            <span className="order-4 text-right sm:order-none">
              <span className="sr-only">this round </span>
              <Figure quantity="flow" si={standing.get(station.id)?.flowLs} className="text-sm sm:text-base" />
            </span>
            <span className="text-right text-lg">
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
