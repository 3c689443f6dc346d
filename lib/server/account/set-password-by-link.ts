import { db } from '@/db/knex';
import { recordActivity } from '../activity/record-activity';
import { hashPassword } from '../auth/passwords';
import { forgetSignInTries } from '../auth/sign-in-limit';
import { closeLinks, findOpenLink, linkUsed, takeLink } from './password-links';
import { setPassword } from './set-password';

/** Sets the password of the person that a link was made for; the link then works no more. Answers whom to sign in. */
export async function setPasswordByLink({ token, newPassword }: { token: string; newPassword: string }): Promise<{ email: string }> {
  const link = await findOpenLink(token);
  if (!link) throw linkUsed();
  const person = { organizationId: link.organizationId, id: link.personId, name: link.name };
  const passwordHash = await hashPassword(newPassword);
  await db().transaction(async (trx) => {
    await takeLink(trx, link.organizationId, token);
    await setPassword(trx, person, passwordHash);
    await closeLinks(trx, person);
    const verb = link.purpose === 'invitation' ? 'accepted' : 'reset';
    await recordActivity(
      trx,
      { person, projectId: null },
      { verb, subject: link.purpose === 'invitation' ? 'their invitation' : 'their password' },
    );
  });
  await forgetSignInTries(link.email);
  return { email: link.email };
}
