import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { InvitePerson, PersonRow } from '@/lib/api/people';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { unlessTaken } from '../unless-taken';
import { sendInvitation } from './send-invitation';

/** Adds a person to the organisation and sends them the link to set their password. */
export async function invitePerson(access: Access, invited: InvitePerson): Promise<PersonRow> {
  const { organizationId } = access.person;
  const id = uuidv7();
  const message = 'This address cannot be invited: it is in use already.';
  await unlessTaken(
    { code: 'email-taken', message, path: 'email' },
    db().transaction(async (trx) => {
      await trx('people').insert({
        organization_id: organizationId,
        id,
        name: invited.name,
        email: invited.email,
        is_administrator: invited.isAdministrator,
        default_role: invited.defaultRole,
      });
      await trx('sign_ins').insert({ email: invited.email, organization_id: organizationId, person_id: id });
      await recordActivity(trx, access, { verb: 'invited', subject: invited.name });
      await sendInvitation(trx, access.person, { id, name: invited.name, email: invited.email });
    }),
  );
  return { id, ...invited, isActive: true, hasPassword: false };
}
