import type { Knex } from 'knex';

/** Signatures, accepted reports and the activity record, and the rule that what was measured, signed or done is never rewritten. */
const appendOnly = ['revisions', 'station_designs', 'readings', 'signatures', 'reports', 'activity'];

export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('signatures', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('loop_id').notNullable();
    table.uuid('revision_id').notNullable();
    table.integer('submission').notNullable();
    table.text('meaning').notNullable();
    table.text('note').notNullable().defaultTo('');
    table.text('content_sha256').notNullable();
    table.uuid('person_id').notNullable();
    table.text('person_name').notNullable();
    table.text('person_role').notNullable();
    table.timestamp('signed_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'revision_id']).references(['organization_id', 'id']).inTable('revisions');
    table.foreign(['organization_id', 'person_id']).references(['organization_id', 'id']).inTable('people');
    table.check("meaning in ('submitted', 'reviewed', 'returned', 'accepted')", [], 'signatures_meaning');
    // Nobody signs twice on one report under two roles.
    table.unique(['organization_id', 'loop_id', 'submission', 'person_id']);
  });

  await knex.schema.createTable('reports', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('loop_id').notNullable();
    table.uuid('revision_id').notNullable();
    table.integer('number').notNullable();
    table.jsonb('content').notNullable();
    table.binary('workbook').notNullable();
    table.text('sha256').notNullable();
    table.timestamp('accepted_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'loop_id', 'number']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'revision_id']).references(['organization_id', 'id']).inTable('revisions');
  });

  await knex.schema.createTable('activity', (table) => {
    table.uuid('organization_id').notNullable().references('organizations.organization_id');
    table.uuid('id').notNullable();
    table.uuid('project_id');
    table.uuid('loop_id');
    table.uuid('person_id').notNullable();
    table.text('person_name').notNullable();
    table.text('verb').notNullable();
    table.text('subject').notNullable();
    table.jsonb('detail').notNullable().defaultTo('{}');
    table.timestamp('at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.index(['organization_id', 'project_id', 'at']);
  });

  await knex.raw(`
    create function refuse_rewriting() returns trigger language plpgsql as $$
    begin
      raise exception '% is append-only', tg_table_name using errcode = 'restrict_violation';
    end $$`);
  for (const table of appendOnly) {
    await knex.raw(
      `create trigger ${table}_append_only before update or delete on ${table} for each row execute function refuse_rewriting()`,
    );
    await knex.raw(
      `create trigger ${table}_no_truncate before truncate on ${table} for each statement execute function refuse_rewriting()`,
    );
  }
}

export async function down(knex: Knex): Promise<void> {
  for (const table of appendOnly) {
    await knex.raw(`drop trigger ${table}_append_only on ${table}`);
    await knex.raw(`drop trigger ${table}_no_truncate on ${table}`);
  }
  await knex.raw('drop function refuse_rewriting()');
  for (const table of ['activity', 'reports', 'signatures']) await knex.schema.dropTable(table);
}
