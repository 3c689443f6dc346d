import knex, { type Knex } from 'knex';

const holder = globalThis as typeof globalThis & { evenheadDb?: Knex };

/**
 * The pool of the running process. Opened at the first query and not at import, because `next build` imports
 * every route without a database; kept on globalThis because hot reload loads this module again and again.
 */
export function db(): Knex {
  if (!holder.evenheadDb) {
    const connectionString = process.env.DATABASE_URL;
    if (!connectionString) throw new Error('DATABASE_URL is not set; see README.md.');
    holder.evenheadDb = knex({
      client: 'pg',
      connection: { connectionString, application_name: 'evenhead' },
      pool: { min: 0, max: Number(process.env.DATABASE_POOL ?? 10) },
      // Otherwise the message of a failed query, and with it the log, holds what was being stored: a password's hash, a whole drawing.
      compileSqlOnError: false,
    });
  }
  return holder.evenheadDb;
}

/** Runs the application's own functions on a transaction of the caller: all that they do happens, or nothing. For the demo alone. */
export async function onConnection<Answer>(connection: Knex, work: () => Promise<Answer>): Promise<Answer> {
  const before = holder.evenheadDb;
  holder.evenheadDb = connection;
  try {
    return await work();
  } finally {
    holder.evenheadDb = before;
  }
}
