import { Figure, UnitName } from '@/components/ui/figure';
import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, RowName, onlyWide, TableFrame, Words } from '@/components/ui/table';
import { valvesOf } from '@/lib/api/report-judgement';
import type { ReportContent } from '@/lib/api/reports';
import { valveStateNames } from '@/lib/network/schedule-words';
import { OfDesign } from './of-design';

/** Balancing valves of branches and mains; those of the terminals stand with their terminals. */
export function BranchValvesTable({ content }: { content: ReportContent }) {
  const valves = valvesOf(content).filter(({ station }) => station.kind === 'branch');
  if (valves.length === 0) return null;
  return (
    <Sheet title="Balancing valves of branches and mains" isFlush>
      <TableFrame label="Balancing valves of branches and mains">
        <thead>
          <tr>
            <Head>Valve</Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Design
            </Head>
            <Head isFigure unit={<UnitName quantity="flow" />}>
              Measured
            </Head>
            <Head isFigure unit="%">
              Of design
            </Head>
            <Head isFigure unit={<UnitName quantity="setting" />} className={onlyWide}>
              Setting by design
            </Head>
            <Head isFigure unit={<UnitName quantity="setting" />} className={onlyWide}>
              Setting read
            </Head>
            <Head isFigure unit={<UnitName quantity="pressure" />} className={onlyWide}>
              Drop by design
            </Head>
            <Head className={onlyWide}>State</Head>
          </tr>
        </thead>
        <tbody>
          {valves.map(({ station, valve }) => (
            <tr key={station.id} className="break-inside-avoid">
              <RowName>
                {station.tag}
                <span className="text-quiet block text-xs font-normal">{station.valveName}</span>
              </RowName>
              <Figures>
                <Figure quantity="flow" si={station.designFlowLs} />
              </Figures>
              <Figures>
                <Figure quantity="flow" si={station.reading?.flowLs} />
              </Figures>
              <Figures>
                <OfDesign content={content} station={station} />
              </Figures>
              <Figures className={onlyWide}>
                <Figure quantity="setting" si={valve.setting} />
              </Figures>
              <Figures className={onlyWide}>
                <Figure quantity="setting" si={station.reading?.settingTurns} />
              </Figures>
              <Figures className={onlyWide}>
                <Figure quantity="pressure" si={valve.dropKpa} />
              </Figures>
              <Words className={onlyWide}>{valveStateNames[valve.state]}</Words>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
