import { RateLimiterMemory } from 'rate-limiter-flexible';
import { db } from '@/db/knex';
import { log } from '../log';
import { sendMail } from '../mail/send-mail';
import { Problem } from '../problem';
import { makePasswordLink } from './password-links';

/** Five letters to one address in an hour, whether it is known or not. */
const byAddress = new RateLimiterMemory({ keyPrefix: 'reset', points: 5, duration: 3600 });

/**
 * Sends a link to set a new password, where the address is one that signs in. The caller is answered before anything is looked
 * up, so neither the answer nor its time tells whether the address is known.
 */
export async function askForReset({ email }: { email: string }): Promise<void> {
  try {
    await byAddress.consume(email);
  } catch {
    throw new Problem('too-many-tries', 'Several links have been asked for with this address. Wait an hour and try again.');
  }
  void sendResetLink(email).catch((error) => log.error({ err: error }, 'a link to reset a password was not sent'));
}

async function sendResetLink(email: string): Promise<void> {
  const made = await db().transaction(async (trx) => {
    const person = await trx('sign_ins')
      .join('people', (join) => join.on('people.organization_id', 'sign_ins.organization_id').on('people.id', 'sign_ins.person_id'))
      .where({ 'sign_ins.email': email, 'people.is_active': true })
      .first({ organizationId: 'people.organization_id', id: 'people.id', name: 'people.name' });
    return person && { name: person.name, link: await makePasswordLink(trx, person, 'reset') };
  });
  if (!made) return;
  // After the transaction: whoever is not signed in must not hold the database's connections for as long as a mail server is slow.
  await sendMail({
    to: email,
    subject: 'Set a new password',
    text: `${made.name},\n\nsomeone asked for a new password for this address. Set it here within the hour:\n\n${made.link}\n\nThe link works once. If it was not you, do nothing: your password stays as it is.\n`,
  });
}
