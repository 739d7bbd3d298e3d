import type { Knex } from 'knex';
import type { StoredProbe } from '#shared/schemas/ratings.ts';

type ProbeRow = Omit<
  StoredProbe,
  'accuracyClass' | 'responseS' | 'calibrationU' | 'calibratedAtMs'
> & {
  accuracy_class: StoredProbe['accuracyClass'];
  response_s: number | null;
  calibration_u: number | null;
  calibrated_at_ms: number | string | null;
};

export type ProbeRepository = ReturnType<typeof createProbeRepository>;

export function createProbeRepository(db: Knex) {
  return {
    async list(): Promise<StoredProbe[]> {
      return (await db<ProbeRow>('probes').orderBy('name')).map(toProbe);
    },

    async find(id: string): Promise<StoredProbe | undefined> {
      const row = await db<ProbeRow>('probes').where({ id }).first();
      return row && toProbe(row);
    },

    async insert(probe: StoredProbe): Promise<void> {
      await db('probes').insert(toRow(probe));
    },

    async update(probe: StoredProbe): Promise<void> {
      await db('probes').where({ id: probe.id }).update(toRow(probe));
    },
  };
}

function toProbe(stored: ProbeRow): StoredProbe {
  const { accuracy_class, response_s, calibration_u, calibrated_at_ms, ...row } = stored;
  return {
    ...row,
    accuracyClass: accuracy_class,
    responseS: response_s,
    calibrationU: calibration_u,
    calibratedAtMs: calibrated_at_ms === null ? null : Number(calibrated_at_ms),
  };
}

function toRow(stored: StoredProbe): ProbeRow {
  const { accuracyClass, responseS, calibrationU, calibratedAtMs, ...probe } = stored;
  return {
    ...probe,
    accuracy_class: accuracyClass,
    response_s: responseS,
    calibration_u: calibrationU,
    calibrated_at_ms: calibratedAtMs,
  };
}
