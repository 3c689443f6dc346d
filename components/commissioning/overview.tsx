'use client';

import { QrCode } from 'lucide-react';
import { byStorey } from '@/lib/commissioning/walking-order';
import { FlowStrip } from '../strip/flow-strip';
import { Notice } from '../ui/notice';
import { Sheet } from '../ui/sheet';
import { TakeAlong } from '../aboard/take-along';
import { CautionsBox } from './cautions-box';
import { measuredIn, stripOf, type Commissioning } from './commissioning-context';
import { NotIssued } from './not-issued';
import { OrderDialog } from './order-dialog';
import { PastRounds } from './past-rounds';
import { RefusedEntries } from './refused-entries';
import { RoundHead } from './round-head';
import { StationTable } from './station-table';

/** A loop's stations: the round that is open, what is left of it, and what came before. */
export function Overview({ commissioning }: { commissioning: Commissioning }) {
  const { body, loop, personId, shownRound, mayRecord, mayRaise } = commissioning;
  if (!body.revision) return <NotIssued name={loop.name} />;
  const measured = measuredIn(commissioning);
  return (
    <main className="mx-auto flex w-full max-w-6xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <RoundHead commissioning={commissioning} measured={measured} />
      <RefusedEntries commissioning={commissioning} />
      {shownRound && (
        <Sheet
          title={`Flow strip, round ${shownRound.number}`}
          action={<span className="text-quiet text-sm">terminals in walking order</span>}
        >
          <FlowStrip ticks={stripOf(commissioning)} band={body.band} size="page" />
        </Sheet>
      )}
      {mayRecord && <TakeAlong about={{ personId, loop, mayRecord, mayRaise }} />}
      {mayRecord && <CautionsBox />}
      {body.stations.length === 0 ? (
        <Notice tone="brass" title="No stations">
          This revision has no terminal, balancing valve or pump with a design flow, so there is nothing to measure.
        </Notice>
      ) : (
        byStorey(body.stations).map(({ storey, stations }) => (
          <StationTable key={storey} storey={storey} stations={stations} commissioning={commissioning} />
        ))
      )}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        {mayRecord && <OrderDialog commissioning={commissioning} />}
        <a href={`${commissioning.base}/labels`} className="inline-flex min-h-12 items-center gap-2 px-3 font-semibold">
          <QrCode size={20} aria-hidden /> Labels for the stations
        </a>
      </div>
      <PastRounds commissioning={commissioning} />
    </main>
  );
}
