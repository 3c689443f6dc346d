import type { Knex } from 'knex';

/** Who has a loop's draft open, by when their page last said so: a row a person, written over and over; it counts for less than a minute. */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('draft_presence', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('loop_id').notNullable();
    table.uuid('person_id').notNullable();
    table.timestamp('seen_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'loop_id', 'person_id']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops').onDelete('CASCADE');
    table.foreign(['organization_id', 'person_id']).references(['organization_id', 'id']).inTable('people').onDelete('CASCADE');
  });
}

export async function down(knex: Knex): Promise<void> {
  await knex.schema.dropTable('draft_presence');
}
