import type { Knex } from 'knex';
import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import type { ChangePerson, PersonRow } from '@/lib/api/people';
import { closeLinks } from '../account/password-links';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { findPerson } from './list-people';

/** Changes what a person may do, or whether they may sign in at all. An organisation always keeps an active administrator. */
export async function changePerson(access: Access, personId: string, change: ChangePerson): Promise<PersonRow> {
  const { organizationId } = access.person;
  if (!isUuid(personId)) throw notFound();
  return db().transaction(async (trx) => {
    // One change of people at a time in an organisation: two administrators could otherwise each take the other out.
    await trx('organizations').where({ organization_id: organizationId }).forUpdate().first('organization_id');
    const before = await findPerson(trx, organizationId, personId);
    if (!before) throw notFound();
    const after = { ...before, ...change };
    if (JSON.stringify(after) === JSON.stringify(before)) return before;

    await trx('people').where({ organization_id: organizationId, id: personId }).update({
      is_administrator: after.isAdministrator,
      default_role: after.defaultRole,
      is_active: after.isActive,
    });
    await requireAdministrator(trx, organizationId);
    if (!after.isActive) await closeLinks(trx, { organizationId, id: personId });
    await recordActivity(trx, access, { verb: verbOf(before, after), subject: after.name, detail: change });
    return after;
  });
}

async function requireAdministrator(trx: Knex.Transaction, organizationId: string): Promise<void> {
  const left = await trx('people').where({ organization_id: organizationId, is_administrator: true, is_active: true }).first('id');
  if (!left) throw new Problem('last-administrator', 'This is the last administrator. Make someone else an administrator first.');
}

function verbOf(before: PersonRow, after: PersonRow): string {
  if (before.isActive !== after.isActive) return after.isActive ? 'let back in' : 'shut out';
  if (before.isAdministrator !== after.isAdministrator)
    return after.isAdministrator ? 'made an administrator of' : 'took the administrator’s rights of';
  return 'changed the usual role of';
}
