import type { Metadata } from 'next';
import { ActivityFeed } from '@/components/activity/activity-feed';
import { ProjectFilter } from '@/components/activity/project-filter';
import { readActivity } from '@/lib/server/activity/read-activity';
import { requireAccess, requirePerson } from '@/lib/server/auth/require-person';
import { listProjects } from '@/lib/server/projects/list-projects';

export const metadata: Metadata = { title: 'Activity' };

export default async function ActivityPage({ searchParams }: { searchParams: Promise<{ project?: string | string[] }> }) {
  const person = await requirePerson();
  const { project } = await searchParams;
  const projectId = typeof project === 'string' && project ? project : undefined;
  if (projectId) await requireAccess('activity.see', { kind: 'project', id: projectId });
  const [projects, first] = await Promise.all([listProjects(person), readActivity(person, { projectId })]);
  return (
    <>
      <div className="mb-4 flex flex-wrap items-end justify-between gap-3">
        <div>
          <h1>Activity</h1>
          <p className="text-quiet">Who did what, newest first.</p>
        </div>
        <div className="w-full sm:w-72">
          <ProjectFilter projects={projects.map(({ id, name }) => ({ id, name }))} projectId={projectId} />
        </div>
      </div>
      <ActivityFeed key={projectId} projectId={projectId} first={first} />
    </>
  );
}
