import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, RowName, TableFrame, Words } from '@/components/ui/table';
import type { ReportContent } from '@/lib/api/reports';

/** What was measured with, and how many entries were taken after its calibration had run out. */
export function InstrumentsTable({ content: { instruments, readings } }: { content: ReportContent }) {
  if (instruments.length === 0) return null;
  return (
    <Sheet title="Instruments" isFlush>
      <TableFrame label="Instruments">
        <thead>
          <tr>
            <Head>Instrument</Head>
            <Head>Calibrated</Head>
            <Head>Due</Head>
            <Head isFigure>Entries</Head>
          </tr>
        </thead>
        <tbody>
          {instruments.map((instrument) => {
            const entries = readings.filter(({ instrumentId }) => instrumentId === instrument.id);
            const overdue = entries.filter(({ isInstrumentOverdue }) => isInstrumentOverdue).length;
            return (
              <tr key={instrument.id}>
                <RowName className="whitespace-normal!">
                  {instrument.serial}
                  <span className="text-quiet block text-xs font-normal">{instrument.name}</span>
                </RowName>
                <Words className="figures whitespace-nowrap">{instrument.calibratedOn ?? '–'}</Words>
                <Words>
                  <span className="figures whitespace-nowrap">{instrument.calibrationDueOn ?? '–'}</span>
                  {overdue > 0 && <span className="text-high block text-xs whitespace-nowrap">▴ overdue for {overdue}</span>}
                </Words>
                <Figures>{entries.length}</Figures>
              </tr>
            );
          })}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
