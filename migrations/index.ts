import type { Knex } from 'knex';
import * as people from './001-people.ts';
import * as homes from './002-homes.ts';
import * as jobs from './003-jobs.ts';
import * as runs from './004-runs.ts';
import * as probeCalibrations from './005-probe-calibrations.ts';
import * as sendings from './006-sendings.ts';
import * as handRuns from './007-hand-runs.ts';

type Migration = { name: string; up(db: Knex): Promise<void>; down(db: Knex): Promise<void> };

const MIGRATIONS: Migration[] = [
  { name: '001-people', ...people },
  { name: '002-homes', ...homes },
  { name: '003-jobs', ...jobs },
  { name: '004-runs', ...runs },
  { name: '005-probe-calibrations', ...probeCalibrations },
  { name: '006-sendings', ...sendings },
  { name: '007-hand-runs', ...handRuns },
];

/** A fixed list, so that names and order are the same from source, in tests and in the built server. */
export const migrationSource: Knex.MigrationSource<Migration> = {
  getMigrations: () => Promise.resolve(MIGRATIONS),
  getMigrationName: (migration) => migration.name,
  getMigration: (migration) => Promise.resolve(migration),
};
