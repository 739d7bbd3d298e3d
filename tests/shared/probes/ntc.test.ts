import { describe, expect, test } from 'vitest';
import {
  betaCurve,
  betaOfPoints,
  ntcOhm,
  ntcTemp,
  steinhartHartCurve,
  steinhartHartOfPoints,
} from '#shared/probes/ntc.ts';
import { generalNtcCurve, TEN_K_CURVE_3 } from '#shared/probes/ntc-curves.ts';
import { NTC_TABLE } from '#tests/fixtures/published/ntc-table.ts';

const ratioAt = new Map(NTC_TABLE);
const pointAt = (tempC: number) => ({ tempC, ohm: ratioAt.get(tempC)! });

describe('the beta equation', () => {
  test.each([
    // The same guide prints beta beside the table, K; its four digits leave ± 2.
    [0, 50, 3892],
    [0, 70, 3917],
    [25, 50, 3937],
    [25, 85, 3977],
    [25, 100, 3992],
    [25, 125, 4013],
  ])('beta from %d and %d °C is %d K', (fromC, toC, betaK) => {
    expect(Math.abs(betaOfPoints(pointAt(fromC), pointAt(toC)) - betaK)).toBeLessThanOrEqual(2);
  });

  test('is exact at 25 °C and at its second point, and off by 0.7 °C at 0 °C', () => {
    const curve = betaCurve(1, 3977);

    expect(ntcTemp(curve, 1)).toBeCloseTo(25, 9);
    expect(ntcTemp(curve, 0.107)).toBeCloseTo(85, 1);
    // exp(3977 (1/273.15 − 1/298.15)), by hand.
    expect(ntcOhm(curve, 0)).toBeCloseTo(3.39, 3);
    expect(ntcTemp(curve, 3.264)).toBeCloseTo(0.713, 3);
  });
});

describe('Steinhart and Hart', () => {
  test('three points give the published coefficients', () => {
    const { refOhm, coefficients } = steinhartHartOfPoints([
      { tempC: 5, ohm: 25_000 },
      { tempC: 25, ohm: 10_000 },
      { tempC: 45, ohm: 4_000 },
    ]);

    // Seen in public copies of the example; the three points are from memory, and give every printed digit.
    expect(refOhm).toBe(1);
    expect(coefficients[0]).toBeCloseTo(2.108508173e-3, 12);
    expect(coefficients[1]).toBeCloseTo(0.7979204727e-4, 13);
    expect(coefficients[2]).toBe(0);
    expect(coefficients[3]).toBeCloseTo(6.535076315e-7, 15);
  });

  test.each([
    // A 10 kΩ table of that curve (from memory).
    [32_650.8, 0],
    [19_899, 10],
    [12_492, 20],
    [10_000, 25],
    [8_057, 30],
    [3_603, 50],
  ])('the 10 kΩ curve reads %d ohm as %d °C', (ohm, tempC) => {
    expect(Math.abs(ntcTemp(TEN_K_CURVE_3, ohm) - tempC)).toBeLessThan(0.02);
  });
});

test('the general curve lies on its own table', () => {
  const curve = generalNtcCurve(1);
  for (const [tempC, ratio] of NTC_TABLE) {
    expect(Math.abs(ntcTemp(curve, ratio) - tempC)).toBeLessThan(0.016);
    expect(Math.abs(ntcOhm(curve, tempC) / ratio - 1)).toBeLessThan(1.1e-3);
  }
});

test.each([
  ['beta', betaCurve(10_000, 3977)],
  ['general', generalNtcCurve(10_000)],
  ['three points', TEN_K_CURVE_3],
])('a temperature comes back from its resistance: %s', (_, curve) => {
  for (let tempC = -40; tempC <= 150; tempC += 1.3) {
    expect(ntcTemp(curve, ntcOhm(curve, tempC))).toBeCloseTo(tempC, 8);
  }
});

describe('what is no NTC', () => {
  test.each([0, -5, Number.NaN, 1e12, 1e-6])('%d ohm is refused', (ohm) => {
    expect(() => ntcTemp(generalNtcCurve(10_000), ohm)).toThrow(RangeError);
  });

  test('a temperature beyond any curve is refused', () => {
    expect(() => ntcOhm(TEN_K_CURVE_3, 301)).toThrow(RangeError);
    expect(() => ntcOhm(TEN_K_CURVE_3, -61)).toThrow(RangeError);
  });

  test('a curve needs resistances that differ', () => {
    const same = { tempC: 25, ohm: 10_000 };

    expect(() => betaCurve(0, 3977)).toThrow(RangeError);
    expect(() => betaOfPoints(same, same)).toThrow(RangeError);
    expect(() => steinhartHartOfPoints([same, same, { tempC: 45, ohm: 4_000 }])).toThrow(
      RangeError,
    );
    expect(steinhartHartCurve(1e-3, 2e-4, 1e-7).refOhm).toBe(1);
  });
});
