import { Figure } from '@/components/ui/figure';
import { Moment } from '@/components/ui/moment';
import { Sheet } from '@/components/ui/sheet';
import type { ReportContent } from '@/lib/api/reports';

/** Entries that were put right: what stood there, what stands there now, and why. */
export function CorrectedEntries({ content: { readings } }: { content: ReportContent }) {
  const byId = new Map(readings.map((entry) => [entry.id, entry]));
  const corrections = readings.flatMap((entry) => {
    const wrong = entry.correctsReadingId && byId.get(entry.correctsReadingId);
    return wrong ? [{ wrong, right: entry }] : [];
  });
  if (corrections.length === 0) return null;
  return (
    <Sheet title="Entries that were put right">
      <ul className="divide-y">
        {corrections.map(({ wrong, right }) => (
          <li key={wrong.id} className="break-inside-avoid py-2">
            <span className="font-semibold">{right.tag}</span>{' '}
            <s className="text-quiet">
              <Figure quantity="flow" si={wrong.flowLs} hasUnit />
            </s>{' '}
            <span aria-hidden>→</span> <Figure quantity="flow" si={right.flowLs} hasUnit />
            <span className="text-quiet block text-sm">
              {right.note}. {right.takenBy}, <Moment at={right.takenAt} />
            </span>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
