import type { Reading } from '@/lib/api/commissioning';
import { readingMethods } from '@/lib/commissioning/reading-methods';
import { Button } from '../ui/button';
import { classNames } from '../ui/class-names';
import { Deviation } from '../ui/deviation';
import { Figure } from '../ui/figure';
import { Moment } from '../ui/moment';
import { enteredWords } from './entry-words';

interface StationEntriesProps {
  /** Of this station, newest first. */
  readings: Reading[];
  /** The open round; its standing entries may be put right. Null where nothing may be entered. */
  openRoundId: string | null;
  onCorrect: (reading: Reading) => void;
}

/** Everything that was ever read here; what was put right stays, struck, with the reason beside the entry that replaced it. */
export function StationEntries({ readings, openRoundId, onCorrect }: StationEntriesProps) {
  if (readings.length === 0) return null;
  const correctionOf = new Map(readings.map((reading) => [reading.correctsReadingId, reading]));
  return (
    <section aria-labelledby="entries" className="mt-2">
      <h2 id="entries">Entries at this station</h2>
      <ol className="divide-y">
        {readings.map((reading) => (
          <li key={reading.id} className="flex flex-wrap items-center gap-x-4 gap-y-1 py-2">
            <div className="min-w-0 flex-1 basis-72">
              <p className={classNames('flex flex-wrap items-baseline gap-x-3', reading.isCorrected && 'text-quiet')}>
                {reading.isCorrected ? (
                  <del className="decoration-2">
                    <Outcome reading={reading} />
                  </del>
                ) : (
                  <Outcome reading={reading} />
                )}
                <span className="text-quiet text-sm">
                  Round {reading.roundNumber} · {readingMethods[reading.method].name} ·{' '}
                  <span className="figures">{enteredWords(reading.entered)}</span>
                </span>
              </p>
              <p className="text-quiet text-sm">
                <Moment at={reading.takenAt} />, {reading.takenBy}, {reading.instrumentName}
                {reading.isInstrumentOverdue && <span className="text-high"> ▴ overdue that day</span>}
                {reading.isInstrumentOutOfRange && <span className="text-high"> ▴ outside its range</span>}
              </p>
              {reading.note && (
                <p className="text-sm">
                  {reading.correctsReadingId ? <strong>Puts an earlier entry right: </strong> : <strong>Note: </strong>}
                  {reading.note}
                </p>
              )}
              {reading.isCorrected && <p className="text-sm">Counts no more: {correctionOf.get(reading.id)?.note}</p>}
            </div>
            {!reading.isCorrected && reading.roundId === openRoundId && (
              <Button size="touch" look="quiet" className="!px-3 !text-base" onClick={() => onCorrect(reading)}>
                Correct this entry
              </Button>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}

const Outcome = ({ reading }: { reading: Reading }) => (
  <span className="whitespace-nowrap">
    <Figure quantity="flow" si={reading.flowLs} hasUnit className="text-lg font-bold" />
    <Deviation
      percent={reading.percentOfDesign}
      verdict={reading.verdict}
      className={classNames('ml-3 text-lg', reading.isCorrected && 'text-quiet')}
    />
    <span className="text-quiet ml-1 text-sm">%, ±{reading.uncertaintyPercent.toFixed(1)} %</span>
  </span>
);
