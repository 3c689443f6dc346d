'use client';

import type { Round } from '@/lib/api/commissioning';
import { standingReadings } from '@/lib/commissioning/standing-readings';
import { FlowStrip } from '../../strip/flow-strip';
import { Deviation } from '../../ui/deviation';
import { Notice } from '../../ui/notice';
import { Sheet } from '../../ui/sheet';
import { Figures, Head, onlyWide, RowName, TableFrame, Words } from '../../ui/table';
import { bandWords, placeOf, type Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';

/** Every round's terminals against design: the strip of each, and each terminal round by round. Whoever watches sees entries as they arrive. */
export function ChartPage({ commissioning }: { commissioning: Commissioning }) {
  const { body, base } = commissioning;
  const terminals = body.stations.filter(({ kind }) => kind === 'terminal');
  const rounds = body.rounds.map((round) => ({ round, standing: standingReadings(body.readings, round.id) }));
  const last = rounds.at(-1);
  const isWithin = (id: string) => last?.standing.get(id)?.verdict === 'within';
  return (
    <main className="mx-auto flex w-full max-w-6xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <h1>Rounds</h1>
      {!last ? (
        <Notice>No round has been started yet.</Notice>
      ) : (
        <>
          <p className="text-quiet">
            <span className="figures text-ink font-bold">{terminals.filter(({ id }) => isWithin(id)).length}</span> of{' '}
            <span className="figures">{terminals.length}</span> terminals are within{' '}
            {bandWords({ lowerPercent: body.band.lowerPercent - 100, upperPercent: body.band.upperPercent - 100 })} in round{' '}
            {last.round.number},{' '}
            <span className="figures text-ink font-bold">{terminals.filter(({ id }) => !last.standing.has(id)).length}</span> are left to
            read.
          </p>
          {rounds.toReversed().map(({ round, standing }) => (
            <Sheet
              key={round.id}
              title={nameOf(round)}
              action={<Counts terminals={terminals.length} standing={terminals.flatMap(({ id }) => standing.get(id) ?? [])} />}
            >
              <FlowStrip
                size="page"
                band={body.band}
                ticks={terminals.map(({ id, tag }) => {
                  const reading = standing.get(id);
                  return { tag, percentOfDesign: reading?.percentOfDesign ?? null, verdict: reading?.verdict ?? null };
                })}
              />
            </Sheet>
          ))}
          <Sheet title="Each terminal, round by round" isFlush>
            <TableFrame label="Each terminal, round by round">
              <thead>
                <tr>
                  <Head>Terminal</Head>
                  <Head className={onlyWide}>Place</Head>
                  {rounds.map(({ round }) => (
                    <Head key={round.id} isFigure unit="% of design">
                      Round {round.number}
                    </Head>
                  ))}
                </tr>
              </thead>
              <tbody>
                {terminals.map((station) => (
                  <tr key={station.id}>
                    <RowName>
                      <PlaceLink href={`${base}/stations/${station.id}`}>{station.tag}</PlaceLink>
                    </RowName>
                    <Words className={`text-quiet ${onlyWide}`}>{placeOf(station)}</Words>
                    {rounds.map(({ round, standing }) => {
                      const reading = standing.get(station.id);
                      return (
                        <Figures key={round.id}>
                          {reading ? <Deviation percent={reading.percentOfDesign} verdict={reading.verdict} /> : '–'}
                        </Figures>
                      );
                    })}
                  </tr>
                ))}
              </tbody>
            </TableFrame>
          </Sheet>
        </>
      )}
    </main>
  );
}

const nameOf = ({ number, purpose, closedAt }: Round): string => `Round ${number}, ${purpose}${closedAt ? '' : ' (open)'}`;

function Counts({ terminals, standing }: { terminals: number; standing: { verdict: string; stationId: string }[] }) {
  const count = (verdict: string) => standing.filter((reading) => reading.verdict === verdict).length;
  return (
    <span className="flex flex-wrap gap-x-3 text-sm whitespace-nowrap">
      <span>
        ● <span className="figures">{count('within')}</span>
      </span>
      <span className="text-low">
        ▾ <span className="figures">{count('low')}</span>
      </span>
      <span className="text-high">
        ▴ <span className="figures">{count('high')}</span>
      </span>
      <span className="text-quiet">of {terminals}</span>
    </span>
  );
}
