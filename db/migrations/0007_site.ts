import type { Knex } from 'knex';

/** What is entered on site besides a valve's drop: more ways to read a flow, settings changed, checks, snags, photos, certificates. */
const appendOnly = ['setting_changes', 'check_answers', 'snags', 'snag_resolutions', 'photos', 'instrument_certificates'];

export async function up(knex: Knex): Promise<void> {
  await knex.schema.alterTable('readings', (table) => {
    /** Server − device when the reading was taken, as far as the device knew. */
    table.bigInteger('clock_offset_ms');
    table.specificType('heat_kw', 'double precision');
    table.specificType('supply_c', 'double precision');
    table.specificType('return_c', 'double precision');
    table.specificType('pump_speed', 'double precision');
    /** Whether the instrument was read outside its range. */
    table.boolean('instrument_out_of_range').notNullable().defaultTo(false);
  });
  await knex.raw('alter table readings drop constraint readings_method');
  await knex.raw(
    "alter table readings add constraint readings_method check (method in ('valve-drop', 'direct-flow', 'heat-balance', 'pump-differential', 'coil-differential'))",
  );
  await knex.raw('alter table instruments drop constraint instruments_kind');
  await knex.raw(
    "alter table instruments add constraint instruments_kind check (kind in ('differential-pressure', 'flow', 'temperature', 'heat'))",
  );
  await knex.schema.alterTable('station_designs', (table) => {
    /** Index terminal, flow under 0.1 L/s, valve of a main or riser; 'all' otherwise. */
    table.text('rank').notNullable().defaultTo('all');
    table.specificType('coil_drop_kpa', 'double precision');
    table.jsonb('pump_curve');
    table.specificType('pump_speed', 'double precision');
    table.check("rank in ('all', 'index', 'small', 'main')", [], 'station_designs_rank');
  });
  await knex.schema.alterTable('tolerance_rules', (table) => {
    table.text('rank').notNullable().defaultTo('all');
    table.dropPrimary();
    table.primary(['organization_id', 'project_id', 'station_kind', 'rank']);
    table.check("rank in ('all', 'index', 'small', 'main')", [], 'tolerance_rules_rank');
  });
  await knex.schema.alterTable('rounds', (table) => {
    /** Why the round was started although checks were open. */
    table.text('open_checks_reason').notNullable().defaultTo('');
  });

  await knex.schema.createTable('setting_changes', (table) => {
    enteredOnSite(knex, table);
    table.uuid('round_id').notNullable();
    table.uuid('station_id').notNullable();
    table.specificType('before', 'double precision');
    table.specificType('after', 'double precision').notNullable();
    table.text('note').notNullable().defaultTo('');
    table.foreign(['organization_id', 'round_id']).references(['organization_id', 'id']).inTable('rounds');
    table.foreign(['organization_id', 'station_id']).references(['organization_id', 'id']).inTable('stations');
  });

  await knex.schema.createTable('check_answers', (table) => {
    enteredOnSite(knex, table);
    table.text('check_key').notNullable();
    table.text('answer').notNullable();
    table.text('remark').notNullable().defaultTo('');
    table.check("answer in ('done', 'open', 'not-applicable')", [], 'check_answers_answer');
  });

  await knex.schema.createTable('snags', (table) => {
    enteredOnSite(knex, table);
    table.integer('number').notNullable();
    table.uuid('station_id');
    table.text('text').notNullable();
    table.unique(['organization_id', 'loop_id', 'number']);
    table.foreign(['organization_id', 'station_id']).references(['organization_id', 'id']).inTable('stations');
  });

  await knex.schema.createTable('snag_resolutions', (table) => {
    enteredOnSite(knex, table);
    table.uuid('snag_id').notNullable();
    table.text('note').notNullable();
    table.unique(['organization_id', 'snag_id']);
    table.foreign(['organization_id', 'snag_id']).references(['organization_id', 'id']).inTable('snags');
  });

  await knex.schema.createTable('photos', (table) => {
    enteredOnSite(knex, table);
    table.text('subject').notNullable();
    table.text('subject_id').notNullable();
    table.integer('width_px').notNullable();
    table.integer('height_px').notNullable();
    table.integer('bytes').notNullable();
    table.text('sha256').notNullable();
    table.check("subject in ('station', 'check', 'snag')", [], 'photos_subject');
  });

  await knex.schema.createTable('instrument_certificates', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('id').notNullable();
    table.uuid('instrument_id').notNullable();
    table.text('file_name').notNullable();
    table.text('media_type').notNullable();
    table.integer('bytes').notNullable();
    table.text('sha256').notNullable();
    table.uuid('uploaded_by').notNullable();
    table.timestamp('uploaded_at').notNullable().defaultTo(knex.fn.now());
    table.primary(['organization_id', 'id']);
    table.foreign(['organization_id', 'instrument_id']).references(['organization_id', 'id']).inTable('instruments');
    table.foreign(['organization_id', 'uploaded_by']).references(['organization_id', 'id']).inTable('people');
  });

  /** A walking order that was changed by hand; a station that is not in it follows in the revision's order. */
  await knex.schema.createTable('station_orders', (table) => {
    table.uuid('organization_id').notNullable();
    table.uuid('loop_id').notNullable();
    table.uuid('station_id').notNullable();
    table.integer('position').notNullable();
    table.primary(['organization_id', 'loop_id', 'station_id']);
    table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
    table.foreign(['organization_id', 'station_id']).references(['organization_id', 'id']).inTable('stations');
  });

  for (const table of appendOnly) {
    await knex.raw(
      `create trigger ${table}_append_only before update or delete on ${table} for each row execute function refuse_rewriting()`,
    );
    await knex.raw(
      `create trigger ${table}_no_truncate before truncate on ${table} for each statement execute function refuse_rewriting()`,
    );
  }
}

