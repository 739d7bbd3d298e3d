import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { migrationSource } from '#migrations/index.ts';
import { isUniqueViolation, migrate, openDatabase } from '#server/db.ts';

let folder: string;
let db: Knex;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fusekeeper-db-'));
  db = openDatabase(join(folder, 'fusekeeper.sqlite'));
});

afterEach(async () => {
  await db.destroy();
  await rm(folder, { recursive: true });
});

async function pragma(name: string): Promise<unknown> {
  const [row] = await db.raw(`PRAGMA ${name}`);
  return Object.values(row)[0];
}

/** All tables, indexes and keys as they were written down, by name. */
async function schemaOf(): Promise<Map<string, string>> {
  const rows = await db('sqlite_master')
    .whereNotNull('sql')
    .whereNot('name', 'sqlite_sequence')
    .select('name', 'sql');
  return new Map(rows.map(({ name, sql }) => [name, sql]));
}

test('a written file keeps its journal and syncs at every commit, also when it is opened again', async () => {
  await migrate(db);
  const path = join(folder, 'fusekeeper.sqlite');
  const insert = async () =>
    db('audit_log').insert({ at_ms: 1, event: 'authz_fail', subject: '', details: '{}' });

  await insert();
  const first = [await pragma('journal_mode'), await pragma('synchronous')];
  await db.destroy();
  db = openDatabase(path);
  await insert();

  // 2 is FULL (https://sqlite.org/pragma.html#pragma_synchronous). A file in WAL falls back to 1 by itself.
  expect(first).toEqual(['wal', 2]);
  expect([await pragma('journal_mode'), await pragma('synchronous')]).toEqual(['wal', 2]);
  expect(await pragma('foreign_keys')).toBe(1);
  expect(await pragma('busy_timeout')).toBe(5000);
});

test('a row that names what is not there is refused', async () => {
  await migrate(db);

  const home = { id: 'h', customer_id: 'nobody', address: '', town: '', access_notes: '' };
  await expect(db('homes').insert(home)).rejects.toThrow(/FOREIGN KEY/);
});

test('a second person with the same address is a unique violation', async () => {
  await migrate(db);
  const user = {
    name: '',
    email: 'a@b.example',
    role: 'owner',
    password_hash: '',
    created_at_ms: 1,
  };
  await db('users').insert({ ...user, id: 'one' });

  const error: unknown = await db('users')
    .insert({ ...user, id: 'two' })
    .catch((reason: unknown) => reason);

  expect(isUniqueViolation(error)).toBe(true);
  expect(isUniqueViolation(new Error('something else'))).toBe(false);
});

test('each migration undoes exactly what it did, and can be done again', async () => {
  const migrations = await migrationSource.getMigrations([]);
  expect(migrations.length).toBeGreaterThan(3);

  for (const migration of migrations) {
    const before = await schemaOf();
    await migration.up(db);
    const after = await schemaOf();
    await migration.down(db);
    expect([migration.name, await schemaOf()]).toEqual([migration.name, before]);
    await migration.up(db);
    expect([migration.name, await schemaOf()]).toEqual([migration.name, after]);
    expect(after.size).toBeGreaterThan(before.size);
  }
});

test('all migrations can be rolled back to an empty database', async () => {
  await migrate(db);
  await db.migrate.rollback(undefined, true);

  const left = [...(await schemaOf()).keys()].filter((name) => !/migrations/.test(name));
  expect(left).toEqual([]);
});

test('a database written by a newer program is refused in words and left as it is', async () => {
  await migrate(db);
  const names = await db('migrations').pluck('name');
  await db('migrations').insert({ name: '999-ledger', batch: 9 });
  const before = await schemaOf();

  await expect(migrate(db)).rejects.toThrow(/newer Fusekeeper \(it has 999-ledger\)/);

  expect(await db('migrations').pluck('name')).toEqual([...names, '999-ledger']);
  expect(await schemaOf()).toEqual(before);
});

test('a start that was killed while migrating does not bar the next one', async () => {
  await migrate(db);
  await db('migrations_lock').update({ is_locked: 1 });

  await expect(migrate(db)).resolves.toBeUndefined();
});
