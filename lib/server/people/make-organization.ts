import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import { makePasswordLink } from '../account/password-links';
import { unlessTaken } from '../unless-taken';

/** Makes an organisation with its first administrator, and answers the link with which that person sets a password. */
export async function makeOrganization(wanted: { organization: string; name: string; email: string }): Promise<string> {
  const message = 'This address is in use already.';
  return unlessTaken(
    { code: 'email-taken', message, path: 'email' },
    db().transaction(async (trx) => {
      const [organizationId, id] = [uuidv7(), uuidv7()];
      await trx('organizations').insert({ organization_id: organizationId, name: wanted.organization });
      await trx('people').insert({
        organization_id: organizationId,
        id,
        name: wanted.name,
        email: wanted.email,
        is_administrator: true,
        default_role: 'designer',
      });
      await trx('sign_ins').insert({ email: wanted.email, organization_id: organizationId, person_id: id });
      return makePasswordLink(trx, { organizationId, id }, 'invitation');
    }),
  );
}
