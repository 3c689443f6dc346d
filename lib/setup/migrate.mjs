import { join } from 'node:path';
import { SetupFailure } from './failure.mjs';
import { root } from './places.mjs';
import { run } from './processes.mjs';

/**
 * Brings a database to the newest migration; with `demo`, loads the demo project if it is not there yet.
 * @param {string} databaseUrl
 * @param {{ demo: boolean }} options
 */
export async function migrate(databaseUrl, { demo }) {
  const program = join(root, 'node_modules/tsx/dist/cli.mjs');
  const parameters = [program, join(root, 'db/migrate.ts'), ...(demo ? ['--demo'] : [])];
  const migrated = await run(process.execPath, parameters, { cwd: root, env: { ...process.env, DATABASE_URL: databaseUrl } });
  if (migrated.code === 0) return;
  if (/ECONNREFUSED|ENOTFOUND|ETIMEDOUT/.test(migrated.output))
    throw new SetupFailure('The database does not answer. Check that DATABASE_URL names the right machine and port and that it runs.');
  if (/password authentication failed|no pg_hba.conf entry/.test(migrated.output))
    throw new SetupFailure('The database refuses us. Check the user and the password in DATABASE_URL.');
  throw new Error(`The database could not be migrated:\n${migrated.output}`);
}
