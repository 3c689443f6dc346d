import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import { may, type Permission, type Role } from '@/lib/api/permissions';
import { notFound, Problem } from '../problem';
import { rolesInOrganization, rolesOnProject, type Person } from './person';

/** What a page, action or route is about: it decides which of the person's roles count. */
export type Scope =
  { kind: 'organization' } | { kind: 'project'; id: string } | { kind: 'loop'; id: string } | { kind: 'round'; id: string };

export interface Access {
  person: Person;
  roles: Role[];
  projectId: string | null;
}

/**
 * The one decision on who may do what. What is not of the person's organisation, or of a project that is not theirs,
 * is answered as if it did not exist; what they can see but may not do is refused by name.
 */
export async function authorize(person: Person, permission: Permission, scope: Scope): Promise<Access> {
  const projectId = scope.kind === 'organization' ? null : await projectOf(person.organizationId, scope);
  const roles = projectId ? await rolesOnProject(person, projectId) : rolesInOrganization(person);
  if (!roles) throw notFound();
  if (!may(roles, permission)) {
    throw new Problem('not-allowed', `Your role here (${roles.join(', ')}) does not include this. Ask an administrator of the project.`);
  }
  return { person, roles, projectId };
}

async function projectOf(organizationId: string, scope: Exclude<Scope, { kind: 'organization' }>): Promise<string> {
  if (!isUuid(scope.id)) throw notFound();
  if (scope.kind === 'project') return scope.id;
  const loops = db()('loops').where('loops.organization_id', organizationId);
  const row =
    scope.kind === 'loop'
      ? await loops.where('loops.id', scope.id).first('loops.project_id')
      : await loops
          .join('rounds', (join) => join.on('rounds.organization_id', 'loops.organization_id').on('rounds.loop_id', 'loops.id'))
          .where('rounds.id', scope.id)
          .first('loops.project_id');
  if (!row) throw notFound();
  return row.project_id;
}
