'use client';

import { useState } from 'react';
import { Button } from '../ui/button';
import type { Commissioning } from './commissioning-context';
import { enteredWords } from './entry-words';

/** Readings of this tablet that the server does not take, of whatever round: never thrown away without the person's word. */
export function RefusedEntries({ commissioning: { keptState, kept, round } }: { commissioning: Commissioning }) {
  const [asked, setAsked] = useState<string | null>(null);
  const refused = keptState.entries.filter(({ refusal }) => refusal !== null);
  if (refused.length === 0) return null;
  return (
    <section aria-label="Refused readings" className="border-l-high bg-sheet rounded border border-l-4">
      <h2 className="px-4 pt-3">▴ Kept on this tablet and refused by the server</h2>
      <ul className="divide-y">
        {refused.map(({ reading, tag, refusal, roundId }) => (
          <li key={reading.id} className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 py-2">
            <p className="min-w-48 flex-1">
              <strong>{tag}</strong> <span className="figures">{enteredWords(reading.entered)}</span>
              <span className="text-quiet block text-sm">{refusal}</span>
            </p>
            {round && round.id !== roundId && (
              <Button size="touch" look="primary" className="!text-base" onClick={() => void kept.moveTo(reading.id, round.id)}>
                Keep it in round {round.number}
              </Button>
            )}
            {asked === reading.id ? (
              <>
                <Button size="touch" look="danger" className="!text-base" onClick={() => kept.release(reading.id)}>
                  Yes, throw it away for good
                </Button>
                <Button size="touch" className="!text-base" onClick={() => setAsked(null)} autoFocus>
                  Let it stay
                </Button>
              </>
            ) : (
              <Button size="touch" className="!text-base" onClick={() => setAsked(reading.id)}>
                Throw it away
              </Button>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
