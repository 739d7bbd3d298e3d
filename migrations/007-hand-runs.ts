import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  // A run taken by hand is the list of its events; nothing in it is ever changed.
  await db.schema.createTable('hand_run_events', (table) => {
    /** Made on the device; becomes the id of the run. */
    table.text('run_id').notNullable();
    table.integer('n').notNullable();
    table.text('event_id').notNullable().unique();
    table.text('kind').notNullable();
    table.text('visit_id').notNullable().references('visits.id').index();
    table.text('user_id').notNullable().references('users.id');
    /** JSON of the whole event. */
    table.text('event').notNullable();
    table.bigInteger('received_at_ms').notNullable();
    table.primary(['run_id', 'n']);
  });
  await db.schema.alterTable('runs', (table) => {
    /** `file` or `stopwatch`. */
    table.text('source').notNullable().defaultTo('file');
  });
}

export async function down(db: Knex): Promise<void> {
  // Knex would copy the whole table.
  await db.schema.raw('alter table runs drop column source');
  await db.schema.dropTable('hand_run_events');
}
