import type { Knex } from 'knex';
import { migrationSource } from './db/migration-source';

const databaseUrl = process.env.DATABASE_URL;
if (!databaseUrl) throw new Error('DATABASE_URL is not set. `npm start`, `npm run dev` and `npm test` set it; see README.md.');

/** One configuration for every environment: where the database is, is the environment's business. */
const config: Knex.Config = {
  client: 'pg',
  connection: { connectionString: databaseUrl, application_name: 'evenhead' },
  pool: { min: 0, max: Number(process.env.DATABASE_POOL ?? 10) },
  migrations: { migrationSource },
};

export default config;
