import type { SiteBody } from '@/lib/api/site';
import type { ReportSite } from '@/lib/api/reports';
import { newestAnswers, readinessChecks } from '@/lib/commissioning/readiness-checks';

/** What the report says of the site besides its readings: each check as it stands, every snag, every change of setting. */
export function siteContent(site: SiteBody, tagOf: (stationId: string) => string | null): ReportSite {
  const answers = newestAnswers(site.checks);
  return {
    checks: readinessChecks.map(({ key, text }) => {
      const answer = answers.get(key);
      return {
        checkKey: key,
        text,
        answer: answer?.answer ?? 'open',
        remark: answer?.remark ?? '',
        answeredBy: answer?.answeredBy ?? null,
        answeredAt: answer?.answeredAt ?? null,
      };
    }),
    snags: site.snags.map(({ number, stationId, text, raisedBy, raisedAt, resolution }) => ({
      number,
      tag: stationId && tagOf(stationId),
      text,
      raisedBy,
      raisedAt,
      resolution,
    })),
    settingChanges: site.settingChanges.map(({ id, stationId, before, after, changedBy, changedAt, note }) => ({
      id,
      tag: tagOf(stationId) ?? 'a station of an earlier revision',
      before,
      after,
      changedBy,
      changedAt,
      note,
    })),
  };
}
