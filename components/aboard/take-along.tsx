'use client';

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { TabletSmartphone } from 'lucide-react';
import { aboardLoop, leaveBehind, takeAlong, type AboardLoop } from '@/lib/client/aboard';
import { canStartOffline } from '@/lib/client/shell-cache';
import { Button } from '../ui/button';
import { Moment } from '../ui/moment';
import { aboardWords } from './aboard-words';

/** One tap makes a loop ready to work without signal; afterwards it says what is aboard and how old it is. */
export function TakeAlong({ about }: { about: Pick<AboardLoop, 'personId' | 'loop' | 'mayRecord' | 'mayRaise'> }) {
  const { personId, loop } = about;
  const queries = useQueryClient();
  const queryKey = ['aboard', personId, loop.id];
  const { data: aboard, isPending } = useQuery({ queryKey, queryFn: () => aboardLoop(personId, loop.id), networkMode: 'always' });
  const onSuccess = () => queries.invalidateQueries({ queryKey: ['aboard', personId] });
  const take = useMutation({ mutationFn: () => takeAlong(about), onSuccess });
  const leave = useMutation({ mutationFn: () => leaveBehind(personId, loop.id), onSuccess, networkMode: 'always' });
  if (isPending) return null;
  return (
    <section aria-label="Without signal" className="bg-sheet flex flex-wrap items-center gap-x-4 gap-y-2 rounded border px-4 py-2">
      <TabletSmartphone size={20} aria-hidden className={aboard ? 'text-petrol' : 'text-quiet'} />
      <p className="min-w-56 flex-1" role="status">
        {take.error ? (
          <span className="text-high">▴ {take.error.message}</span>
        ) : aboard ? (
          <>
            <strong>Aboard.</strong>{' '}
            <span className="text-quiet">
              {aboardWords(aboard)}. Read <Moment at={aboard.takenAt} />.
            </span>
          </>
        ) : canStartOffline() ? (
          <span className="text-quiet">Not aboard: without signal this loop does not open on this device.</span>
        ) : (
          <span className="text-quiet">This browser opens Evenhead without signal only over HTTPS.</span>
        )}
      </p>
      {aboard && (
        <Button size="touch" look="quiet" className="!text-base" isPending={leave.isPending} onClick={() => leave.mutate()}>
          Leave behind
        </Button>
      )}
      <Button
        size="touch"
        className="!text-base"
        disabled={!canStartOffline()}
        isPending={take.isPending}
        pendingText="Taking along…"
        onClick={() => take.mutate()}
      >
        {aboard ? 'Read it anew' : 'Take along'}
      </Button>
    </section>
  );
}
