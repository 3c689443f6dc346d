import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { ActivityList } from '@/components/activity/activity-list';
import { LoopList } from '@/components/projects/loop-list';
import { MemberList } from '@/components/projects/member-list';
import { NewLoopDialog } from '@/components/projects/new-loop-dialog';
import { ProjectSettings } from '@/components/projects/project-settings';
import { ToleranceSettings } from '@/components/projects/tolerance-settings';
import { ToleranceTable } from '@/components/projects/tolerance-table';
import { Sheet } from '@/components/ui/sheet';
import { may } from '@/lib/api/permissions';
import { readActivity } from '@/lib/server/activity/read-activity';
import { requireAccess } from '@/lib/server/auth/require-person';
import { listPeople } from '@/lib/server/people/list-people';
import { readProject } from '@/lib/server/projects/read-project';

export const metadata: Metadata = { title: 'Project' };

export default async function ProjectPage({ params }: { params: Promise<{ projectId: string }> }) {
  const { projectId } = await params;
  const access = await requireAccess('project.see', { kind: 'project', id: projectId });
  if (!access) notFound();
  const { person, roles } = access;
  const mayManage = may(roles, 'project.manage');
  const mayDraw = may(roles, 'loop.create');
  const [project, activity, people] = await Promise.all([
    readProject(access, projectId),
    readActivity(person, { projectId, limit: 20 }),
    mayManage ? listPeople(person.organizationId) : [],
  ]);
  const isMember = (id: string) => project.members.some(({ personId }) => personId === id);
  return (
    <>
      <div className="mb-5 flex flex-wrap items-end justify-between gap-3">
        <div className="min-w-0">
          <Link href="/projects" className="text-sm">
            Projects
          </Link>
          <h1>{project.name}</h1>
          <p className="text-quiet">{[project.client, project.building].filter(Boolean).join(' · ')}</p>
        </div>
        {mayDraw && <NewLoopDialog projectId={projectId} />}
      </div>
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_21rem]">
        <div className="flex flex-col gap-5">
          <Sheet title="Loops" isFlush>
            {project.loops.length ? (
              <LoopList projectId={projectId} loops={project.loops} band={project.band} />
            ) : (
              <p className="text-quiet px-4 py-4">
                {mayDraw ? 'No loop yet. Make one, and draw it.' : 'No loop yet. A designer of the project makes one.'}
              </p>
            )}
          </Sheet>
          <Sheet title="Activity" action={<Link href={`/activity?project=${projectId}`}>All of it</Link>} isFlush>
            {activity.rows.length ? (
              <ActivityList rows={activity.rows} />
            ) : (
              <p className="text-quiet px-4 py-4">Nothing has been done here yet.</p>
            )}
          </Sheet>
        </div>
        <div className="flex flex-col gap-5">
          <Sheet
            title="Members"
            action={
              mayManage && <ProjectSettings project={project} people={people.filter(({ id, isActive }) => isActive || isMember(id))} />
            }
          >
            <MemberList members={project.members} />
          </Sheet>
          <Sheet title="Tolerance bands" action={mayManage && <ToleranceSettings projectId={projectId} tolerances={project.tolerances} />}>
            <ToleranceTable tolerances={project.tolerances} />
          </Sheet>
        </div>
      </div>
    </>
  );
}
