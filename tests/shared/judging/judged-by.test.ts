import { expect, test } from 'vitest';
import { judgedBy, probeOf } from '#shared/judging/judged-by.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';

const THERMOSTAT: StoredRating = {
  id: '6f1c3a52-6a0e-4f57-9d3e-0a6f0c6f8b11',
  kind: 'cycling-thermostat',
  name: 'HL-T155',
  unit: 'F',
  opens: 155,
  opensTol: 5,
  closes: 130,
  closesTol: 5,
  overshoot: 10,
  undershoot: 10,
};
const FUSE: StoredRating = {
  ...THERMOSTAT,
  kind: 'thermal-fuse',
  name: 'HL-F91',
  unit: 'C',
  opens: 91,
  closes: null,
  closesTol: null,
};

test('a rating in °F is judged in °C, its tolerances as differences', () => {
  const judged = judgedBy(THERMOSTAT, FUSE);

  // NIST SP 811 (2008), B.8: t/°C = (t/°F − 32)/1.8; a difference of 1 °F is 1/1.8 K.
  expect(judged).toMatchObject({ name: 'HL-T155', ratingId: THERMOSTAT.id, highLimitC: 91 });
  expect(judged?.opensC).toBeCloseTo(68.333_333_333, 9);
  expect(judged?.closesC).toBeCloseTo(54.444_444_444, 9);
  expect(judged?.opensTolK).toBeCloseTo(2.777_777_778, 9);
  expect(judged?.overshootK).toBeCloseTo(5.555_555_556, 9);
  expect(judged?.ceilingC).toBeCloseTo(91 - 3.333_333_333, 9);
});

test('without a named safety the exhaust must stay under 196 °F and be cut by 190 °F', () => {
  const judged = judgedBy(THERMOSTAT, null);

  // Common practice; 196 °F = 91.1 °C, 190 °F = 87.8 °C.
  expect(judged?.highLimitC).toBeCloseTo(91.111_111_111, 9);
  expect(judged?.ceilingC).toBeCloseTo(87.777_777_778, 9);
});

test('a part that never closes again judges no cycles', () => {
  expect(judgedBy(FUSE, null)).toBeNull();
});

test('a probe that nobody named claims nothing', () => {
  expect(probeOf(null)).toEqual({
    accuracyK: 0,
    calibrationUK: 0,
    correction: null,
    responseS: null,
  });
});
