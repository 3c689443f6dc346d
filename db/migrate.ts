import knex from 'knex';
import config from '../knexfile';
import { loadDemo } from './seeds/demo';

const connection = knex(config);
try {
  const [, applied] = (await connection.migrate.latest()) as [number, string[]];
  console.error(applied.length ? `migrated: ${applied.length} step(s)` : 'database is up to date');
  if (process.argv.includes('--demo')) console.error((await loadDemo(connection)) ? 'demo loaded' : 'demo is already there');
} finally {
  await connection.destroy();
}
