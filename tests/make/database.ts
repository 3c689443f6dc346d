import { randomBytes } from 'node:crypto';
import knex, { type Knex } from 'knex';
import { afterAll, beforeAll } from 'vitest';
import { migrationSource } from '@/db/migration-source';

const template = 'evenhead_test_template';

/** Where the tests' PostgreSQL is; never anything but this machine's. */
function serverUrl(): URL {
  const text = process.env.TEST_DATABASE_URL ?? process.env.DATABASE_URL;
  if (!text) throw new Error('TEST_DATABASE_URL is not set: run `npm test`, which makes a throw-away PostgreSQL.');
  const url = new URL(text);
  if (!['127.0.0.1', 'localhost', '[::1]'].includes(url.hostname))
    throw new Error(`Tests refuse a database that is not local: ${url.hostname}`);
  return url;
}

const urlOf = (name: string) => Object.assign(serverUrl(), { pathname: `/${name}` }).toString();
const connect = (name: string) =>
  knex({ client: 'pg', connection: { connectionString: urlOf(name) }, pool: { min: 0, max: 4 }, migrations: { migrationSource } });

/** Migrates the template once; suites that start together wait for the first. */
async function makeTemplate(admin: Knex): Promise<void> {
  await admin.transaction(async (trx) => {
    await trx.raw('select pg_advisory_xact_lock(20261201)');
    const { rows } = await trx.raw('select 1 from pg_database where datname = ?', [template]);
    if (rows.length === 0) await admin.raw('create database ??', [template]);
    const connection = connect(template);
    await connection.migrate.latest();
    await connection.destroy();
  });
}

/**
 * Gives the suite a database of its own, a clone of the migrated template, as DATABASE_URL and as the application's
 * pool; dropped at the end. Call it once at the top of a test file.
 */
export function withDatabase(): { readonly db: Knex } {
  const name = `evenhead_test_${randomBytes(6).toString('hex')}`;
  const holder = globalThis as typeof globalThis & { evenheadDb?: Knex };
  const suite = {} as { db: Knex };

  beforeAll(async () => {
    const admin = connect(serverUrl().pathname.slice(1));
    await makeTemplate(admin);
    await admin.transaction(async (trx) => {
      // A template can be cloned only while nobody else is connected to it.
      await trx.raw('select pg_advisory_xact_lock(20261201)');
      await admin.raw('create database ?? template ??', [name, template]);
    });
    await admin.destroy();
    process.env.TEST_DATABASE_URL = serverUrl().toString();
    process.env.DATABASE_URL = urlOf(name);
    suite.db = knex({ client: 'pg', connection: { connectionString: urlOf(name) }, pool: { min: 0, max: 8 } });
    holder.evenheadDb = suite.db;
  });

  afterAll(async () => {
    await suite.db?.destroy();
    delete holder.evenheadDb;
    const admin = connect(serverUrl().pathname.slice(1));
    await admin.raw('drop database if exists ?? with (force)', [name]);
    await admin.destroy();
  });

  return suite;
}
