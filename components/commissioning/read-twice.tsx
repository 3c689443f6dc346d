import type { Reading, Round } from '@/lib/api/commissioning';
import { Notice } from '../ui/notice';

/** Where two people read one station in the same round both entries are kept, and both people are told which counts. */
export function ReadTwice({ readings, round }: { readings: Reading[]; round: Round | null }) {
  const standing = readings.filter(({ roundId, isCorrected }) => roundId === round?.id && !isCorrected);
  const people = new Set(standing.map(({ takenBy }) => takenBy));
  if (people.size < 2) return null;
  const [last] = standing.toSorted((a, b) => Date.parse(b.takenAt) - Date.parse(a.takenAt));
  return (
    <Notice tone="brass" title={`Read by ${[...people].join(' and ')} in this round`}>
      Both entries are kept. That of {last!.takenBy}, taken last, counts.
    </Notice>
  );
}
