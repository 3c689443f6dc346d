import { ChevronLeft } from 'lucide-react';
import { FlowStrip } from '../strip/flow-strip';
import { isListStale, measuredIn, stripOf, type Commissioning } from './commissioning-context';
import { PlaceLink } from './place-link';

/** Heads a station's screen in place of the loop's pages: the way back, the round, how far it has come. */
export function StationBar({ commissioning }: { commissioning: Commissioning }) {
  const { loop, base, shownRound, body } = commissioning;
  return (
    <header data-own-header className="bg-sheet flex min-h-14 shrink-0 items-center gap-3 border-b pr-4">
      <PlaceLink
        href={base}
        isOrdinary={isListStale(commissioning)}
        aria-label="All stations"
        className="text-ink flex size-14 shrink-0 items-center justify-center no-underline"
      >
        <ChevronLeft size={22} aria-hidden />
      </PlaceLink>
      <p className="min-w-0 truncate">
        <strong>{loop.name}</strong>
        {shownRound && (
          <span className="text-quiet ml-3">
            Round {shownRound.number}, {shownRound.purpose}
          </span>
        )}
      </p>
      <div className="ml-auto flex items-center gap-4">
        <span className="hidden md:block">
          <FlowStrip ticks={stripOf(commissioning)} band={body.band} />
        </span>
        <span className="figures text-quiet whitespace-nowrap">
          {measuredIn(commissioning)} of {body.stations.length}
          <span className="sr-only"> stations measured</span>
        </span>
      </div>
    </header>
  );
}