/** Whose, of which loop, by whom, when by the device's clock and when it arrived. */
function enteredOnSite(knex: Knex, table: Knex.CreateTableBuilder): void {
  table.uuid('organization_id').notNullable();
  table.uuid('id').notNullable();
  table.uuid('loop_id').notNullable();
  table.uuid('entered_by').notNullable();
  table.timestamp('entered_at').notNullable();
  table.bigInteger('clock_offset_ms');
  table.timestamp('recorded_at').notNullable().defaultTo(knex.fn.now());
  table.primary(['organization_id', 'id']);
  table.index(['organization_id', 'loop_id']);
  table.foreign(['organization_id', 'loop_id']).references(['organization_id', 'id']).inTable('loops');
  table.foreign(['organization_id', 'entered_by']).references(['organization_id', 'id']).inTable('people');
}

/** Entries made by the new methods and by the new tables go with them: to be used on a copy of the data, never to undo a working season. */
export async function down(knex: Knex): Promise<void> {
  for (const table of [...appendOnly].reverse()) await knex.schema.dropTable(table);
  await knex.schema.dropTable('station_orders');
  await knex.schema.alterTable('rounds', (table) => table.dropColumn('open_checks_reason'));
  await knex('tolerance_rules').whereNot({ rank: 'all' }).delete();
  await knex.schema.alterTable('tolerance_rules', (table) => {
    table.dropPrimary();
    table.dropColumn('rank');
    table.primary(['organization_id', 'project_id', 'station_kind']);
  });
  await knex.schema.alterTable('station_designs', (table) => table.dropColumns('rank', 'coil_drop_kpa', 'pump_curve', 'pump_speed'));
  await knex.raw('alter table instruments drop constraint instruments_kind');
  await knex.raw("alter table instruments add constraint instruments_kind check (kind in ('differential-pressure', 'flow')) not valid");
  await knex.raw('alter table readings drop constraint readings_method');
  await knex.raw("alter table readings add constraint readings_method check (method in ('valve-drop', 'direct-flow')) not valid");
  await knex.schema.alterTable('readings', (table) =>
    table.dropColumns('clock_offset_ms', 'heat_kw', 'supply_c', 'return_c', 'pump_speed', 'instrument_out_of_range'),
  );
}
