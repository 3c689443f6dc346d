import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { DrawingPage } from '@/components/report/drawing-page';
import { NoReport } from '@/components/report/no-report';
import { ReportSheet } from '@/components/report/report-sheet';
import type { RevisionBody } from '@/lib/api/loops';
import { may } from '@/lib/api/permissions';
import type { ReportContent } from '@/lib/api/reports';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { drawingSvg } from '@/lib/network/drawing-svg';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readReport } from '@/lib/server/reports/read-report';
import { readRevision } from '@/lib/server/revisions/read-revision';

export const metadata: Metadata = { title: 'Report' };

export default async function ReportPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const { content, contentSha256, ...report } = await readReport(access, loopId);
  const issued = content && (await readRevision(access.person.organizationId, loopId, content.revision.number));
  const base = `/projects/${projectId}/loops/${loopId}`;
  return (
    <main className="mx-auto w-full max-w-[78rem] flex-1 px-4 py-6 print:p-0">
      {content && contentSha256 ? (
        <>
          <ReportSheet report={{ ...report, content, contentSha256 }} loopId={loopId} commissioningHref={`${base}/commissioning`} />
          {issued && <DrawingPage {...issuedDrawing(issued, content, access.person.units)} />}
        </>
      ) : (
        <NoReport drawingHref={may(access.roles, 'drawing.edit') ? `${base}/drawing` : null} />
      )}
    </main>
  );
}

/** The issued drawing with the flows of its balance, in the reader's units. */
function issuedDrawing(
  { drawing, balance, number, issuedAt }: RevisionBody,
  { loop, project }: ReportContent,
  units: Record<string, string>,
) {
  const date = new Date(issuedAt).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
  const title = { loop: loop.name, project: project.name, revision: `Revision ${number}`, date, figures: 'Flows as balanced' };
  return {
    ...drawingSvg(drawing, { title, figures: figuresOfDrawing(drawing, { solve: null, balance }, 'balanced'), units }),
    description: `Drawing of ${loop.name}, revision ${number}: ${drawing.equipment.length} pieces and ${drawing.pipes.length} pipes. The tables above and the schedule say the same in words.`,
  };
}
