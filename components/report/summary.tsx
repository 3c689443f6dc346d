import { FlowStrip } from '@/components/strip/flow-strip';
import { Deviation } from '@/components/ui/deviation';
import { summaryOf, verdictOf } from '@/lib/api/report-judgement';
import type { ReportBody, ReportContent } from '@/lib/api/reports';

const counts = [
  { key: 'within', sign: '●', says: 'within tolerance', tone: 'text-ink' },
  { key: 'low', sign: '▾', says: 'low', tone: 'text-low' },
  { key: 'high', sign: '▴', says: 'high', tone: 'text-high' },
] as const;

/** The loop at one glance: every terminal on the flow strip, and how many stand where. */
export function Summary({ content, strip, band }: { content: ReportContent } & Pick<ReportBody, 'strip' | 'band'>) {
  const summary = summaryOf(content);
  const { worst, notMeasured, terminals } = summary;
  const verdict = worst && verdictOf(content, worst);
  return (
    <section aria-label="Summary" className="bg-sheet break-inside-avoid rounded border px-4 pt-4 pb-3">
      <div className="text-quiet flex items-baseline justify-between text-xs">
        <span>Per cent of design flow, one mark a terminal</span>
        <span>
          band <span className="figures">{`${band.lowerPercent.toFixed(0)}–${band.upperPercent.toFixed(0)}`}</span> %
        </span>
      </div>
      <div className="py-2">
        <FlowStrip ticks={strip} band={band} size="page" />
      </div>
      <div className="text-quiet flex justify-between text-xs">
        <span>{strip[0]?.tag}</span>
        <span>{strip.at(-1)?.tag}</span>
      </div>
      <dl className="mt-3 flex flex-wrap items-end gap-x-8 gap-y-3 border-t pt-3">
        {counts.map(({ key, sign, says, tone }) => (
          <div key={key}>
            <dt className="text-quiet text-xs">{says}</dt>
            <dd className={`figures text-2xl ${tone}`}>
              <span aria-hidden className="mr-1.5 text-[0.7em]">
                {sign}
              </span>
              {summary[key]}
            </dd>
          </div>
        ))}
        <div>
          <dt className="text-quiet text-xs">not measured</dt>
          <dd className="figures text-quiet text-2xl">{notMeasured.length}</dd>
        </div>
        <div>
          <dt className="text-quiet text-xs">terminals</dt>
          <dd className="figures text-2xl">{terminals}</dd>
        </div>
        {worst?.reading && verdict && (
          <div className="sm:ml-auto">
            <dt className="text-quiet text-xs">furthest from design, %</dt>
            <dd className="text-lg">
              <span className="font-semibold">{worst.tag}</span> <Deviation percent={worst.reading.percentOfDesign} verdict={verdict} />
            </dd>
          </div>
        )}
      </dl>
      {notMeasured.length > 0 && notMeasured.length < terminals && (
        <p className="mt-3 border-t pt-2 text-sm">
          <span className="text-quiet">Not measured: </span>
          {notMeasured.map(({ tag }) => tag).join(', ')}
        </p>
      )}
    </section>
  );
}
