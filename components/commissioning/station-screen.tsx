'use client';

import { useEffect, useRef, useState } from 'react';
import type { RecordReading, Station } from '@/lib/api/commissioning';
import { neighbours } from '@/lib/commissioning/walking-order';
import type { Question } from '@/lib/commissioning/suspicion';
import { classNames } from '../ui/class-names';
import { Notice } from '../ui/notice';
import { waitingAt, type Commissioning } from './commissioning-context';
import { EntryForm } from './entry-form';
import { EntryPad } from './entry-pad';
import { KeptLine } from './kept-line';
import { goTo } from './place-link';
import { QuestionsDialog } from './questions-dialog';
import { StationBar } from './station-bar';
import { StationEntries } from './station-entries';
import { StationHead } from './station-head';
import { useEntry } from './use-entry';
import { ReadTwice } from './read-twice';
import { Photos } from './site/photos';
import { RaiseSnagDialog } from './site/raise-snag-dialog';
import { WaitingEntry } from './waiting-entry';

/** One station, one reading: made for a tablet in a gloved hand, the same on every screen. */
export function StationScreen({ commissioning, station }: { commissioning: Commissioning; station: Station }) {
  const { body, base, loop, round, outbox, outboxState, isEntryOpen } = commissioning;
  const entry = useEntry(commissioning, station);
  const [refused, setRefused] = useState<{ message: string; typed: string } | null>(null);
  const [asked, setAsked] = useState<{ reading: RecordReading; questions: Question[] } | null>(null);
  const { before, next } = neighbours(body.stations, station);
  const ofStation = body.readings.filter(({ stationId }) => stationId === station.id).toReversed();
  // Why it could not be kept is told until something is changed.
  const typed = JSON.stringify([entry.typed, entry.meter?.id]);
  const waiting = waitingAt(commissioning, station.id);

  const isBlank = useRef(entry.isBlank);
  useEffect(() => {
    isBlank.current = entry.isBlank;
  }, [entry.isBlank]);

  const keep = async (reading: RecordReading) => {
    // Where it is known that there is no signal, nobody is made to wait at each station for an answer that does not come.
    const goesOn = outboxState.isOffline;
    setAsked(null);
    await outbox.keep(loop.id, station.tag, { kind: 'reading', roundId: round!.id, body: reading });
    entry.clear();
    const sent = outbox.send();
    if (!goesOn) await sent;
    // Who has typed on or gone elsewhere while it was sent is not taken away.
    const isHere = window.location.pathname.endsWith(station.id) && (goesOn || isBlank.current);
    if (isHere && (goesOn || !outbox.state.entries.some(({ id }) => id === reading.id))) {
      if (next) goTo(`${base}/stations/${next.id}`);
      else if (goesOn) goTo(base);
      else window.location.assign(base);
    }
  };
  const press = () => {
    const finished = entry.finish();
    setRefused('message' in finished ? { message: finished.message, typed } : null);
    if ('message' in finished) return;
    if (finished.questions.length) setAsked(finished);
    else void keep(finished.reading);
  };

  return (
    <div className="flex h-dvh flex-col">
      <StationBar commissioning={commissioning} />
      <main className={classNames('flex min-h-0 flex-1 flex-col', isEntryOpen && 'landscape:flex-row')}>
        <div className="flex min-h-0 flex-1 flex-col gap-3.5 overflow-y-auto p-4 landscape:p-6">
          <StationHead commissioning={commissioning} station={station} />
          {waiting.map((it) => (
            <WaitingEntry
              key={it.id}
              entry={it}
              isSending={outboxState.isSending}
              onSend={() => void outbox.send()}
              onTakeBack={() => {
                void outbox.release(it.id);
                entry.takeUp(it.content.body, it.content.body.correctsReadingId);
              }}
            />
          ))}
          <ReadTwice readings={ofStation} round={round} />
          {isEntryOpen ? (
            <EntryForm
              commissioning={commissioning}
              station={station}
              entry={entry}
              correcting={body.readings.find(({ id }) => id === entry.typed.correctsReadingId)}
              onKeep={press}
            />
          ) : (
            <Notice>
              {commissioning.mayRecord
                ? 'No round is open: readings are entered in a round. Start one on the list of stations.'
                : 'Technicians of the project enter readings here; you read along.'}
            </Notice>
          )}
          <div className="flex flex-wrap items-center gap-2">
            <RaiseSnagDialog commissioning={commissioning} station={station} />
            <Photos commissioning={commissioning} subject="station" subjectId={station.id} tag={station.tag} />
          </div>
          <StationEntries
            readings={ofStation}
            openRoundId={isEntryOpen ? round!.id : null}
            onCorrect={(reading) => entry.takeUp(reading, reading.id)}
          />
        </div>
        <EntryPad
          entry={isEntryOpen ? entry : null}
          message={refused?.typed === typed ? refused.message : null}
          hasWaiting={waiting.length > 0}
          before={before && { tag: before.tag, path: `${base}/stations/${before.id}` }}
          next={next ? { tag: next.tag, path: `${base}/stations/${next.id}` } : null}
          listPath={base}
          onKeep={press}
        />
      </main>
      {commissioning.mayRecord && <KeptLine commissioning={commissioning} />}
      <QuestionsDialog
        questions={asked?.questions ?? []}
        onLookAgain={() => setAsked(null)}
        onKeep={() => asked && void keep(asked.reading)}
      />
    </div>
  );
}
