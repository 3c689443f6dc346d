import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { NoSchedule } from '@/components/schedule/no-schedule';
import { ScheduleTables } from '@/components/schedule/schedule-tables';
import { Moment } from '@/components/ui/moment';
import { Notice } from '@/components/ui/notice';
import type { StationKind } from '@/lib/api/projects';
import { defaultTolerances } from '@/lib/api/tolerances';
import { requireAccess } from '@/lib/server/auth/require-person';
import { readSchedule, type LoopSchedule } from '@/lib/server/loops/read-schedule';
import { readTolerances } from '@/lib/server/projects/read-tolerances';

export const metadata: Metadata = { title: 'Schedule' };

export default async function SchedulePage({ params }: { params: Promise<{ projectId: string; loopId: string }> }) {
  const { projectId, loopId } = await params;
  const access = await requireAccess('loop.see', { kind: 'loop', id: loopId });
  if (!access || access.projectId !== projectId) notFound();
  const drawingHref = `/projects/${projectId}/loops/${loopId}/drawing`;
  const found = await readSchedule(access, loopId);
  const rules = [...(await readTolerances(access.person.organizationId, projectId)), ...defaultTolerances];
  const bandOf = (kind: StationKind) => {
    const { lowerPercent, upperPercent } = rules.find(({ stationKind }) => stationKind === kind)!;
    return { lowerPercent: 100 + lowerPercent, upperPercent: 100 + upperPercent };
  };
  const isEmpty = found && Object.values(found.schedule).every((rows) => rows.length === 0);

  return (
    <main className="flex h-[calc(100dvh-7rem)] min-h-[26rem] flex-none flex-col gap-3 px-4 py-4 xl:h-[calc(100dvh-3.6rem)] print:block print:h-auto">
      {!found ? (
        <NoSchedule title="No schedule yet" drawingHref={null}>
          The schedule appears when the designer has issued a revision.
        </NoSchedule>
      ) : isEmpty ? (
        <NoSchedule title="No schedule yet" drawingHref={drawingHref}>
          Nothing is drawn yet. What you draw is listed here, with its solved figures.
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
          <ScheduleTables
            schedule={found.schedule}
            bands={{ terminal: bandOf('terminal'), branch: bandOf('branch') }}
            drawingHref={drawingHref}
          />
        </>
      )}
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
