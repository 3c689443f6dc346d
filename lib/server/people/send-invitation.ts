import type { Knex } from 'knex';
import { makePasswordLink } from '../account/password-links';
import type { Person } from '../auth/person';
import { sendMail } from '../mail/send-mail';

/**
 * Sends the link with which an invited person sets their password. It runs last in the transaction that invites: a letter
 * that cannot be sent undoes the invitation.
 */
export async function sendInvitation(
  trx: Knex.Transaction,
  by: Person,
  invited: { id: string; name: string; email: string },
): Promise<void> {
  const link = await makePasswordLink(trx, { organizationId: by.organizationId, id: invited.id }, 'invitation');
  await sendMail({
    to: invited.email,
    subject: `${by.organizationName} invites you to Evenhead`,
    text: `${invited.name},\n\n${by.name} of ${by.organizationName} invites you to work on their hydronic loops. Set your password within seven days:\n\n${link}\n\nThe link works once. If it has run out, ask ${by.name} for a new one.\n`,
  });
}
