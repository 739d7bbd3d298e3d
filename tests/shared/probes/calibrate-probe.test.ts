import { describe, expect, test } from 'vitest';
import {
  calibrateProbe,
  calibrationCorrection,
  calibrationU,
  type CalibrationRecord,
} from '#shared/probes/calibrate-probe.ts';

const BATHS: CalibrationRecord = {
  kind: 'ice-and-boiling',
  points: [
    { referenceC: null, readingsC: [0.5] },
    { referenceC: null, readingsC: [100.5] },
  ],
  pressureHPa: 1013.25,
  altitudeM: null,
  referenceUK: 0,
  resolutionK: 0,
};
const BESIDE: CalibrationRecord = {
  ...BATHS,
  kind: 'reference',
  points: [
    { referenceC: 20, readingsC: [21] },
    { referenceC: 60, readingsC: [61] },
    { referenceC: 90, readingsC: [91] },
  ],
  pressureHPa: null,
};

describe('ice and boiling water', () => {
  test('are 0 °C, and the boiling point at the pressure of the place', () => {
    const { points } = calibrateProbe(BATHS);

    // IAPWS-IF97 gives 99.974 °C at 1013.25 hPa.
    expect(points[0]!.referenceC).toBe(0);
    expect(points[1]!.referenceC).toBeCloseTo(99.974, 3);
  });

  test('at an altitude boil sooner, and are known less well by the weather', () => {
    const high = calibrateProbe({ ...BATHS, pressureHPa: null, altitudeM: 1500 });
    const known = calibrateProbe({ ...BATHS, pressureHPa: 845.6, altitudeM: null });

    // ISO 2533: 845.6 hPa at 1500 m (from memory); water boils there near 95 °C (common practice).
    expect(high.points[1]!.referenceC).toBeCloseTo(known.points[1]!.referenceC, 2);
    expect(high.points[1]!.referenceC).toBeCloseTo(95, 0);
    expect(high.points[1]!.ownErrorK).toBeGreaterThan(3 * known.points[1]!.ownErrorK);
  });

  test('leave no degrees of freedom: what is stated of the baths is what is known', () => {
    const calibration = calibrateProbe({ ...BATHS, resolutionK: 0.1 });

    // By hand: ice ± 0.1 K and half a step of 0.1 K, both rectangular.
    expect(calibration.points[0]!.ownErrorK).toBeCloseTo(Math.hypot(0.1, 0.05) / Math.sqrt(3), 12);
    expect(calibration).toMatchObject({ degrees: Infinity, residualSdK: null });
    expect(calibrationU(calibration, 0, 0.5)).toBeCloseTo(2 * calibration.points[0]!.ownErrorK, 9);
  });

  test('drift adds by its square', () => {
    const calibration = calibrateProbe(BATHS);
    const without = calibrationU(calibration, 0, 70);

    expect(calibrationU(calibration, 0.5, 70)).toBeCloseTo(
      Math.hypot(without, (2 * 0.5) / Math.sqrt(3)),
      12,
    );
  });
});

describe('a reference thermometer', () => {
  test('that reads a kelvin less takes a kelvin off, with its own uncertainty in full', () => {
    const calibration = calibrateProbe({ ...BESIDE, referenceUK: 0.3 });

    expect(calibrationCorrection(calibration, 70)).toBeCloseTo(-1, 12);
    // No number of points averages out what they have in common.
    expect(calibrationU(calibration, 0, 70)).toBeCloseTo(0.3, 12);
  });

  test('read again and again shows how the probe repeats', () => {
    const points = BESIDE.points.map(({ referenceC, readingsC: [c] }) => ({
      referenceC,
      readingsC: [c! - 0.1, c!, c! + 0.1],
    }));
    const calibration = calibrateProbe({ ...BESIDE, points });

    // s = 0.1 K of each three, pooled over 6 degrees of freedom; t(0.975, 6) = 2.446912 (R sources).
    expect(calibration.points[0]!.ownErrorK).toBeCloseTo((0.1 * 2.446912) / 2 / Math.sqrt(3), 6);
  });

  test('with few points about a line is trusted less than twice the standard error says', () => {
    const points = [
      { referenceC: 20, readingsC: [20.1] },
      { referenceC: 50, readingsC: [49.8] },
      { referenceC: 80, readingsC: [80.1] },
    ];
    const calibration = calibrateProbe({ ...BESIDE, points });

    // One degree of freedom: by hand s = 0.2449 K, u of the mean s/√3, times t(0.975, 1) = 12.7062.
    expect(calibration.degrees).toBe(1);
    expect(calibrationU(calibration, 0, 50)).toBeCloseTo((0.244949 / Math.sqrt(3)) * 12.7062, 2);
  });
});

describe('a record that is no calibration', () => {
  test.each([
    ['a point that was not read', { points: [{ referenceC: 20, readingsC: [] }] }],
    ['one point', { points: [{ referenceC: 20, readingsC: [20] }] }],
    [
      'a point far off',
      {
        points: [
          { referenceC: 20, readingsC: [20] },
          { referenceC: 90, readingsC: [60] },
        ],
      },
    ],
    [
      'a reference that was not read',
      {
        points: [
          { referenceC: null, readingsC: [20] },
          { referenceC: 90, readingsC: [90] },
        ],
      },
    ],
    ['three baths', { kind: 'ice-and-boiling' as const }],
  ])('%s is refused', (_, changes) => {
    expect(() => calibrateProbe({ ...BESIDE, ...changes })).toThrow(RangeError);
  });
});
