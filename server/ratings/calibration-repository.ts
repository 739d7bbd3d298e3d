import type { Knex } from 'knex';
import { calibrationSchema, type StoredCalibration } from '#shared/schemas/calibrations.ts';

type CalibrationRow = {
  id: string;
  probe_id: string;
  recorded_at_ms: number | string;
  made_at_ms: number | string;
  kind: string;
  unit: string;
  points: string;
  pressure_hpa: number | null;
  altitude_m: number | null;
  reference_name: string;
  reference_u: number | null;
  resolution: number;
  drift: number;
  interval_months: number;
  notes: string;
};

const IN_ORDER = ['recorded_at_ms', 'id'];

export type CalibrationRepository = ReturnType<typeof createCalibrationRepository>;

/** Calibrations of probes, in the order that they were recorded in. None is ever changed. */
export function createCalibrationRepository(db: Knex) {
  const rows = () => db<CalibrationRow>('probe_calibrations');
  return {
    async list(): Promise<StoredCalibration[]> {
      return (await rows().orderBy(IN_ORDER)).map(toCalibration);
    },

    async listOf(probeId: string): Promise<StoredCalibration[]> {
      return (await rows().where({ probe_id: probeId }).orderBy(IN_ORDER)).map(toCalibration);
    },

    async insert(calibration: StoredCalibration): Promise<void> {
      await rows().insert(toRow(calibration));
    },
  };
}

function toCalibration(row: CalibrationRow): StoredCalibration {
  return calibrationSchema.parse({
    id: row.id,
    probeId: row.probe_id,
    recordedAtMs: Number(row.recorded_at_ms),
    madeAtMs: Number(row.made_at_ms),
    kind: row.kind,
    unit: row.unit,
    points: JSON.parse(row.points),
    pressureHPa: row.pressure_hpa,
    altitudeM: row.altitude_m,
    referenceName: row.reference_name,
    referenceU: row.reference_u,
    resolution: row.resolution,
    drift: row.drift,
    intervalMonths: row.interval_months,
    notes: row.notes,
  });
}

function toRow(calibration: StoredCalibration): CalibrationRow {
  const { id, kind, unit, resolution, drift, notes } = calibration;
  return {
    ...{ id, kind, unit, resolution, drift, notes },
    probe_id: calibration.probeId,
    recorded_at_ms: calibration.recordedAtMs,
    made_at_ms: calibration.madeAtMs,
    points: JSON.stringify(calibration.points),
    pressure_hpa: calibration.pressureHPa,
    altitude_m: calibration.altitudeM,
    reference_name: calibration.referenceName,
    reference_u: calibration.referenceU,
    interval_months: calibration.intervalMonths,
  };
}
