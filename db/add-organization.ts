import { z } from 'zod';
import { emailSchema, nameSchema } from '@/lib/api/people';
import { Problem } from '@/lib/server/problem';
import { makeOrganization } from '@/lib/server/people/make-organization';
import { db } from './knex';

/** `npm run organization -- "Organisation" "Name of the administrator" address@site`: the first person of a database without the demo. */
const [organization, name, email] = process.argv.slice(2);
const wanted = z.object({ organization: nameSchema, name: nameSchema, email: emailSchema }).safeParse({ organization, name, email });

if (!wanted.success) {
  console.error('Give three things: npm run organization -- "Organisation" "Name of the administrator" address@site');
  process.exitCode = 2;
} else {
  try {
    console.log(`Open this link within a week to set the password: ${await makeOrganization(wanted.data)}`);
  } catch (error) {
    if (!(error instanceof Problem)) throw error;
    console.error(error.message);
    process.exitCode = 1;
  } finally {
    await db().destroy();
  }
}
