import Link from 'next/link';
import { ToleranceTable } from '@/components/projects/tolerance-table';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/sheet';
import { summaryOf } from '@/lib/api/report-judgement';
import type { ReportBody, ReportContent } from '@/lib/api/reports';
import { cautionSentence } from '@/lib/commissioning/cautions';
import { AcceptedReports } from './accepted-reports';
import { CorrectedEntries } from './corrected-entries';
import { DownloadButton } from './download-button';
import { InstrumentsTable } from './instruments-table';
import { PumpTable } from './pump-table';
import { RoundsTable } from './rounds-table';
import { SignButtons } from './sign-buttons';
import { ReadinessTable, SettingChangesTable, SnagsTable } from './site-tables';
import { Signatures } from './signatures';
import { Summary } from './summary';
import { TerminalsTable } from './terminals-table';
import { BranchValvesTable } from './valves-table';

interface ReportSheetProps {
  report: ReportBody & { content: ReportContent; contentSha256: string };
  loopId: string;
  commissioningHref: string;
}

const mediumWords: Record<string, string> = {
  water: 'water',
  'propylene-glycol': 'propylene glycol',
  'ethylene-glycol': 'ethylene glycol',
};

/** What will be handed over, as a sheet that reads on a phone and on paper. */
export function ReportSheet({ report, loopId, commissioningHref }: ReportSheetProps) {
  const { content, contentSha256 } = report;
  const notMeasured = summaryOf(content).notMeasured.map(({ tag }) => tag);
  return (
    <div className="flex flex-col gap-5">
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <ReportTitle content={content} />
        <div className="flex flex-wrap items-start gap-2">
          <DownloadButton loopId={loopId} />
          <SignButtons loopId={loopId} maySign={report.maySign} contentSha256={contentSha256} notMeasured={notMeasured} />
        </div>
      </div>
      {content.readings.length === 0 && (
        <Notice tone="brass" title="Nothing is measured yet">
          Below is what the design asks. What is measured appears here entry by entry.{' '}
          <Link href={commissioningHref} className="underline">
            To the stations
          </Link>
        </Notice>
      )}
      <Summary content={content} strip={report.strip} band={report.band} />
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_19rem] print:block print:space-y-5">
        <div className="flex flex-col gap-5 lg:order-2 print:grid print:grid-cols-2">
          <Signatures signatures={report.signatures} state={report.state} contentSha256={contentSha256} />
          <AcceptedReports accepted={report.accepted} loopId={loopId} />
          <Sheet title="Tolerance">
            <ToleranceTable tolerances={content.tolerances} />
          </Sheet>
        </div>
        <div className="flex min-w-0 flex-col gap-5 lg:order-1 print:block print:space-y-5">
          <TerminalsTable content={content} />
          <BranchValvesTable content={content} />
          <PumpTable content={content} />
          <CorrectedEntries content={content} />
          <SnagsTable content={content} />
          <ReadinessTable content={content} />
          <RoundsTable content={content} />
          <SettingChangesTable content={content} />
          <InstrumentsTable content={content} />
        </div>
      </div>
      <p className="text-quiet max-w-prose text-sm">{cautionSentence}</p>
      <p className="text-quiet text-xs">
        SHA-256 of this content <span className="figures break-all">{contentSha256}</span>
      </p>
    </div>
  );
}

function ReportTitle({ content: { loop, project, revision, fluid, organization } }: { content: ReportContent }) {
  const mixture = fluid.massFraction > 0 ? ` ${(fluid.massFraction * 100).toFixed(0)} %` : '';
  return (
    <div className="min-w-0">
      <h1>Commissioning report, {loop.name}</h1>
      <p className="text-quiet">{[project.name, project.building, project.client || organization].filter(Boolean).join(' · ')}</p>
      <p className="text-quiet text-sm">
        Revision {revision.number}, issued by {revision.issuedBy} <Moment at={revision.issuedAt} />.{' '}
        {loop.service === 'chilled' ? 'Chilled' : 'Hot'} water loop, {mediumWords[fluid.medium] ?? fluid.medium}
        {mixture}{' '}
        <span className="figures">
          {fluid.supplyC}/{fluid.returnC}
        </span>{' '}
        °C.
      </p>
    </div>
  );
}
