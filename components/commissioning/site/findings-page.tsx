'use client';

import { v7 as uuidv7 } from 'uuid';
import type { Diagnosis } from '@/lib/balancing/diagnose';
import { clockOffsetMs } from '@/lib/client/server-clock';
import { Button } from '../../ui/button';
import { Figure } from '../../ui/figure';
import { Notice } from '../../ui/notice';
import { Sheet } from '../../ui/sheet';
import { Figures, Head, RowName, TableFrame } from '../../ui/table';
import { placeOf, type Commissioning } from '../commissioning-context';
import { stationFinder } from '../next/station-finder';
import { usePlan } from '../next/use-plan';
import { PlaceLink } from '../place-link';

/** Where the readings do not fit the loop as designed: what may be behind it, in the order to check, never as a verdict. */
export function FindingsPage({ commissioning }: { commissioning: Commissioning }) {
  const { data: plan, error } = usePlan(commissioning);
  const predicted = plan?.predicted ?? null;
  return (
    <main className="mx-auto flex w-full max-w-6xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <h1>Findings</h1>
      {error && (
        <Notice tone="high" title="The readings could not be looked through">
          {error.message}
        </Notice>
      )}
      {!plan && !error && <Notice>Looking through the readings on this device…</Notice>}
      {plan && !predicted && <Notice>Nothing is read under this revision yet, so there is nothing to find.</Notice>}
      {predicted && predicted.diagnoses.length === 0 && (
        <Notice title="Nothing stands out">Every reading fits the loop as drawn, within what meters and pipes usually differ by.</Notice>
      )}
      {predicted?.diagnoses.map((diagnosis, at) => (
        <FindingSheet key={`${diagnosis.at}-${at}`} commissioning={commissioning} diagnosis={diagnosis} />
      ))}
      {predicted && predicted.farthest.length > 0 && <FarthestSheet commissioning={commissioning} farthest={predicted.farthest} />}
    </main>
  );
}

function FindingSheet({ commissioning, diagnosis }: { commissioning: Commissioning; diagnosis: Diagnosis }) {
  const { base, outbox, loop, mayRecord, site, outboxState } = commissioning;
  const station = diagnosis.at === null ? undefined : stationFinder(commissioning)(diagnosis.at);
  const title = diagnosis.at === null ? 'The whole loop' : (station?.tag ?? 'A pipe or piece without a station');
  const [first] = diagnosis.causes;
  const text = `${title}: ${diagnosis.evidence} Likeliest first: ${diagnosis.causes.map(({ name }) => name).join('; ')}.`.slice(0, 1000);
  const isOpen = site.snags.some(
    (snag) => snag.stationId === (station?.id ?? null) && !snag.resolution && snag.text.startsWith(`${title}:`),
  );
  const isWaiting = outboxState.entries.some(({ content }) => content.kind === 'snag' && content.body.text === text);
  const raise = async () => {
    await outbox.keep(loop.id, title, {
      kind: 'snag',
      body: { id: uuidv7(), stationId: station?.id ?? null, text, raisedAt: new Date().toISOString(), clockOffsetMs: clockOffsetMs() },
    });
    void outbox.send();
  };
  return (
    <Sheet
      title={title}
      action={
        isOpen || isWaiting ? (
          <span className="text-quiet text-sm">a snag is open</span>
        ) : (
          mayRecord &&
          first && (
            <Button size="touch" className="!text-base" onClick={() => void raise()}>
              Make it a snag
            </Button>
          )
        )
      }
    >
      {station && (
        <p className="text-quiet">
          <PlaceLink href={`${base}/stations/${station.id}`}>{placeOf(station)}</PlaceLink>
        </p>
      )}
      <p className="mt-1 text-lg">{diagnosis.evidence}</p>
      <p className="text-quiet mt-2 text-sm">Possible causes, check in this order:</p>
      <ol className="list-decimal pl-6">
        {diagnosis.causes.map(({ cause, name, nextCheck }) => (
          <li key={cause} className="py-1">
            <strong className="inline-block first-letter:uppercase">{name}.</strong> {nextCheck}
          </li>
        ))}
      </ol>
    </Sheet>
  );
}

interface FarthestProps {
  commissioning: Commissioning;
  farthest: { link: string; shown: number; expected: number; quantity: 'dropKpa' | 'flowLs'; deviations: number }[];
}

function FarthestSheet({ commissioning, farthest }: FarthestProps) {
  const stationOf = stationFinder(commissioning);
  return (
    <Sheet title="Readings farthest from the fitted loop" isFlush>
      <TableFrame label="Readings farthest from the fitted loop">
        <thead>
          <tr>
            <Head>Station</Head>
            <Head isFigure>Read</Head>
            <Head isFigure>Loop would show</Head>
            <Head isFigure unit="of one standard deviation">
              Apart by
            </Head>
          </tr>
        </thead>
        <tbody>
          {farthest.map(({ link, shown, expected, quantity, deviations }, at) => (
            <tr key={`${link}-${at}`}>
              <RowName>{stationOf(link)?.tag ?? link}</RowName>
              <Figures>
                <Figure quantity={quantity === 'flowLs' ? 'flow' : 'pressure'} si={shown} hasUnit />
              </Figures>
              <Figures>
                <Figure quantity={quantity === 'flowLs' ? 'flow' : 'pressure'} si={expected} hasUnit />
              </Figures>
              <Figures>{deviations.toFixed(1)}</Figures>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
