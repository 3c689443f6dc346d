import { db } from '@/db/knex';
import type { ProjectDetail } from '@/lib/api/projects';
import type { Access } from '../auth/authorize';
import { bandOf } from '../loops/loop-strips';
import { notFound } from '../problem';
import { loopsOf } from './list-projects';
import { readTolerances } from './read-tolerances';

/** One project with its loops, members and tolerance bands. */
export async function readProject({ person, roles }: Access, projectId: string): Promise<ProjectDetail> {
  const { organizationId } = person;
  const [project, members, tolerances, loops] = await Promise.all([
    db()('projects').where({ organization_id: organizationId, id: projectId }).first('id', 'name', 'client', 'building'),
    readMembers(organizationId, projectId),
    readTolerances(organizationId, projectId),
    loopsOf(organizationId, [projectId]),
  ]);
  if (!project) throw notFound();
  return { ...project, roles, loops: loops.get(projectId) ?? [], band: bandOf(tolerances), members, tolerances };
}

function readMembers(organizationId: string, projectId: string): Promise<ProjectDetail['members']> {
  return db()('project_members')
    .join('people', (join) =>
      join.on('people.organization_id', 'project_members.organization_id').on('people.id', 'project_members.person_id'),
    )
    .where({ 'project_members.organization_id': organizationId, 'project_members.project_id': projectId })
    .orderBy(['people.name', 'project_members.role'])
    .select({ personId: 'people.id', name: 'people.name', email: 'people.email', role: 'project_members.role' });
}
