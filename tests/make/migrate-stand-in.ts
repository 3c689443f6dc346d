import pg from 'pg';

const client = new pg.Client({ connectionString: process.env.DATABASE_URL });
await client.connect();
await client.query('create table if not exists readings (what text)');
const { rowCount } = await client.query('select 1 from readings');
if (process.argv.includes('--demo') && !rowCount) await client.query("insert into readings values ('from the demo')");
await client.end();
