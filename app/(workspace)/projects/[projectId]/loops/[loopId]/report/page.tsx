import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { NoReport } from '@/components/report/no-report';
import { ReportSheet } from '@/components/report/report-sheet';
import { may } from '@/lib/api/permissions';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readReport } from '@/lib/server/reports/read-report';

export const metadata: Metadata = { title: 'Report' };

export default async function ReportPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const { content, contentSha256, ...report } = await readReport(access, loopId);
  const base = `/projects/${projectId}/loops/${loopId}`;
  return (
    <main className="mx-auto w-full max-w-[78rem] flex-1 px-4 py-6 print:p-0">
      {content && contentSha256 ? (
        <ReportSheet report={{ ...report, content, contentSha256 }} loopId={loopId} commissioningHref={`${base}/commissioning`} />
      ) : (
        <NoReport drawingHref={may(access.roles, 'drawing.edit') ? `${base}/drawing` : null} />
      )}
    </main>
  );
}
