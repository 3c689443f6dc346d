import type { Knex } from 'knex';

/** The organisation's own valves and pumps. Drawings hold copies, so a row here may be replaced or removed without touching a loop. */
export async function up(knex: Knex): Promise<void> {
  const described = (table: Knex.CreateTableBuilder) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.text('name').notNullable();
    table.text('source').notNullable();
    table.integer('version').notNullable().defaultTo(1);
    table.uuid('changed_by').notNullable();
    table.timestamp('changed_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.foreign(['organization_id', 'changed_by']).references(['organization_id', 'id']).inTable('people');
  };
  await knex.schema.createTable('valve_families', described);
  await knex.schema.createTable('valve_sizes', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('family_id').notNullable();
    table.text('nominal').notNullable();
    table.integer('position').notNullable();
    table.specificType('step_turns', 'double precision');
    table.jsonb('points').notNullable();
    table.primary(['organization_id', 'family_id', 'nominal']);
    table.foreign(['organization_id', 'family_id']).references(['organization_id', 'id']).inTable('valve_families').onDelete('CASCADE');
    table.check('step_turns > 0', [], 'valve_sizes_step');
  });
  await knex.schema.createTable('catalogue_pumps', (table) => {
    described(table);
    table.jsonb('points').notNullable();
  });
  for (const table of ['valve_families', 'catalogue_pumps']) {
    await knex.raw(`create unique index ${table}_name on ${table} (organization_id, lower(name))`);
  }
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['catalogue_pumps', 'valve_sizes', 'valve_families']) await knex.schema.dropTable(table);
}
