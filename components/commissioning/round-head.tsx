'use client';

import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { toast } from 'sonner';
import { closeRound, commissioningQuery } from '@/lib/client/commissioning';
import { openChecks } from '@/lib/commissioning/readiness-checks';
import { firstOf } from '@/lib/commissioning/walking-order';
import { Button, buttonClass } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { Moment } from '../ui/moment';
import { waitingAt, type Commissioning } from './commissioning-context';
import { PlaceLink } from './place-link';
import { StartRoundDialog } from './start-round-dialog';

/** Which round is open and how far it has come; starting one, walking on in it, closing it. */
export function RoundHead({ commissioning, measured }: { commissioning: Commissioning; measured: number }) {
  const { body, round, base, loop, mayRecord, standing } = commissioning;
  const [isStarting, setStarting] = useState(false);
  const [isClosing, setClosing] = useState(false);
  const total = body.stations.length;
  const unmeasured = body.stations.filter(({ id }) => !standing.has(id) && waitingAt(commissioning, id).length === 0);
  const first = firstOf(unmeasured);
  const mayStart = mayRecord && !round && (loop.state === 'issued' || loop.state === 'in-commissioning');
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
      <div>
        <h1>{round ? `Round ${round.number}, ${round.purpose}` : 'Commissioning'}</h1>
        <p className="text-quiet">
          {round ? (
            <>
              <span className="figures text-ink font-bold">{measured}</span> of <span className="figures">{total}</span> stations measured,{' '}
              <span className="figures text-ink font-bold">{total - measured}</span> left. Started by {round.startedBy},{' '}
              <Moment at={round.startedAt} />.
            </>
          ) : (
            standsWords(commissioning)
          )}
        </p>
      </div>
      {mayRecord && (
        <div className="flex flex-wrap gap-2">
          {round && (
            <Button size="touch" className="!text-base" onClick={() => setClosing(true)}>
              Close the round
            </Button>
          )}
          {round && first && (
            <PlaceLink href={`${base}/stations/${first.id}`} className={`${buttonClass('primary', 'touch')} no-underline`}>
              {measured === 0 ? 'Begin at' : 'Go on at'} {first.tag}
            </PlaceLink>
          )}
          {mayStart && (
            <Button size="touch" look="primary" onClick={() => setStarting(true)}>
              Start {body.rounds.length ? 'another round' : 'the first round'}
            </Button>
          )}
        </div>
      )}
      <Dialog
        isOpen={isStarting}
        onClose={() => setStarting(false)}
        title="Start a round"
        description="One pass of readings over the stations. Entries go into the round that is open."
      >
        <StartRoundDialog loopId={loop.id} openChecks={openChecks(commissioning.site.checks).length} onDone={() => setStarting(false)} />
      </Dialog>
      {round && (
        <Dialog isOpen={isClosing} onClose={() => setClosing(false)} title={`Close round ${round.number}?`}>
          <CloseRound commissioning={commissioning} left={total - measured} onDone={() => setClosing(false)} />
        </Dialog>
      )}
    </div>
  );
}

function CloseRound({ commissioning, left, onDone }: { commissioning: Commissioning; left: number; onDone: () => void }) {
  const queries = useQueryClient();
  const router = useRouter();
  const { loop, round, outboxState } = commissioning;
  const waiting = outboxState.entries.filter(({ content }) => 'roundId' in content && content.roundId === round?.id).length;
  const close = useMutation({
    mutationFn: () => closeRound(round!.id),
    onSuccess: async (closed) => {
      await queries.invalidateQueries({ queryKey: commissioningQuery(loop.id).queryKey });
      toast(`Round ${closed.number} is closed`);
      onDone();
      router.refresh();
    },
  });
  return (
    <div className="flex flex-col gap-4">
      <p>
        No reading enters a closed round any more, and none of its entries can be put right.
        {left > 0 && ` ${left === 1 ? 'One station has' : `${left} stations have`} no reading in it.`}
      </p>
      {waiting > 0 && (
        <p className="text-high">
          ▴ {waiting === 1 ? 'One entry is' : `${waiting} entries are`} still on this tablet only and would be refused afterwards. Send
          first.
        </p>
      )}
      {close.error && (
        <p role="alert" className="text-high">
          ▴ {close.error.message}
        </p>
      )}
      <div className="flex flex-wrap justify-end gap-2">
        <Button size="touch" className="!text-base" onClick={onDone}>
          Keep it open
        </Button>
        <Button
          size="touch"
          look="primary"
          className="!text-base"
          disabled={waiting > 0}
          isPending={close.isPending}
          pendingText="Closing…"
          onClick={() => close.mutate()}
        >
          Close the round
        </Button>
      </div>
    </div>
  );
}

function standsWords({ loop, body, mayRecord }: Commissioning): string {
  if (loop.state === 'submitted' || loop.state === 'reviewed')
    return `The report is ${loop.state}. It must be returned before another round is started.`;
  if (loop.state === 'accepted') return 'The report is accepted. A new revision has to be issued before another round is started.';
  if (!mayRecord) return body.rounds.length ? 'No round is open.' : 'No round has been started yet.';
  return body.rounds.length
    ? 'No round is open. Start one to enter readings.'
    : 'Nothing is measured yet. Start the first round to enter readings.';
}
