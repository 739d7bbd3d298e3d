import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.schema.alterTable('probes', (table) => {
    table.text('accuracy_class');
  });

  // What was written down at each calibration; what follows from it is worked out when it is asked for.
  await db.schema.createTable('probe_calibrations', (table) => {
    table.text('id').primary();
    table.text('probe_id').notNullable().references('probes.id').index();
    table.bigInteger('recorded_at_ms').notNullable();
    table.bigInteger('made_at_ms').notNullable();
    table.text('kind').notNullable();
    table.text('unit').notNullable();
    /** JSON list of reference and readings. */
    table.text('points').notNullable();
    table.double('pressure_hpa');
    table.double('altitude_m');
    table.text('reference_name').notNullable();
    table.double('reference_u');
    table.double('resolution').notNullable();
    table.double('drift').notNullable();
    table.integer('interval_months').notNullable();
    table.text('notes').notNullable();
  });

  await db.schema.alterTable('analyses', (table) => {
    /** JSON of the probe as it was known when the result was made; null before there was such a thing. */
    table.text('judged_with');
  });
}

export async function down(db: Knex): Promise<void> {
  // Knex would copy the whole table on SQLite; both databases can do it in place.
  await db.schema.raw('alter table analyses drop column judged_with');
  await db.schema.dropTable('probe_calibrations');
  await db.schema.raw('alter table probes drop column accuracy_class');
}
