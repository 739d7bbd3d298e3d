import type { NewCalibration, StoredCalibration } from '../schemas/calibrations.ts';
import { toCelsius, toKelvinStep } from '../units.ts';
import { calibrateProbe, type CalibrationRecord } from './calibrate-probe.ts';
import type { DatedCalibration } from './probe-in-use.ts';

/** A calibration as it was typed, in °C, K and hPa. */
export function calibrationRecord(calibration: NewCalibration): CalibrationRecord {
  const { kind, unit, points, pressureHPa, altitudeM, referenceU, resolution } = calibration;
  return {
    kind,
    points: points.map(({ reference, readings }) => ({
      referenceC: reference === null ? null : toCelsius(reference, unit),
      readingsC: readings.map((reading) => toCelsius(reading, unit)),
    })),
    pressureHPa,
    altitudeM,
    referenceUK: toKelvinStep(referenceU ?? 0, unit),
    resolutionK: toKelvinStep(resolution, unit),
  };
}

/** When the next calibration is due: so many months on, by the calendar. */
export function calibrationDueMs(madeAtMs: number, intervalMonths: number): number {
  const made = new Date(madeAtMs);
  return made.setUTCMonth(made.getUTCMonth() + intervalMonths);
}

/** A stored calibration worked out, with its dates. */
export function datedCalibration(stored: StoredCalibration): DatedCalibration {
  const { id, madeAtMs, intervalMonths, drift, unit } = stored;
  return {
    id,
    madeAtMs,
    dueAtMs: calibrationDueMs(madeAtMs, intervalMonths),
    driftK: toKelvinStep(drift, unit),
    result: calibrateProbe(calibrationRecord(stored)),
  };
}
