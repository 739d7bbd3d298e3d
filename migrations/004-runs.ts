import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  // The untouched file lies in the data folder under its id; this row is what is known of it.
  await db.schema.createTable('uploads', (table) => {
    table.text('id').primary();
    table.text('file_name').notNullable();
    table.bigInteger('bytes').notNullable();
    table.text('sha256').notNullable();
    table.text('uploaded_by').notNullable().references('users.id');
    table.bigInteger('uploaded_at_ms').notNullable();
  });

  await db.schema.createTable('runs', (table) => {
    table.text('id').primary();
    table.text('visit_id').notNullable().references('visits.id').index();
    table.text('upload_id').notNullable().references('uploads.id').index();
    table.text('probe_id').references('probes.id').index();
    table.text('label').notNullable();
    table.bigInteger('started_at_ms').notNullable();
    table.bigInteger('accepted_at_ms').notNullable();
    table.text('placement').notNullable();
    table.text('duct').notNullable();
    table.text('load').notNullable();
    table.text('setting').notNullable();
    table.double('room_temp');
    table.text('room_unit').notNullable();
    table.text('marks').notNullable();
    table.integer('samples').notNullable();
    table.double('duration_s').notNullable();
    table.text('channel').notNullable();
    table.text('channel_unit').notNullable();
    /** JSON list of the other temperature columns: name and unit. */
    table.text('channels').notNullable();
    /** JSON: choices, warnings, rows set aside, span: how the file was read. */
    table.text('reading').notNullable();
    /** JSON list of at most 66 [s, °C] pairs, for lists. */
    table.text('spark').notNullable();
  });

  // Packed float64 arrays as recorded, little-endian, at most 65,536 samples a chunk.
  await db.schema.createTable('run_samples', (table) => {
    // No foreign key: readings are written piece by piece before the run's own row, which makes them count.
    table.text('run_id').notNullable();
    /** 0: times in s; 1: the run's temperatures; 2 and up: further channels. */
    table.integer('channel').notNullable();
    table.integer('chunk').notNullable();
    table.integer('samples').notNullable();
    table.binary('packed').notNullable();
    table.primary(['run_id', 'channel', 'chunk']);
  });

  await db.schema.createTable('analyses', (table) => {
    table.text('id').primary();
    table.text('run_id').notNullable().references('runs.id').index();
    table.text('version').notNullable();
    table.bigInteger('made_at_ms').notNullable();
    table.text('judged_by');
    table.text('outcome').notNullable();
    table.text('headline').notNullable();
    /** JSON list of the first calls in order of time, for lists. */
    table.text('calls').notNullable();
    table.text('result').notNullable();
  });

  await db.schema.createTable('notes_on_runs', (table) => {
    table.text('id').primary();
    table.text('run_id').notNullable().references('runs.id').index();
    table.text('user_id').notNullable().references('users.id');
    table.bigInteger('written_at_ms').notNullable();
    table.double('time_s').notNullable();
    table.double('temp_c').notNullable();
    table.text('text').notNullable();
  });

  await db.schema.createTable('shares', (table) => {
    table.text('id').primary();
    table.text('run_id').notNullable().references('runs.id').index();
    table.text('analysis_id').notNullable().references('analyses.id').index();
    table.text('token_hash').notNullable().unique();
    table.text('made_by').notNullable().references('users.id');
    table.bigInteger('made_at_ms').notNullable();
    table.bigInteger('expires_at_ms').notNullable();
    table.bigInteger('revoked_at_ms');
    table.bigInteger('opened_at_ms');
    /** JSON of the notes as they were when the link was made. */
    table.text('notes').notNullable();
  });
}

export async function down(db: Knex): Promise<void> {
  for (const table of ['shares', 'notes_on_runs', 'analyses', 'run_samples', 'runs', 'uploads']) {
    await db.schema.dropTable(table);
  }
}
