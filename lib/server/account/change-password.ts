import { db } from '@/db/knex';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { hashPassword, passwordFits } from '../auth/passwords';
import { countSignInTry, forgetSignInTries } from '../auth/sign-in-limit';
import { Problem } from '../problem';
import { closeLinks } from './password-links';
import { setPassword } from './set-password';

/** Changes one's own password; all sessions end, this one too, so the page signs in again with the new one. */
export async function changePassword(access: Access, input: { currentPassword: string; newPassword: string }): Promise<void> {
  const { person } = access;
  // An open session must not be a way around the limit on guessing.
  await countSignInTry(person.email);
  const row = await db()('sign_ins').where({ organization_id: person.organizationId, person_id: person.id }).first('password_hash');
  if (!(await passwordFits(row?.password_hash, input.currentPassword))) {
    const message = 'This is not your present password.';
    throw new Problem('password-wrong', message, { fields: [{ path: 'currentPassword', message }] });
  }
  const passwordHash = await hashPassword(input.newPassword);
  await db().transaction(async (trx) => {
    await setPassword(trx, person, passwordHash);
    await closeLinks(trx, person);
    await recordActivity(trx, access, { verb: 'changed', subject: 'their password' });
  });
  await forgetSignInTries(person.email);
}
