import type { Probe } from '../analysis/rating.ts';
import { datedCalibration } from '../probes/calibration-record.ts';
import { probeInUse } from '../probes/probe-in-use.ts';
import type { StoredCalibration } from '../schemas/calibrations.ts';
import type { StoredProbe } from '../schemas/ratings.ts';
import type { JudgedWith } from '../schemas/runs.ts';
import { probeOf } from './judged-by.ts';

/**
 * What a run of that moment is judged with: the probe, corrected by the calibration that was in force then.
 *
 * @param calibrations all of this probe, in the order that they were recorded in: of one day the last counts
 * @param atMs when the run was made
 */
export function judgedWith(
  probe: StoredProbe | null,
  calibrations: StoredCalibration[],
  atMs: number,
): JudgedWith | null {
  if (!probe) return null;
  const dated = calibrations.map(datedCalibration);
  const inUse = probeInUse(probeOf(probe), dated, atMs);
  return {
    probeId: probe.id,
    name: probe.name,
    ...inUse.probe,
    calibration: inUse.calibration && named(inUse.calibration, calibrations, dated),
  };
}

function named(
  { id, standing }: Pick<NonNullable<JudgedWith['calibration']>, 'id' | 'standing'>,
  calibrations: StoredCalibration[],
  dated: { id: string; dueAtMs: number }[],
): JudgedWith['calibration'] {
  const stored = calibrations.find((each) => each.id === id);
  const dueAtMs = dated.find((each) => each.id === id)?.dueAtMs;
  if (!stored || dueAtMs === undefined) throw new RangeError(`no calibration ${id}`);
  return { id, kind: stored.kind, madeAtMs: stored.madeAtMs, dueAtMs, standing };
}

/** The same as the engine takes it; without a probe nothing is claimed. */
export function probeToJudgeWith(used: JudgedWith | null): Probe {
  if (!used) return probeOf(null);
  const { accuracyK, calibrationUK, correction, responseS } = used;
  return { accuracyK, calibrationUK, correction, responseS };
}
