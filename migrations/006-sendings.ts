import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  // What devices kept and sent later: written in the transaction that applies the thing, so it is applied once.
  await db.schema.createTable('received_things', (table) => {
    /** Made on the device. */
    table.text('id').primary();
    table.text('person_id').notNullable().references('users.id').index();
    table.text('device_id').notNullable();
    table.integer('kept_order').notNullable();
    table.text('kind').notNullable();
    table.text('chain');
    table.integer('chain_n');
    /** Of kind, place in the chain and payload: the same id with something else in it is refused. */
    table.text('sha256').notNullable();
    /** JSON: the answer of the first time, which every later time gets again. */
    table.text('answer').notNullable();
    table.bigInteger('made_at_ms').notNullable();
    table.bigInteger('received_at_ms').notNullable().index();
    table.unique(['person_id', 'device_id', 'chain', 'chain_n']);
  });

  // The last edit of a visit's notes: an edit made on an older state is a conflict.
  await db.schema.createTable('visit_edits', (table) => {
    table.text('visit_id').primary().references('visits.id');
    table.text('version').notNullable();
    table.text('edited_by').notNullable().references('users.id');
    table.bigInteger('edited_at_ms').notNullable();
  });
}

export async function down(db: Knex): Promise<void> {
  for (const table of ['visit_edits', 'received_things']) await db.schema.dropTable(table);
}
