import { getServerSession } from 'next-auth';
import { cache } from 'react';
import { db } from '@/db/knex';
import type { ProjectRole, Role } from '@/lib/api/permissions';
import { authOptions } from './auth-options';

/** Who is asking: read afresh from the database at each request, so that a withdrawn right is withdrawn at once. */
export interface Person {
  organizationId: string;
  organizationName: string;
  id: string;
  name: string;
  email: string;
  isAdministrator: boolean;
  defaultRole: ProjectRole;
  theme: 'system' | 'light' | 'dark';
  units: Record<string, string>;
}

/** The signed-in person, or null: no session, no longer active, or the password has changed since that sign-in. */
export const currentPerson = cache(async (): Promise<Person | null> => {
  const session = await getServerSession(authOptions);
  if (!session?.personId || !session.organizationId) return null;
  const row = await db()('people')
    .join('sign_ins', (join) => join.on('people.organization_id', 'sign_ins.organization_id').on('people.id', 'sign_ins.person_id'))
    .join('organizations', 'organizations.organization_id', 'people.organization_id')
    .where({ 'people.organization_id': session.organizationId, 'people.id': session.personId, 'people.is_active': true })
    .first({
      organizationId: 'people.organization_id',
      organizationName: 'organizations.name',
      id: 'people.id',
      name: 'people.name',
      email: 'people.email',
      isAdministrator: 'people.is_administrator',
      defaultRole: 'people.default_role',
      theme: 'people.theme',
      units: 'people.units',
      passwordChangedAt: 'sign_ins.password_changed_at',
    });
  if (!row) return null;
  const { passwordChangedAt, ...person } = row;
  if (passwordChangedAt && passwordChangedAt.getTime() > session.signedInAt) return null;
  return person;
});

/** The person's roles on one project; null where the project is not of this organisation or not theirs to see. */
export async function rolesOnProject(person: Person, projectId: string): Promise<Role[] | null> {
  const rows = await db()('projects')
    .leftJoin('project_members', (join) =>
      join
        .on('project_members.organization_id', 'projects.organization_id')
        .on('project_members.project_id', 'projects.id')
        .andOnVal('project_members.person_id', person.id),
    )
    .where({ 'projects.organization_id': person.organizationId, 'projects.id': projectId })
    .select('project_members.role');
  if (rows.length === 0) return null;
  const held: Role[] = rows.flatMap(({ role }) => (role ? [role as ProjectRole] : []));
  if (person.isAdministrator) held.push('administrator');
  return held.length ? held : null;
}

/** Roles that count where no project is named: the administrator's, and the role a person takes on projects they make. */
export const rolesInOrganization = (person: Person): Role[] => [
  ...(person.isAdministrator ? (['administrator'] as const) : []),
  person.defaultRole,
];
