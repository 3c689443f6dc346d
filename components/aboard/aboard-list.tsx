'use client';

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { leaveBehind, takeAlong, type AboardLoop } from '@/lib/client/aboard';
import { Button } from '../ui/button';
import { Moment } from '../ui/moment';
import { Notice } from '../ui/notice';
import { aboardWords } from './aboard-words';

interface AboardListProps {
  person: { id: string; name: string };
  loops: AboardLoop[];
  /** Whether another page was asked for that is not aboard. */
  isElsewhere: boolean;
}

/** Every loop that is on this device, how old it is, and the way to its stations. */
export function AboardList({ person, loops, isElsewhere }: AboardListProps) {
  return (
    <main className="mx-auto flex w-full max-w-4xl flex-1 flex-col gap-4 p-4 lg:py-6">
      <h1>Aboard this tablet</h1>
      {isElsewhere && (
        <Notice tone="brass" title="No signal">
          The page you asked for is not aboard and the server does not answer. What you entered is kept and sent when there is signal.
        </Notice>
      )}
      {loops.length === 0 ? (
        <Notice>
          Nothing is aboard. Open a loop’s Commissioning page where there is signal and press “Take along”: then it opens here without any,
          also after the browser was closed.
        </Notice>
      ) : (
        <ul className="bg-sheet divide-y rounded border">
          {loops.map((aboard) => (
            <AboardRow key={aboard.loop.id} personId={person.id} aboard={aboard} />
          ))}
        </ul>
      )}
    </main>
  );
}

function AboardRow({ personId, aboard }: { personId: string; aboard: AboardLoop }) {
  const queries = useQueryClient();
  const onSuccess = () => queries.invalidateQueries({ queryKey: ['aboard', personId] });
  const renew = useMutation({ mutationFn: () => takeAlong(aboard), onSuccess });
  const leave = useMutation({ mutationFn: () => leaveBehind(personId, aboard.loop.id), onSuccess, networkMode: 'always' });
  return (
    <li className="flex flex-wrap items-center gap-x-4 gap-y-2 px-4 py-3">
      <div className="min-w-56 flex-1">
        <a href={`/projects/${aboard.loop.projectId}/loops/${aboard.loop.id}/commissioning`} className="text-lg font-bold">
          {aboard.loop.name}
        </a>
        <p className="text-quiet text-sm">
          {aboardWords(aboard)}. Read <Moment at={aboard.takenAt} />.
        </p>
        {renew.error && (
          <p role="alert" className="text-high text-sm">
            ▴ {renew.error.message} What is aboard stays as it is.
          </p>
        )}
      </div>
      <Button size="touch" className="!text-base" isPending={renew.isPending} pendingText="Reading…" onClick={() => renew.mutate()}>
        Read it anew
      </Button>
      <Button size="touch" look="quiet" className="!text-base" isPending={leave.isPending} onClick={() => leave.mutate()}>
        Leave behind
      </Button>
    </li>
  );
}
