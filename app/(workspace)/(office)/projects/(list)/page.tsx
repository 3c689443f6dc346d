import type { Metadata } from 'next';
import { NewProjectDialog } from '@/components/projects/new-project-dialog';
import { ProjectCard } from '@/components/projects/project-card';
import { ProjectSearch } from '@/components/projects/project-search';
import { Notice } from '@/components/ui/notice';
import { may } from '@/lib/api/permissions';
import { rolesInOrganization } from '@/lib/server/auth/person';
import { requirePerson } from '@/lib/server/auth/require-person';
import { listPeople } from '@/lib/server/people/list-people';
import { listProjects } from '@/lib/server/projects/list-projects';

export const metadata: Metadata = { title: 'Projects' };

export default async function ProjectsPage({ searchParams }: { searchParams: Promise<{ q?: string | string[] }> }) {
  const person = await requirePerson();
  const { q } = await searchParams;
  const search = (Array.isArray(q) ? q[0] : q)?.slice(0, 200) ?? '';
  const mayCreate = may(rolesInOrganization(person), 'project.create');
  const [projects, people] = await Promise.all([listProjects(person, search), mayCreate ? listPeople(person.organizationId) : []]);
  return (
    <>
      <div className="mb-5 flex flex-wrap items-center gap-3">
        <h1 className="mr-auto w-full sm:w-auto">Projects</h1>
        <ProjectSearch text={search} />
        {mayCreate && <NewProjectDialog people={people.filter(({ id, isActive }) => isActive && id !== person.id)} />}
      </div>
      {projects.length ? (
        <div className="flex flex-col gap-4">
          {projects.map((project) => (
            <ProjectCard key={project.id} project={project} />
          ))}
        </div>
      ) : (
        <NoProjects search={search} mayCreate={mayCreate} />
      )}
    </>
  );
}

function NoProjects({ search, mayCreate }: { search: string; mayCreate: boolean }) {
  if (search)
    return <Notice title={`Nothing is called “${search}”`}>Looked for in the names of projects, clients, buildings and loops.</Notice>;
  return (
    <Notice title="You are on no project yet">
      {mayCreate ? 'Make one, and draw its first loop.' : 'An administrator puts you on one; ask whoever invited you.'}
    </Notice>
  );
}
