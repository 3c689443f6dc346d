import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { NoSchedule } from '@/components/schedule/no-schedule';
import { ScheduleEditor } from '@/components/schedule/schedule-editor';
import { ScheduleViewer } from '@/components/schedule/schedule-viewer';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import { may } from '@/lib/api/permissions';
import type { StationKind } from '@/lib/api/projects';
import { defaultTolerances } from '@/lib/api/tolerances';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readDraft } from '@/lib/server/loops/read-draft';
import { readLoop } from '@/lib/server/loops/read-loop';
import { readSchedule, type LoopSchedule } from '@/lib/server/loops/read-schedule';
import { readTolerances } from '@/lib/server/projects/read-tolerances';

export const metadata: Metadata = { title: 'Schedule' };

/** Designers edit the draft in tables; everyone else reads them. */
export default async function SchedulePage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const { organizationId, id: personId } = access.person;
  const base = `/projects/${projectId}/loops/${loopId}`;
  const drawingHref = `${base}/drawing`;
  const rules = [...(await readTolerances(organizationId, projectId)), ...defaultTolerances];
  const bandOf = (kind: StationKind) => {
    const { lowerPercent, upperPercent } = rules.find(({ stationKind }) => stationKind === kind)!;
    return { lowerPercent: 100 + lowerPercent, upperPercent: 100 + upperPercent };
  };
  const bands = { terminal: bandOf('terminal'), branch: bandOf('branch') };
  const loop = await readLoop(access, loopId);
  const canEdit = may(access.roles, 'drawing.edit');
  const found = canEdit ? null : await readSchedule(access, loopId);
  const isEmpty = found && Object.values(found.schedule).every((rows) => rows.length === 0);

  return (
    // The tables take the room that the header leaves, and scroll by themselves.
    <main className="relative min-h-[26rem] flex-1 print:min-h-0">
      <div className="absolute inset-0 flex flex-col gap-3 px-4 py-4 print:static print:block">
        {canEdit ? (
          <ScheduleEditor
            key={loopId}
            loop={loop}
            personId={personId}
            loaded={await readDraft(organizationId, loopId)}
            bands={bands}
            base={base}
          />
        ) : !found ? (
          <NoSchedule title="No schedule yet" drawingHref={null}>
            The schedule appears when the designer has issued a revision.
          </NoSchedule>
        ) : isEmpty ? (
          <NoSchedule title="No schedule yet" drawingHref={drawingHref}>
            Nothing is drawn yet. What is drawn is listed here, with its solved figures.
          </NoSchedule>
        ) : (
          <>
            <ScheduleTitle of={found.of} />
            {found.errors.length > 0 && (
              <Notice
                tone="brass"
                title={
                  found.errors.length === 1
                    ? 'One fault keeps the drawing from being solved'
                    : `${found.errors.length} faults keep the drawing from being solved`
                }
              >
                {found.errors[0].message}{' '}
                <Link href={drawingHref} className="underline">
                  Open the drawing
                </Link>
              </Notice>
            )}
            <ScheduleViewer
              schedule={found.schedule}
              title={`${loop.name}, ${found.of.kind === 'draft' ? 'draft' : `revision ${found.of.number}`}`}
              personId={personId}
              drawingHref={drawingHref}
              bands={bands}
            />
          </>
        )}
      </div>
    </main>
  );
}

function ScheduleTitle({ of }: { of: LoopSchedule['of'] }) {
  return (
    <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
      <h1>{of.kind === 'draft' ? 'Schedule of the draft' : `Schedule of revision ${of.number}`}</h1>
      <p className="text-quiet text-sm">
        {of.kind === 'draft' ? `Saved by ${of.savedBy} ` : `Issued by ${of.issuedBy} `}
        <Moment at={of.kind === 'draft' ? of.savedAt : of.issuedAt} />. Flow now is with the valves as they stand; settings, drops and
        authorities are those of the balance at design flow.
      </p>
    </div>
  );
}
