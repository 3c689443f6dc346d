import { Moment } from '@/components/ui/moment';
import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, RowName, TableFrame, Words } from '@/components/ui/table';
import type { ReportContent } from '@/lib/api/reports';

/** The passes of readings, in their order. */
export function RoundsTable({ content: { rounds, readings } }: { content: ReportContent }) {
  if (rounds.length === 0) return null;
  return (
    <Sheet title="Rounds" isFlush>
      <TableFrame label="Rounds">
        <thead>
          <tr>
            <Head>Round</Head>
            <Head isFigure>Entries</Head>
            <Head>Started by</Head>
            <Head>Started</Head>
          </tr>
        </thead>
        <tbody>
          {rounds.map((round) => (
            <tr key={round.id}>
              <RowName className="whitespace-normal!">
                {round.number} <span className="font-normal">{round.purpose}</span>
              </RowName>
              <Figures>{readings.filter(({ roundId }) => roundId === round.id).length}</Figures>
              <Words>{round.startedBy}</Words>
              <Words className="whitespace-nowrap">
                <Moment at={round.startedAt} />
              </Words>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
