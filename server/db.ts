import knex from 'knex';
import type { Knex } from 'knex';
import { migrationSource } from '#migrations/index.ts';

/** What better-sqlite3 hands to `afterCreate`. */
type SqliteConnection = { pragma(statement: string): unknown };
type Done = (error: Error | null, connection: SqliteConnection) => void;

/** The only opener of the database: `file` is a path, or `:memory:`. */
export function openDatabase(file: string): Knex {
  return knex({
    client: 'better-sqlite3',
    connection: { filename: file },
    useNullAsDefault: true,
    pool: {
      min: 1,
      max: 1,
      afterCreate(connection: SqliteConnection, done: Done) {
        connection.pragma('journal_mode = WAL');
        // After WAL, since WAL brings its own level (NORMAL), which can lose an acknowledged write in a power cut.
        connection.pragma('synchronous = FULL');
        connection.pragma('foreign_keys = ON');
        connection.pragma('busy_timeout = 5000');
        done(null, connection);
      },
    },
    migrations: { migrationSource, tableName: 'migrations' },
  });
}

/**
 * Brings the tables up to this program.
 * @throws {Error} the database was written by a newer Fusekeeper; it is left untouched
 */
export async function migrate(db: Knex): Promise<void> {
  await refuseNewer(db);
  // A start that was killed while migrating leaves the lock behind; one process owns a data folder.
  if (await db.schema.hasTable('migrations_lock')) await db.migrate.forceFreeMigrationsLock();
  await db.migrate.latest();
}

async function refuseNewer(db: Knex): Promise<void> {
  if (!(await db.schema.hasTable('migrations'))) return;
  const known = new Set((await migrationSource.getMigrations([])).map(({ name }) => name));
  const applied = await db<{ name: string }>('migrations').select('name');
  const strange = applied.map(({ name }) => name).filter((name) => !known.has(name));
  if (strange.length === 0) return;
  throw new Error(
    `This database was written by a newer Fusekeeper (it has ${strange.join(', ')}). ` +
      'Start that version, or restore a backup made by this one. Nothing was changed.',
  );
}

/** A unique column was given a value twice (SQLite, PostgreSQL). */
export function isUniqueViolation(error: unknown): boolean {
  if (!(error instanceof Error) || !('code' in error)) return false;
  return error.code === 'SQLITE_CONSTRAINT_UNIQUE' || error.code === '23505';
}
