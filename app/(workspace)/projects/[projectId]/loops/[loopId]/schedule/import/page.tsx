import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { ScheduleImport } from '@/components/schedule-import/schedule-import';
import { NotAllowed } from '@/components/shell/not-allowed';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readDraft } from '@/lib/server/loops/read-draft';

export const metadata: Metadata = { title: 'Loop from a schedule' };

export default async function ScheduleImportPage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const seen = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!seen || seen.projectId !== projectId) notFound();
  const base = `/projects/${projectId}/loops/${loopId}`;
  const access = await requireAccess('drawing.edit', { kind: 'loop', id: loopId });
  if (!access) {
    return (
      <main className="flex-1 p-6">
        <NotAllowed>Loops are drawn by the designers of the project.</NotAllowed>
      </main>
    );
  }
  const { version, drawing } = await readDraft(access.person.organizationId, loopId);

  return (
    <main className="mx-auto w-full max-w-[90rem] flex-1 px-3 py-4 sm:px-4">
      <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <div>
          <h1>Loop from a terminal schedule</h1>
          <p className="text-quiet text-sm">Bring the schedule of the terminals; the loop is drawn, its pipes sized and its valves set.</p>
        </div>
        <Link href={`${base}/schedule`}>Back to the schedule</Link>
      </div>
      <ScheduleImport
        // After an issue or a save elsewhere the page comes again; what was brought stays.
        key={loopId}
        loopId={loopId}
        personId={access.person.id}
        drawingHref={`${base}/drawing`}
        fluid={drawing.fluid}
        drawn={{ version, pieces: drawing.equipment.length, savedBy: null }}
      />
    </main>
  );
}
