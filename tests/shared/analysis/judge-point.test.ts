import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  bandOf,
  bandProbability,
  callPoint,
  probabilityAbove,
  totalUncertainty,
  type PointToJudge,
} from '#shared/analysis/judge-point.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { toCelsius, toKelvinStep } from '#shared/units.ts';

/** A cut-out or reset in °F, judged by the defaults: 155 ± 5 (10 above allowed), 130 ± 5 (10 below allowed). */
function point(kind: PointToJudge['kind'], tempF: number, uF: number): PointToJudge {
  return {
    kind,
    tempC: toCelsius(tempF, 'F'),
    uTotalK: toKelvinStep(uF, 'F'),
    switchTempC: null,
    switchUTotalK: null,
  };
}

/** JCGM 100:2008, H.3.3: the thermometer of table H.6. */
const THERMOMETER = {
  aboutC: 20,
  interceptK: -0.1712,
  slope: 0.00218,
  interceptErrorK: 0.002878,
  slopeError: 0.000668,
  correlation: -0.93,
};

describe('totalUncertainty', () => {
  test('takes an accuracy of ±a as rectangular: a/√3', () => {
    // JCGM 100:2008, 4.3.7: half-width a gives u = a/√3; twice that, expanded.
    const probe = { accuracyK: 1, calibrationUK: 0, correction: null, responseS: null };

    expect(totalUncertainty(0, probe, 70)).toBeCloseTo(2 / Math.sqrt(3), 12);
  });

  test('adds the parts by their squares', () => {
    // JCGM 100:2008, 5.1.2. Standard parts 0.3, 0.4 and 1.2: root 1.3, expanded 2.6.
    const accuracyK = 0.4 * Math.sqrt(3);
    const probe = { accuracyK, calibrationUK: 2.4, correction: null, responseS: null };

    expect(totalUncertainty(0.6, probe, 70)).toBeCloseTo(2.6, 12);
  });

  test('adds what the correction does not know at that temperature', () => {
    // JCGM 100:2008, H.3.4: u(b(30 °C)) = 0.0041 °C; alone, expanded, 0.0083.
    const probe = { accuracyK: 0, calibrationUK: 0, correction: THERMOMETER, responseS: null };

    expect(totalUncertainty(0, probe, 30)).toBeCloseTo(2 * 0.0041, 3);
    expect(totalUncertainty(0, probe, 20)).toBeCloseTo(2 * 0.00288, 4);
  });
});

describe('callPoint', () => {
  test.each([
    // Common practice: cut-out at about 155 °F; 165 can still be overshoot; by 170 it should have cut out.
    ['cut-out', 155, 2, 'inside'],
    ['cut-out', 158.5, 2, 'too-close'],
    ['cut-out', 163, 2, 'within-allowance'],
    ['cut-out', 165, 2, 'within-allowance'],
    ['cut-out', 169, 2, 'too-close'],
    ['cut-out', 173, 2, 'outside'],
    ['cut-out', 190, 2, 'outside'],
    ['cut-out', 149, 2, 'too-close'],
    ['cut-out', 147, 2, 'outside'],
    // Back at about 130 °F; colder is allowed for, warmer is not.
    ['reset', 130, 2, 'inside'],
    ['reset', 136, 2, 'too-close'],
    ['reset', 138, 2, 'outside'],
    ['reset', 120, 2, 'within-allowance'],
    ['reset', 114, 2, 'too-close'],
    ['reset', 112, 2, 'outside'],
  ] as const)('%s at %d ± %d °F is %s', (kind, tempF, uF, call) => {
    expect(callPoint(point(kind, tempF, uF), DEFAULT_RATING)).toBe(call);
  });

  test('a switch instant inside the band settles a peak within the allowance', () => {
    const peak = point('cut-out', 163, 2);
    const settled = {
      ...peak,
      switchTempC: toCelsius(156, 'F'),
      switchUTotalK: toKelvinStep(2, 'F'),
    };

    expect(callPoint(settled, DEFAULT_RATING)).toBe('inside');
  });

  test('a switch instant known no better than half the tolerance settles nothing', () => {
    const peak = point('cut-out', 163, 2);
    const vague = {
      ...peak,
      switchTempC: toCelsius(155, 'F'),
      switchUTotalK: toKelvinStep(2.6, 'F'),
    };

    expect(callPoint(vague, DEFAULT_RATING)).toBe('within-allowance');
  });

  test('a switch instant cannot save a peak beyond the allowance', () => {
    const peak = point('cut-out', 175, 2);
    const late = { ...peak, switchTempC: toCelsius(155, 'F'), switchUTotalK: toKelvinStep(1, 'F') };

    expect(callPoint(late, DEFAULT_RATING)).toBe('outside');
  });

  test('a guarded call errs at most 2.3 times in 100 at the limit it guards', () => {
    // JCGM 106:2012, 8.3.2: with w = U = 2u the risk at the acceptance limit is 1 − Φ(2) = 0.02275.
    const atGuard = point('cut-out', 157.999, 2);
    const upperEndC = bandOf('cut-out', DEFAULT_RATING).highC;

    expect(callPoint(atGuard, DEFAULT_RATING)).toBe('inside');
    expect(probabilityAbove(atGuard.tempC, atGuard.uTotalK, upperEndC)).toBeCloseTo(0.02275, 3);
  });

  test('never calls a point inside and outside by turns as its uncertainty grows', () => {
    const temps = fc.double({ min: 90, max: 220, noNaN: true });
    const uncertainties = fc.double({ min: 0, max: 30, noNaN: true });
    const kinds = fc.constantFrom('cut-out' as const, 'reset' as const);
    fc.assert(
      fc.property(kinds, temps, uncertainties, uncertainties, (kind, tempF, aF, bF) => {
        const sharp = callPoint(point(kind, tempF, Math.min(aF, bF)), DEFAULT_RATING);
        const vague = callPoint(point(kind, tempF, Math.max(aF, bF)), DEFAULT_RATING);
        if (vague !== 'too-close') expect(vague).toBe(sharp);
      }),
    );
  });
});

describe('bandProbability', () => {
  test('is that of lying in the band, the allowance left out', () => {
    // Half of a normal distribution centred on the band's edge lies in a wide band.
    const { uTotalK, tempC } = point('cut-out', 160, 1);

    expect(bandProbability({ kind: 'cut-out', tempC, uTotalK }, DEFAULT_RATING)).toBeCloseTo(
      0.5,
      9,
    );
  });
});
