import { Figure, UnitName } from '@/components/ui/figure';
import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, RowName, onlyWide, TableFrame, Words } from '@/components/ui/table';
import { terminalsOf } from '@/lib/api/report-judgement';
import type { ReportContent } from '@/lib/api/reports';
import { OfDesign } from './of-design';

/** Every terminal as it was left; on a phone what counts, the rest is in the workbook. */
export function TerminalsTable({ content }: { content: ReportContent }) {
  const serialOf = new Map(content.instruments.map(({ id, serial }) => [id, serial]));
  return (
    <Sheet title="Terminals" isFlush>
      <TableFrame label="Terminals">
        <thead>
          <tr>
            <Head>Terminal</Head>
            <Head className={onlyWide}>Room</Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Design
            </Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Measured
            </Head>
            <Head isFigure unit="%">
              Of design
            </Head>
            <Head isFigure unit="± %" className={onlyWide}>
              Uncertainty
            </Head>
            <Head isFigure unit={<UnitName quantity="setting" />} className={onlyWide}>
              Setting
            </Head>
            <Head isFigure unit={<UnitName quantity="pressure" />} className={onlyWide}>
              Drop
            </Head>
            <Head className={onlyWide}>Instrument</Head>
            <Head isFigure className={onlyWide}>
              Round
            </Head>
          </tr>
        </thead>
        <tbody>
          {terminalsOf(content).map((station) => {
            const { reading } = station;
            return (
              <tr key={station.id} className="break-inside-avoid">
                <RowName>
                  {station.tag}
                  <span className="text-quiet block text-xs font-normal md:hidden print:hidden">
                    {[station.storey, station.room].filter(Boolean).join(', ')}
                  </span>
                </RowName>
                <Words className={onlyWide}>{[station.storey, station.room].filter(Boolean).join(', ')}</Words>
                <Figures>
                  <Figure quantity="flow" si={station.designFlowLs} />
                </Figures>
                <Figures>
                  <Figure quantity="flow" si={reading?.flowLs} />
                </Figures>
                <Figures>
                  <OfDesign content={content} station={station} />
                </Figures>
                <Figures className={`${onlyWide} text-quiet`}>{reading ? reading.uncertaintyPercent.toFixed(1) : '–'}</Figures>
                <Figures className={onlyWide}>
                  <Figure quantity="setting" si={reading?.settingTurns} />
                </Figures>
                <Figures className={onlyWide}>
                  <Figure quantity="pressure" si={reading?.dropKpa} />
                </Figures>
                <Words className={onlyWide}>
                  {reading ? (
                    <>
                      {serialOf.get(reading.instrumentId)}
                      {reading.isInstrumentOverdue && <span className="text-high ml-1 whitespace-nowrap">▴ overdue</span>}
                    </>
                  ) : (
                    <span className="text-quiet">not measured</span>
                  )}
                </Words>
                <Figures className={onlyWide}>{reading?.roundNumber}</Figures>
              </tr>
            );
          })}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
