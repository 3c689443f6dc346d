import { Figure, UnitName } from '@/components/ui/figure';
import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, RowName, onlyWide, TableFrame } from '@/components/ui/table';
import { pumpsOf } from '@/lib/api/report-judgement';
import type { ReportContent } from '@/lib/api/reports';
import { OfDesign } from './of-design';

/** The duty that the loop asks of each pump, and the flow that was found. */
export function PumpTable({ content }: { content: ReportContent }) {
  const pumps = pumpsOf(content);
  if (pumps.length === 0) return null;
  return (
    <Sheet title="Pump duty" isFlush>
      <TableFrame label="Pump duty">
        <thead>
          <tr>
            <Head>Pump</Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Design
            </Head>
            <Head isFigure unit={<UnitName quantity="head" />}>
              Head
            </Head>
            <Head isFigure unit="% of full">
              Speed
            </Head>
            <Head isFigure unit={<UnitName quantity="power" />} className={onlyWide}>
              Shaft
            </Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Measured
            </Head>
            <Head isFigure unit="%">
              Of design
            </Head>
          </tr>
        </thead>
        <tbody>
          {pumps.map(({ station, duty }) => (
            <tr key={station.id}>
              <RowName>{station.tag}</RowName>
              <Figures>
                <Figure quantity="flow" si={duty.flowLs} />
              </Figures>
              <Figures>
                <Figure quantity="head" si={duty.requiredHeadM} />
              </Figures>
              <Figures>{(duty.speed * 100).toFixed(1)}</Figures>
              <Figures className={onlyWide}>
                <Figure quantity="power" si={duty.shaftKw} />
              </Figures>
              <Figures>
                <Figure quantity="flow" si={station.reading?.flowLs} />
              </Figures>
              <Figures>
                <OfDesign content={content} station={station} />
              </Figures>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
