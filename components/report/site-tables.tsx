import { Moment } from '@/components/ui/moment';
import { Sheet } from '@/components/ui/sheet';
import { Figures, Head, onlyWide, RowName, TableFrame, Words } from '@/components/ui/table';
import type { ReportContent } from '@/lib/api/reports';
import { checkWords } from '@/lib/commissioning/readiness-checks';

/** The readiness checks as they stood, who answered them and what was said of those that were open. */
export function ReadinessTable({ content: { site, rounds } }: { content: ReportContent }) {
  if (!site) return null;
  const reasons = rounds.filter(({ openChecksReason }) => openChecksReason);
  return (
    <Sheet title="Readiness" isFlush>
      {reasons.map((round) => (
        <p key={round.id} className="border-b px-4 py-2 text-sm">
          <strong>Round {round.number} was started with checks open:</strong> {round.openChecksReason}
        </p>
      ))}
      <TableFrame label="Readiness">
        <thead>
          <tr>
            <Head>Check</Head>
            <Head>Stands</Head>
            <Head className={onlyWide}>By</Head>
          </tr>
        </thead>
        <tbody>
          {site.checks.map((check) => (
            <tr key={check.checkKey}>
              <RowName className="font-normal! whitespace-normal!">
                {check.text}
                {check.remark && <span className="text-quiet block text-xs">{check.remark}</span>}
              </RowName>
              <Words className={check.answer === 'open' ? 'text-low whitespace-nowrap' : 'whitespace-nowrap'}>
                {checkWords[check.answer]}
              </Words>
              <Words className={`text-quiet ${onlyWide}`}>
                {check.answeredBy && check.answeredAt ? (
                  <>
                    {check.answeredBy}, <Moment at={check.answeredAt} />
                  </>
                ) : (
                  '–'
                )}
              </Words>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}

/** Every snag, open ones too: none is moved to an appendix. */
export function SnagsTable({ content: { site } }: { content: ReportContent }) {
  if (!site || site.snags.length === 0) return null;
  return (
    <Sheet title="Snags" isFlush>
      <TableFrame label="Snags">
        <thead>
          <tr>
            <Head isFigure>No.</Head>
            <Head>Snag</Head>
            <Head>Resolution</Head>
          </tr>
        </thead>
        <tbody>
          {site.snags.map((snag) => (
            <tr key={snag.number}>
              <Figures>{snag.number}</Figures>
              <Words>
                {snag.tag && <strong>{snag.tag}: </strong>}
                {snag.text}
                <span className="text-quiet block text-xs">
                  {snag.raisedBy}, <Moment at={snag.raisedAt} />
                </span>
              </Words>
              <Words className={snag.resolution ? undefined : 'text-low'}>
                {snag.resolution ? (
                  <>
                    {snag.resolution.note}
                    <span className="text-quiet block text-xs">
                      {snag.resolution.resolvedBy}, <Moment at={snag.resolution.resolvedAt} />
                    </span>
                  </>
                ) : (
                  '▾ open'
                )}
              </Words>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}

/** What was set, from what to what. */
export function SettingChangesTable({ content: { site } }: { content: ReportContent }) {
  if (!site || site.settingChanges.length === 0) return null;
  return (
    <Sheet title="Settings changed" isFlush>
      <TableFrame label="Settings changed">
        <thead>
          <tr>
            <Head>Station</Head>
            <Head isFigure>Before</Head>
            <Head isFigure>After</Head>
            <Head className={onlyWide}>By</Head>
          </tr>
        </thead>
        <tbody>
          {site.settingChanges.map((change) => (
            <tr key={change.id}>
              <RowName>{change.tag}</RowName>
              <Figures>{change.before ?? '–'}</Figures>
              <Figures>{change.after}</Figures>
              <Words className={`text-quiet ${onlyWide}`}>
                {change.changedBy}, <Moment at={change.changedAt} />
              </Words>
            </tr>
          ))}
        </tbody>
      </TableFrame>
    </Sheet>
  );
}
