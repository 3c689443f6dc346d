'use client';

import { useState } from 'react';
import { v7 as uuidv7 } from 'uuid';
import { resolveSnagSchema, type Snag } from '@/lib/api/site';
import { clockOffsetMs } from '@/lib/client/server-clock';
import { Button } from '../../ui/button';
import { TextArea } from '../../ui/field';
import { Moment } from '../../ui/moment';
import { Notice } from '../../ui/notice';
import { Sheet } from '../../ui/sheet';
import type { Commissioning } from '../commissioning-context';
import { PlaceLink } from '../place-link';
import { Photos } from './photos';
import { RaiseSnag } from './raise-snag';

/** What is wrong and what was done about it: open ones first, nothing is ever taken off the list. */
export function SnagsPage({ commissioning }: { commissioning: Commissioning }) {
  const { site, outboxState, loop, mayRaise } = commissioning;
  const open = site.snags.filter(({ resolution }) => !resolution);
  const done = site.snags.filter(({ resolution }) => resolution);
  const waiting = outboxState.entries.flatMap(({ loopId, content }) =>
    loopId === loop.id && content.kind === 'snag' ? [content.body] : [],
  );
  return (
    <main className="mx-auto flex w-full max-w-4xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <h1>Snags</h1>
      {mayRaise && <RaiseSnag commissioning={commissioning} />}
      {waiting.map((snag) => (
        <Notice key={snag.id} tone="brass" title="On this tablet only">
          {snag.text}
        </Notice>
      ))}
      <Sheet title={open.length ? `Open, ${open.length}` : 'Open'} isFlush>
        {open.length === 0 ? (
          <p className="text-quiet px-4 py-3">No snag is open.</p>
        ) : (
          <ul className="divide-y">
            {open.map((snag) => (
              <SnagRow key={snag.id} commissioning={commissioning} snag={snag} />
            ))}
          </ul>
        )}
      </Sheet>
      {done.length > 0 && (
        <Sheet title={`Resolved, ${done.length}`} isFlush>
          <ul className="divide-y">
            {done.map((snag) => (
              <SnagRow key={snag.id} commissioning={commissioning} snag={snag} />
            ))}
          </ul>
        </Sheet>
      )}
    </main>
  );
}

function SnagRow({ commissioning, snag }: { commissioning: Commissioning; snag: Snag }) {
  const { body, base, mayRecord, outbox, loop, outboxState } = commissioning;
  const [isOpen, setOpen] = useState(false);
  const [note, setNote] = useState('');
  const [problem, setProblem] = useState<string>();
  const station = body.stations.find(({ id }) => id === snag.stationId);
  const isWaiting = outboxState.entries.some(({ content }) => content.kind === 'resolution' && content.body.snagId === snag.id);
  const resolve = async () => {
    const parsed = resolveSnagSchema.safeParse({
      id: uuidv7(),
      snagId: snag.id,
      note,
      resolvedAt: new Date().toISOString(),
      clockOffsetMs: clockOffsetMs(),
    });
    if (!parsed.success) return setProblem(parsed.error.issues[0]!.message);
    await outbox.keep(loop.id, `Snag ${snag.number}`, { kind: 'resolution', body: parsed.data });
    setOpen(false);
    void outbox.send();
  };
  return (
    <li className="flex flex-col gap-2 px-4 py-3">
      <div className="flex flex-wrap items-start gap-x-4 gap-y-2">
        <div className="min-w-56 flex-1">
          <p className="text-lg">
            <strong className="figures">{snag.number}</strong> {snag.text}
          </p>
          <p className="text-quiet text-sm">
            {station && (
              <>
                <PlaceLink href={`${base}/stations/${station.id}`}>{station.tag}</PlaceLink>,{' '}
              </>
            )}
            {snag.raisedBy}, <Moment at={snag.raisedAt} />
          </p>
          {snag.resolution && (
            <p className="mt-1">
              ● {snag.resolution.note}{' '}
              <span className="text-quiet text-sm">
                {snag.resolution.resolvedBy}, <Moment at={snag.resolution.resolvedAt} />
              </span>
            </p>
          )}
          {isWaiting && <p className="text-brass text-sm">Resolved on this tablet, not sent yet.</p>}
        </div>
        {mayRecord && !snag.resolution && !isWaiting && (
          <Button size="touch" className="!text-base" aria-expanded={isOpen} onClick={() => setOpen(!isOpen)}>
            Resolve
          </Button>
        )}
      </div>
      {isOpen && (
        <div className="flex flex-col gap-2">
          <TextArea
            label="What was done, and what it reads now"
            value={note}
            error={problem}
            maxLength={1000}
            className="text-lg"
            onChange={({ target }) => setNote(target.value)}
          />
          <div className="flex justify-end">
            <Button size="touch" look="primary" className="!text-base" onClick={() => void resolve()}>
              It is resolved
            </Button>
          </div>
        </div>
      )}
      <Photos commissioning={commissioning} subject="snag" subjectId={snag.id} tag={`snag ${snag.number}`} />
    </li>
  );
}
