import { describe, expect, test } from 'vitest';
import { totalUncertainty } from '#shared/analysis/judge-point.ts';
import { calibrateProbe, calibrationU } from '#shared/probes/calibrate-probe.ts';
import { JUDGED_ABOUT_C, probeInUse } from '#shared/probes/probe-in-use.ts';
import { readingBudget } from '#shared/probes/reading-budget.ts';

const DAY_MS = 24 * 3600_000;
const STATED = { accuracyK: 2.2, calibrationUK: 0.3, correction: null, responseS: 3 };
const RESULT = calibrateProbe({
  kind: 'reference',
  points: [
    { referenceC: 20, readingsC: [21] },
    { referenceC: 90, readingsC: [91.5] },
  ],
  pressureHPa: null,
  altitudeM: null,
  referenceUK: 0.4,
  resolutionK: 0.1,
});
const YEARLY = { id: 'a', madeAtMs: 0, dueAtMs: 360 * DAY_MS, driftK: 0.6, result: RESULT };

describe('a probe in use', () => {
  test('stands by its maker’s word where it was never calibrated', () => {
    expect(probeInUse(STATED, [], 0)).toEqual({ probe: STATED, calibration: null });
  });

  test('is corrected, and the calibration takes the place of the stated accuracy', () => {
    const { probe, calibration } = probeInUse(STATED, [YEARLY], 180 * DAY_MS);

    expect(calibration).toMatchObject({ id: 'a', standing: 'current' });
    expect(probe).toMatchObject({ accuracyK: 0, correction: RESULT.correction, responseS: 3 });
    // Half an interval on, half of the drift: ± 0.3 K, rectangular; with the reference's 0.4 K (k = 2).
    expect(probe.calibrationUK).toBeCloseTo(Math.hypot(0.4, 0.6 / Math.sqrt(3)), 12);
    expect(totalUncertainty(0, probe, 70)).toBeCloseTo(calibrationU(RESULT, 0.3, 70), 12);
  });

  test('past its due date drifts on, and says so', () => {
    const { probe, calibration } = probeInUse(STATED, [YEARLY], 540 * DAY_MS);

    expect(calibration).toMatchObject({ standing: 'overdue' });
    expect(calibration!.driftK).toBeCloseTo(0.9, 12);
    expect(probe.correction).not.toBeNull();
  });

  test('past twice its interval stands by its maker’s word again', () => {
    const used = probeInUse(STATED, [YEARLY], 721 * DAY_MS);

    expect(used.calibration).toMatchObject({ standing: 'too-old' });
    expect(used.probe).toEqual(STATED);
  });

  test('goes by the newest calibration made by then', () => {
    const later = { ...YEARLY, id: 'b', madeAtMs: 100 * DAY_MS, dueAtMs: 460 * DAY_MS };

    expect(probeInUse(STATED, [later, YEARLY], 50 * DAY_MS).calibration?.id).toBe('a');
    expect(probeInUse(STATED, [later, YEARLY], 100 * DAY_MS - 3600_000).calibration?.id).toBe('b');
    expect(probeInUse(STATED, [later], 50 * DAY_MS).calibration).toBeNull();
  });

  test('keeps a stated accuracy that a poor calibration does not contradict', () => {
    const fine = { ...STATED, accuracyK: 0.2 };
    const poor = calibrateProbe({
      kind: 'reference',
      points: [
        { referenceC: 20, readingsC: [20.1] },
        { referenceC: 90, readingsC: [90.1] },
      ],
      pressureHPa: null,
      altitudeM: null,
      referenceUK: 2,
      resolutionK: 0.1,
    });

    expect(probeInUse(fine, [{ ...YEARLY, result: poor }], 0)).toMatchObject({
      probe: fine,
      calibration: { standing: 'no-better' },
    });
    // 1.4 K off where ± 0.2 is stated, known to 0.4: the statement does not hold.
    expect(probeInUse(fine, [YEARLY], 0).calibration?.standing).toBe('current');
  });
});

describe('the budget of a reading', () => {
  const still = { tempC: JUDGED_ABOUT_C, resolutionK: 0, rateKPerS: 0, repeatsC: [] };

  test('has accuracy, certificate, resolution and lag by their squares', () => {
    const probe = { ...STATED, calibrationUK: 0.6 };
    const budget = readingBudget({ ...still, probe, resolutionK: 0.5, rateKPerS: 0.2 });

    // By hand: 2.2/√3, 0.6/2, 0.25/√3, 0.2·3/√3.
    expect(budget.standard).toBeCloseTo(
      Math.hypot(2.2 / Math.sqrt(3), 0.3, 0.25 / Math.sqrt(3), 0.6 / Math.sqrt(3)),
      12,
    );
    expect(budget.parts.map(({ name }) => name)).toEqual([
      'accuracy',
      'calibration',
      'resolution',
      'lag',
    ]);
  });

  test('with few repeats has few degrees of freedom', () => {
    const probe = { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null };
    const budget = readingBudget({ ...still, probe, repeatsC: [69, 70, 71] });

    // s = 1, n = 3; t(0.975, 2) = 4.302653 (R sources).
    expect(budget.degrees).toBeCloseTo(2, 9);
    expect(budget.expanded).toBeCloseTo(4.302653 / Math.sqrt(3), 5);
  });

  test('of a calibrated probe is that of its correction there', () => {
    const { probe } = probeInUse(STATED, [YEARLY], 0);
    const budget = readingBudget({ ...still, probe });

    expect(2 * budget.standard).toBeCloseTo(calibrationU(RESULT, 0, JUDGED_ABOUT_C), 12);
  });
});
