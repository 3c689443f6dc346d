import { standingReadings } from '@/lib/commissioning/standing-readings';
import { Moment } from '../ui/moment';
import { Sheet } from '../ui/sheet';
import type { Commissioning } from './commissioning-context';

/** The rounds that are closed, newest first: what each was for and how it came out. */
export function PastRounds({ commissioning: { body } }: { commissioning: Commissioning }) {
  const past = body.rounds.filter(({ closedAt }) => closedAt !== null).toReversed();
  if (past.length === 0) return null;
  return (
    <Sheet title="Past rounds" isFlush>
      <ul className="divide-y">
        {past.map((round) => {
          const standing = [...standingReadings(body.readings, round.id).values()];
          const count = (verdict: 'low' | 'within' | 'high') => standing.filter((reading) => reading.verdict === verdict).length;
          return (
            <li key={round.id} className="flex flex-wrap items-baseline gap-x-6 gap-y-1 px-4 py-3">
              <span className="min-w-48 flex-1">
                <strong>
                  Round {round.number}, {round.purpose}
                </strong>
                <span className="text-quiet block text-sm">
                  Revision {round.revisionNumber}, {round.startedBy}, closed <Moment at={round.closedAt!} />
                </span>
              </span>
              <span className="flex flex-wrap gap-x-4">
                <span className="whitespace-nowrap">
                  ● <span className="figures">{count('within')}</span> within
                </span>
                <span className="text-low whitespace-nowrap">
                  ▾ <span className="figures">{count('low')}</span> low
                </span>
                <span className="text-high whitespace-nowrap">
                  ▴ <span className="figures">{count('high')}</span> high
                </span>
              </span>
            </li>
          );
        })}
      </ul>
    </Sheet>
  );
}
