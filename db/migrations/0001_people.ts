import type { Knex } from 'knex';

/**
 * Organisations and people. `sign_ins` is the one table not keyed by organisation: it answers "which organisation
 * does this e-mail belong to" before anything else is known, and a sharded database would replicate it.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('organizations', (table) => {
    table.uuid('organization_id').primary();
    table.text('name').notNullable();
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
  });

  await knex.schema.createTable('people', (table) => {
    table.uuid('organization_id').notNullable().references('organizations.organization_id');
    table.uuid('id').notNullable();
    table.text('name').notNullable();
    table.text('email').notNullable();
    table.boolean('is_administrator').notNullable().defaultTo(false);
    table.text('default_role').notNullable();
    table.boolean('is_active').notNullable().defaultTo(true);
    table.text('theme').notNullable().defaultTo('system');
    table.jsonb('units').notNullable().defaultTo('{}');
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'email']);
    table.check("default_role in ('designer', 'technician', 'owner')", [], 'people_default_role');
    table.check("theme in ('system', 'light', 'dark')", [], 'people_theme');
  });

  await knex.schema.createTable('sign_ins', (table) => {
    table.text('email').primary();
    table.uuid('organization_id').notNullable();
    table.uuid('person_id').notNullable();
    table.text('password_hash');
    table.timestamp('password_changed_at');
    table.foreign(['organization_id', 'person_id']).references(['organization_id', 'id']).inTable('people');
    table.unique(['organization_id', 'person_id']);
    table.check('email = lower(email)', [], 'sign_ins_email_lower');
  });

  await knex.schema.createTable('password_links', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('person_id').notNullable();
    table.text('purpose').notNullable();
    table.text('token_sha256').notNullable().unique();
    table.timestamp('expires_at').notNullable();
    table.timestamp('used_at');
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.foreign(['organization_id', 'person_id']).references(['organization_id', 'id']).inTable('people');
    table.check("purpose in ('invitation', 'reset')", [], 'password_links_purpose');
  });
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['password_links', 'sign_ins', 'people', 'organizations']) await knex.schema.dropTable(table);
}
