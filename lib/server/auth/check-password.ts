import type { User } from 'next-auth';
import { db } from '@/db/knex';
import { passwordFits } from './passwords';
import { countSignInTry, forgetSignInTries } from './sign-in-limit';

/** The person of this address and password, or null: never says which of the two was wrong. */
export async function checkPassword({ email, password }: { email: string; password: string }): Promise<User | null> {
  const address = email.trim().toLowerCase();
  await countSignInTry(address);
  const row = await db()('sign_ins')
    .join('people', (join) => join.on('people.organization_id', 'sign_ins.organization_id').on('people.id', 'sign_ins.person_id'))
    .where({ 'sign_ins.email': address, 'people.is_active': true })
    .first('people.organization_id', 'people.id', 'people.name', 'sign_ins.password_hash');
  if (!(await passwordFits(row?.password_hash, password))) return null;
  await forgetSignInTries(address);
  return { id: row.id, organizationId: row.organization_id, name: row.name, email: address };
}
