import type { Knex } from 'knex';
import type { CreateProject } from '@/lib/api/projects';
import { Problem } from '../problem';

/** Puts these people on a project in the place of those who are on it. All of them must be active people of the organisation. */
export async function writeMembers(
  trx: Knex.Transaction,
  organizationId: string,
  projectId: string,
  members: CreateProject['members'],
): Promise<void> {
  const personIds = [...new Set(members.map(({ personId }) => personId))];
  const found = await trx('people').where({ organization_id: organizationId, is_active: true }).whereIn('id', personIds).select('id');
  const kept = await trx('project_members').where({ organization_id: organizationId, project_id: projectId }).select('person_id');
  const known = new Set([...found.map(({ id }) => id), ...kept.map(({ person_id }) => person_id)]);
  const unknown = members.findIndex(({ personId }) => !known.has(personId));
  if (unknown >= 0) {
    const message = 'This person is not among the active people of your organisation.';
    throw new Problem('input-invalid', message, { fields: [{ path: `members.${unknown}.personId`, message }] });
  }
  await trx('project_members').where({ organization_id: organizationId, project_id: projectId }).delete();
  if (members.length === 0) return;
  await trx('project_members')
    .insert(members.map(({ personId, role }) => ({ organization_id: organizationId, project_id: projectId, person_id: personId, role })))
    .onConflict()
    .ignore();
}
