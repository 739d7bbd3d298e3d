import { correctionAt } from '../analysis/correct-series.ts';
import type { Probe } from '../analysis/rating.ts';
import { calibrationU, type ProbeCalibration } from './calibrate-probe.ts';
import { rectangular } from './combine-uncertainty.ts';

/** A calibration with its dates and what its owner says of drift. */
export type DatedCalibration = {
  id: string;
  madeAtMs: number;
  dueAtMs: number;
  /** ± drift from one calibration to when the next is due, K. */
  driftK: number;
  result: ProbeCalibration;
};

export const CALIBRATION_STANDINGS = ['current', 'overdue', 'too-old', 'no-better'] as const;
/**
 * current: within its interval. overdue: past it, used with a drift that goes on growing. too-old: past twice its
 * interval, set aside. no-better: it knows less than the stated accuracy and does not contradict it, set aside.
 */
export type CalibrationStanding = (typeof CALIBRATION_STANDINGS)[number];

export type ProbeInUse = {
  probe: Probe;
  /** The newest calibration made by then, used or set aside; null where there is none. */
  calibration: { id: string; standing: CalibrationStanding; driftK: number } | null;
};

/** Where the comparison with the stated accuracy is made: 155 °F, the middle of the usual opens band. */
export const JUDGED_ABOUT_C = (155 - 32) / 1.8;
/** A calibration is dated by its day: one of the same day counts as made before the run. */
const HALF_DAY_MS = 12 * 3600_000;
/** Past this many intervals a calibration is set aside. */
const TOO_OLD_INTERVALS = 2;

/**
 * How good a probe is at a moment. With a calibration in use the readings are corrected by it, and its uncertainty
 * with drift takes the place of the stated accuracy: a bound on the uncorrected error no longer applies once that error
 * was measured and taken out, and counting both would count one thing twice (JCGM 100:2008, 3.2.4, 4.3.10).
 *
 * Drift is taken to grow evenly with age, past the due date too; past twice the interval the calibration is set aside
 * and the stated accuracy counts in full again.
 *
 * @param stated the probe by its maker's word and certificate, without a correction
 */
export function probeInUse(
  stated: Probe,
  calibrations: readonly DatedCalibration[],
  atMs: number,
): ProbeInUse {
  const made = calibrations.filter(({ madeAtMs }) => madeAtMs <= atMs + HALF_DAY_MS);
  const newest = made.reduce<DatedCalibration | null>(
    (best, each) => (best === null || each.madeAtMs >= best.madeAtMs ? each : best),
    null,
  );
  if (!newest) return { probe: stated, calibration: null };
  const { id, result } = newest;
  const intervals = ageInIntervals(newest, atMs);
  const driftK = newest.driftK * intervals;
  const standing = standingOf(stated, result, intervals, driftK);
  const calibration = { id, standing, driftK };
  if (isSetAside(standing)) return { probe: stated, calibration };
  return {
    probe: {
      accuracyK: 0,
      calibrationUK: 2 * Math.hypot(result.commonUK / 2, rectangular(driftK)),
      correction: result.correction,
      responseS: stated.responseS,
    },
    calibration,
  };
}

export function isSetAside(standing: CalibrationStanding): boolean {
  return standing === 'too-old' || standing === 'no-better';
}

function ageInIntervals({ madeAtMs, dueAtMs }: DatedCalibration, atMs: number): number {
  const age = Math.max(0, atMs - madeAtMs);
  return age / Math.max(1, dueAtMs - madeAtMs);
}

function standingOf(
  { accuracyK }: Probe,
  result: ProbeCalibration,
  intervals: number,
  driftK: number,
): CalibrationStanding {
  if (intervals > TOO_OLD_INTERVALS) return 'too-old';
  const uK = calibrationU(result, driftK, JUDGED_ABOUT_C);
  const isWider = accuracyK > 0 && uK >= 2 * rectangular(accuracyK);
  const agrees = Math.abs(correctionAt(result.correction, JUDGED_ABOUT_C)) <= accuracyK + uK;
  if (isWider && agrees) return 'no-better';
  return intervals > 1 ? 'overdue' : 'current';
}
