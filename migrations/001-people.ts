import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.schema.createTable('shop', (table) => {
    table.integer('id').primary();
    table.text('name').notNullable();
    table.text('town').notNullable();
    table.text('phone').notNullable();
    table.text('email').notNullable();
    table.text('zone').notNullable();
    table.text('unit').notNullable();
    table.integer('min_cycles').notNullable();
    table.boolean('is_demo').notNullable();
  });

  await db.schema.createTable('users', (table) => {
    table.text('id').primary();
    table.text('name').notNullable();
    table.text('email').notNullable().unique();
    table.text('role').notNullable();
    table.text('password_hash').notNullable();
    table.bigInteger('created_at_ms').notNullable();
    table.bigInteger('disabled_at_ms');
  });

  await db.schema.createTable('sessions', (table) => {
    table.text('id').primary();
    table.text('user_id').notNullable().references('users.id').index();
    table.bigInteger('created_at_ms').notNullable();
    table.bigInteger('seen_at_ms').notNullable();
    table.bigInteger('ended_at_ms');
  });

  // Keyed by a hash of what was typed, whether such a person exists or not.
  await db.schema.createTable('sign_in_failures', (table) => {
    table.text('email_hash').primary();
    table.integer('failures').notNullable();
    table.bigInteger('last_at_ms').notNullable();
    table.bigInteger('blocked_until_ms').notNullable();
  });

  await db.schema.createTable('audit_log', (table) => {
    table.increments('id');
    table.bigInteger('at_ms').notNullable().index();
    table.text('user_id').references('users.id');
    table.text('event').notNullable();
    table.text('subject').notNullable();
    table.text('details').notNullable();
  });
}

export async function down(db: Knex): Promise<void> {
  for (const table of ['audit_log', 'sign_in_failures', 'sessions', 'users', 'shop']) {
    await db.schema.dropTable(table);
  }
}
