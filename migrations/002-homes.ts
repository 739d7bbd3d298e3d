import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.schema.createTable('customers', (table) => {
    table.text('id').primary();
    table.text('name').notNullable();
    table.text('phone').notNullable();
    table.text('email').notNullable();
    table.text('notes').notNullable();
  });

  await db.schema.createTable('homes', (table) => {
    table.text('id').primary();
    table.text('customer_id').notNullable().references('customers.id').index();
    table.text('address').notNullable();
    table.text('town').notNullable();
    table.text('access_notes').notNullable();
  });

  await db.schema.createTable('machines', (table) => {
    table.text('id').primary();
    table.text('home_id').notNullable().references('homes.id').index();
    table.text('make').notNullable();
    table.text('model').notNullable();
    table.text('serial').notNullable();
    table.text('fuel').notNullable();
    table.text('control').notNullable();
    table.double('rated_volts');
    table.double('rated_watts');
    table.text('place').notNullable();
  });

  // Temperatures stay in the unit they were typed in: 155 °F comes back as 155 °F.
  await db.schema.createTable('ratings', (table) => {
    table.text('id').primary();
    table.text('kind').notNullable();
    table.text('name').notNullable();
    table.text('unit').notNullable();
    table.double('opens').notNullable();
    table.double('opens_tol').notNullable();
    table.double('closes');
    table.double('closes_tol');
    table.double('overshoot').notNullable();
    table.double('undershoot').notNullable();
  });

  await db.schema.createTable('specified_ratings', (table) => {
    table.text('machine_id').notNullable().references('machines.id');
    table.text('setting').notNullable();
    table.text('rating_id').notNullable().references('ratings.id').index();
    table.text('limit_rating_id').references('ratings.id').index();
    table.primary(['machine_id', 'setting']);
  });

  await db.schema.createTable('probes', (table) => {
    table.text('id').primary();
    table.text('name').notNullable();
    table.text('kind').notNullable();
    table.text('unit').notNullable();
    table.double('accuracy').notNullable();
    table.double('response_s');
    table.double('calibration_u');
    table.bigInteger('calibrated_at_ms');
    table.text('notes').notNullable();
  });
}

export async function down(db: Knex): Promise<void> {
  for (const table of [
    'probes',
    'specified_ratings',
    'ratings',
    'machines',
    'homes',
    'customers',
  ]) {
    await db.schema.dropTable(table);
  }
}
