import { randomBytes } from 'node:crypto';
import knex from 'knex';
import { expect, it } from 'vitest';
import { migrationSource } from '@/db/migration-source';
import { withDatabase } from '../../make/database';
import { makeOrganization } from '../../make/organization';

const suite = withDatabase();

const tables = async (connection: knex.Knex) => {
  const { rows } = await connection.raw(
    `select tablename from pg_tables where schemaname = 'public' and tablename not like 'knex_%' order by 1`,
  );
  return rows.map((row: { tablename: string }) => row.tablename);
};

it('every migration goes down to an empty database and up again to the same tables', async () => {
  const name = `evenhead_test_${randomBytes(6).toString('hex')}`;
  await suite.db.raw('create database ??', [name]);
  const connection = knex({
    client: 'pg',
    connection: { connectionString: Object.assign(new URL(process.env.DATABASE_URL!), { pathname: `/${name}` }).toString() },
    migrations: { migrationSource },
  });
  try {
    await connection.migrate.latest();
    const up = await tables(connection);
    expect(up).toContain('readings');
    await connection.migrate.rollback(undefined, true);
    expect(await tables(connection)).toEqual([]);
    const { rows } = await connection.raw(`select proname from pg_proc where pronamespace = 'public'::regnamespace`);
    expect(rows).toEqual([]);
    await connection.migrate.latest();
    expect(await tables(connection)).toEqual(up);
  } finally {
    await connection.destroy();
    await suite.db.raw('drop database ?? with (force)', [name]);
  }
});

it('every table of an organisation has organization_id in its primary key', async () => {
  const { rows } = await suite.db.raw(`
    select t.tablename from pg_tables t
    where t.schemaname = 'public' and t.tablename not like 'knex_%' and t.tablename <> 'sign_ins'
      and not exists (
        select 1 from information_schema.table_constraints c
        join information_schema.key_column_usage k using (constraint_name, table_schema)
        where c.table_name = t.tablename and c.constraint_type = 'PRIMARY KEY' and k.column_name = 'organization_id')`);
  expect(rows).toEqual([]);
});

it('the database refuses to change or remove what was measured, signed, issued or done', async () => {
  const { organizationId, projectId, designer } = await makeOrganization(suite.db);
  await suite.db('activity').insert({
    organization_id: organizationId,
    id: '01930000-0000-7000-8000-000000000001',
    project_id: projectId,
    person_id: designer.id,
    person_name: 'designer',
    verb: 'made',
    subject: 'a test',
  });
  await expect(suite.db('activity').update({ verb: 'undid' })).rejects.toThrow('append-only');
  await expect(suite.db('activity').delete()).rejects.toThrow('append-only');
  await expect(suite.db.raw('truncate activity')).rejects.toThrow('append-only');
  expect(await suite.db('activity').select('verb')).toEqual([{ verb: 'made' }]);
  const { rows } = await suite.db.raw(
    `select distinct event_object_table as name from information_schema.triggers where trigger_name like '%_append_only' order by 1`,
  );
  expect(rows.map((row: { name: string }) => row.name)).toEqual([
    'activity',
    'check_answers',
    'instrument_certificates',
    'photos',
    'readings',
    'reports',
    'revisions',
    'setting_changes',
    'signatures',
    'snag_resolutions',
    'snags',
    'station_designs',
  ]);
});
