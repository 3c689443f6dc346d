import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { findPerson } from './list-people';
import { sendInvitation } from './send-invitation';

/** Sends a new link to a person who has not followed the first; the earlier links stop working. */
export async function resendInvitation(access: Access, personId: string): Promise<void> {
  if (!isUuid(personId)) throw notFound();
  await db().transaction(async (trx) => {
    const invited = await findPerson(trx, access.person.organizationId, personId);
    if (!invited) throw notFound();
    if (invited.hasPassword) throw new Problem('link-used', `${invited.name} has set a password already and needs no invitation.`);
    if (!invited.isActive) throw new Problem('link-used', `${invited.name} is not active. Make them active first.`);
    await recordActivity(trx, access, { verb: 'invited again', subject: invited.name });
    await sendInvitation(trx, access.person, invited);
  });
}
