import type { Knex } from 'knex';

/** Projects with their people and tolerance rules; loops with one draft each and their frozen revisions. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('projects', (table) => {
    table.uuid('organization_id').notNullable().references('organizations.organization_id');
    table.uuid('id').notNullable();
    table.text('name').notNullable();
    table.text('client').notNullable().defaultTo('');
    table.text('building').notNullable().defaultTo('');
    table.uuid('created_by').notNullable();
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'name']);
    table.foreign(['organization_id', 'created_by']).references(['organization_id', 'id']).inTable('people');
  });

  await knex.schema.createTable('project_members', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('project_id').notNullable();
    table.uuid('person_id').notNullable();
    table.text('role').notNullable();
    table.primary(['organization_id', 'project_id', 'person_id', 'role']);
    table.foreign(['organization_id', 'project_id']).references(['organization_id', 'id']).inTable('projects');
    table.foreign(['organization_id', 'person_id']).references(['organization_id', 'id']).inTable('people');
    table.index(['organization_id', 'person_id']);
    table.check("role in ('designer', 'technician', 'owner')", [], 'project_members_role');
  });

  await knex.schema.createTable('tolerance_rules', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('project_id').notNullable();
    table.text('station_kind').notNullable();
    table.specificType('lower_percent', 'double precision').notNullable();
    table.specificType('upper_percent', 'double precision').notNullable();
    table.text('source').notNullable();
    table.primary(['organization_id', 'project_id', 'station_kind']);
    table.foreign(['organization_id', 'project_id']).references(['organization_id', 'id']).inTable('projects');
    table.check("station_kind in ('terminal', 'branch', 'pump')", [], 'tolerance_rules_station_kind');
    table.check('lower_percent <= 0 and upper_percent >= 0 and lower_percent > -100', [], 'tolerance_rules_band');
  });

  await knex.schema.createTable('loops', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('project_id').notNullable();
    table.text('name').notNullable();
    table.text('service').notNullable();
    table.text('state').notNullable().defaultTo('draft');
    table.uuid('created_by').notNullable();
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'project_id', 'name']);
    table.foreign(['organization_id', 'project_id']).references(['organization_id', 'id']).inTable('projects');
    table.foreign(['organization_id', 'created_by']).references(['organization_id', 'id']).inTable('people');
    table.check("service in ('chilled', 'hot')", [], 'loops_service');
    table.check("state in ('draft', 'issued', 'in-commissioning', 'submitted', 'reviewed', 'accepted')", [], 'loops_state');
  });

  await knex.schema.createTable('drafts', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('loop_id').notNullable();
    table.integer('version').notNullable();
    table.jsonb('drawing').notNullable();
    table.uuid('saved_by').notNullable();
    table.timestamp('saved_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'loop_id']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'saved_by']).references(['organization_id', 'id']).inTable('people');
  });

  await knex.schema.createTable('revisions', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('loop_id').notNullable();
    table.integer('number').notNullable();
    table.text('note').notNullable().defaultTo('');
    table.jsonb('drawing').notNullable();
    table.jsonb('network_document').notNullable();
    table.jsonb('balance').notNullable();
    table.jsonb('changes').notNullable().defaultTo('[]');
    table.uuid('issued_by').notNullable();
    table.timestamp('issued_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'loop_id', 'number']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'issued_by']).references(['organization_id', 'id']).inTable('people');
    table.check('number >= 1', [], 'revisions_number');
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['revisions', 'drafts', 'loops', 'tolerance_rules', 'project_members', 'projects'])
    await knex.schema.dropTable(table);
}
