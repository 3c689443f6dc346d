'use client';

import { useState } from 'react';
import { Button } from '../ui/button';
import type { Commissioning } from './commissioning-context';
import { keptWords } from './kept-words';

/** Entries of this tablet that the server does not take, of whatever round: never thrown away without the person's word. */
export function RefusedEntries({ commissioning: { loop, outboxState, outbox, round } }: { commissioning: Commissioning }) {
  const [asked, setAsked] = useState<string | null>(null);
  const refused = outboxState.entries.filter(({ loopId, refusal }) => loopId === loop.id && refusal !== null);
  if (refused.length === 0) return null;
  return (
    <section aria-label="Refused entries" className="border-l-high bg-sheet rounded border border-l-4">
      <h2 className="px-4 pt-3">▴ Kept on this tablet and refused by the server</h2>
      <ul className="divide-y">
        {refused.map((entry) => (
          <li key={entry.id} className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 py-2">
            <p className="min-w-48 flex-1">
              <strong>{entry.tag}</strong> <span className="figures">{keptWords(entry)}</span>
              <span className="text-quiet block text-sm">{entry.refusal}</span>
            </p>
            {round && 'roundId' in entry.content && entry.content.roundId !== round.id ? (
              <Button size="touch" look="primary" className="!text-base" onClick={() => void outbox.moveTo(entry.id, round.id)}>
                Keep it in round {round.number}
              </Button>
            ) : (
              <Button size="touch" className="!text-base" onClick={() => void outbox.tryAgain(entry.id)}>
                Try again
              </Button>
            )}
            {asked === entry.id ? (
              <>
                <Button size="touch" look="danger" className="!text-base" onClick={() => void outbox.release(entry.id)}>
                  Yes, throw it away for good
                </Button>
                <Button size="touch" className="!text-base" onClick={() => setAsked(null)} autoFocus>
                  Let it stay
                </Button>
              </>
            ) : (
              <Button size="touch" className="!text-base" onClick={() => setAsked(entry.id)}>
                Throw it away
              </Button>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
