import type { Knex } from 'knex';

/**
 * Stations and what is measured at them. A station lives as long as its piece on the drawing; `station_designs` holds
 * what each revision asks of it, so that a reading is always judged against the revision it was taken under.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.schema.createTable('instruments', (table) => {
    table.uuid('organization_id').notNullable().references('organizations.organization_id');
    table.uuid('id').notNullable();
    table.text('name').notNullable();
    table.text('kind').notNullable();
    table.text('serial').notNullable();
    table.specificType('range_low', 'double precision');
    table.specificType('range_high', 'double precision');
    table.specificType('accuracy_percent', 'double precision').notNullable();
    table.specificType('accuracy_absolute', 'double precision').notNullable().defaultTo(0);
    table.date('calibrated_on');
    table.date('calibration_due_on');
    table.boolean('is_retired').notNullable().defaultTo(false);
    table.timestamp('created_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'serial']);
    table.check("kind in ('differential-pressure', 'flow')", [], 'instruments_kind');
  });

  await knex.schema.createTable('stations', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('loop_id').notNullable();
    table.text('element_id').notNullable();
    table.text('kind').notNullable();
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'loop_id', 'element_id']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.check("kind in ('terminal', 'branch', 'pump')", [], 'stations_kind');
  });

  await knex.schema.createTable('station_designs', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('revision_id').notNullable();
    table.uuid('station_id').notNullable();
    table.integer('walking_order').notNullable();
    table.text('tag').notNullable();
    table.text('storey').notNullable().defaultTo('');
    table.text('room').notNullable().defaultTo('');
    table.specificType('design_flow_ls', 'double precision').notNullable();
    table.text('valve_name').notNullable().defaultTo('');
    table.jsonb('kv_table');
    table.specificType('setting_turns', 'double precision');
    table.specificType('expected_drop_kpa', 'double precision');
    table.primary(['organization_id', 'revision_id', 'station_id']);
    table.foreign(['organization_id', 'revision_id']).references(['organization_id', 'id']).inTable('revisions');
    table.foreign(['organization_id', 'station_id']).references(['organization_id', 'id']).inTable('stations');
    table.check('design_flow_ls > 0', [], 'station_designs_flow');
  });

  await knex.schema.createTable('rounds', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('loop_id').notNullable();
    table.uuid('revision_id').notNullable();
    table.integer('number').notNullable();
    table.text('purpose').notNullable();
    table.uuid('started_by').notNullable();
    table.timestamp('started_at').notNullable().defaultTo(knex.fn.now());
    table.timestamp('closed_at');
    table.primary(['organization_id', 'id']);
    table.unique(['organization_id', 'loop_id', 'number']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'revision_id']).references(['organization_id', 'id']).inTable('revisions');
    table.foreign(['organization_id', 'started_by']).references(['organization_id', 'id']).inTable('people');
  });
  await knex.raw('create unique index rounds_one_open on rounds (organization_id, loop_id) where closed_at is null');

  await knex.schema.createTable('readings', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('round_id').notNullable();
    table.uuid('revision_id').notNullable();
    table.uuid('station_id').notNullable();
    table.text('method').notNullable();
    table.specificType('setting_turns', 'double precision');
    table.specificType('drop_kpa', 'double precision');
    table.specificType('kv', 'double precision');
    table.specificType('flow_ls', 'double precision').notNullable();
    table.specificType('percent_of_design', 'double precision').notNullable();
    table.specificType('uncertainty_percent', 'double precision').notNullable();
    table.text('verdict').notNullable();
    table.jsonb('entered').notNullable();
    table.uuid('instrument_id').notNullable();
    table.boolean('instrument_overdue').notNullable();
    table.uuid('corrects_reading_id');
    table.text('note').notNullable().defaultTo('');
    table.uuid('taken_by').notNullable();
    table.timestamp('taken_at').notNullable();
    table.timestamp('recorded_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.index(['organization_id', 'station_id', 'round_id']);
    table.foreign(['organization_id', 'round_id']).references(['organization_id', 'id']).inTable('rounds');
    table
      .foreign(['organization_id', 'revision_id', 'station_id'])
      .references(['organization_id', 'revision_id', 'station_id'])
      .inTable('station_designs');
    table.foreign(['organization_id', 'instrument_id']).references(['organization_id', 'id']).inTable('instruments');
    table.foreign(['organization_id', 'taken_by']).references(['organization_id', 'id']).inTable('people');
    table.foreign(['organization_id', 'corrects_reading_id']).references(['organization_id', 'id']).inTable('readings');
    table.check("method in ('valve-drop', 'direct-flow')", [], 'readings_method');
    table.check("verdict in ('low', 'within', 'high')", [], 'readings_verdict');
  });
  await knex.raw(
    'create unique index readings_one_correction on readings (organization_id, corrects_reading_id) where corrects_reading_id is not null',
  );
}

export async function down(knex: Knex): Promise<void> {
  for (const table of ['readings', 'rounds', 'station_designs', 'stations', 'instruments']) await knex.schema.dropTable(table);
}
