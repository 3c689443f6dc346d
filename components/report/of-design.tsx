import { Deviation } from '@/components/ui/deviation';
import { verdictOf } from '@/lib/api/report-judgement';
import type { ReportContent, ReportStation } from '@/lib/api/reports';

/** A station's per cent of design with its sign; an en dash where nothing is measured. */
export function OfDesign({ content, station }: { content: ReportContent; station: ReportStation }) {
  const verdict = verdictOf(content, station);
  if (!station.reading || !verdict) return <span className="text-quiet">–</span>;
  return <Deviation percent={station.reading.percentOfDesign} verdict={verdict} />;
}
