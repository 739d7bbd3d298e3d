import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.schema.createTable('jobs', (table) => {
    table.text('id').primary();
    table.integer('number').notNullable().unique();
    table.text('machine_id').notNullable().references('machines.id').index();
    table.text('complaint').notNullable();
    table.text('state').notNullable();
    table.bigInteger('taken_at_ms').notNullable();
    table.text('calls_back_job_id').references('jobs.id').index();
  });

  await db.schema.createTable('visits', (table) => {
    table.text('id').primary();
    table.text('job_id').notNullable().references('jobs.id').index();
    table.text('technician_id').notNullable().references('users.id').index();
    table.bigInteger('starts_at_ms').notNullable().index();
    table.bigInteger('ends_at_ms').notNullable();
    table.bigInteger('safety_ticked_at_ms');
    table.text('notes').notNullable();
  });

  await db.schema.createTable('fitted_parts', (table) => {
    table.text('id').primary();
    table.text('machine_id').notNullable().references('machines.id').index();
    table.text('rating_id').notNullable().references('ratings.id').index();
    table.text('visit_id').references('visits.id').index();
    table.bigInteger('fitted_at_ms').notNullable();
    table.text('supplier').notNullable();
    table.text('lot').notNullable().index();
    table.bigInteger('removed_at_ms');
    table.text('removed_why').notNullable();
  });
}

export async function down(db: Knex): Promise<void> {
  for (const table of ['fitted_parts', 'visits', 'jobs']) await db.schema.dropTable(table);
}
