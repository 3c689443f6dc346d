import { expect, it } from 'vitest';
import { db } from '@/db/knex';
import { withDatabase } from '../../make/database';

withDatabase();

it('the message of a query that fails names the table, and none of the values it was given', async () => {
  // The application's own pool, not the one that the suite puts in its place.
  const holder = globalThis as typeof globalThis & { evenheadDb?: unknown };
  const ofSuite = holder.evenheadDb;
  delete holder.evenheadDb;
  const own = db();
  holder.evenheadDb = ofSuite;
  const message = await own('sign_ins')
    .insert({ email: 'Upper@test.example', password_hash: 'a secret hash' })
    .catch((error: Error) => error.message);
  await own.destroy();
  expect(message).toContain('sign_ins');
  expect(message).not.toContain('a secret hash');
});
