import { describe, expect, test } from 'vitest';
import { correct, predict, startFilter } from '#shared/analysis/guard/exhaust-filter.ts';

describe('the exhaust filter', () => {
  test('follows a steady climb at any spacing', () => {
    const filter = startFilter(40, 0.01);
    let timeS = 0;
    for (const stepS of [1, 2, 5, 1, 10, 3, 8, 20, 1, 4]) {
      timeS += stepS;
      predict(filter, stepS);
      correct(filter, 40 + 0.2 * timeS, 0.01);
    }

    expect(filter.tempC).toBeCloseTo(40 + 0.2 * timeS, 1);
    expect(filter.slopeKPerS).toBeCloseTo(0.2, 2);
  });

  test('weighs two readings of one instant as their mean', () => {
    // No time between them: the estimate of two equal-variance readings is their mean, with half the variance.
    const filter = startFilter(60, 0.04);

    correct(filter, 61, 0.04);

    expect(filter.tempC).toBeCloseTo(60.5, 12);
    expect(filter.ptt).toBeCloseTo(0.02, 12);
  });

  test('knows less the longer it is carried on without a reading', () => {
    const short = startFilter(60, 0.01);
    const long = startFilter(60, 0.01);

    predict(short, 2);
    predict(long, 20);

    // Variance of T + s·t + c·t²/2 with u(s) = 0.5, u(c) = 0.02: 0.01 + 1 + 0.0016, drifts aside.
    expect(short.ptt).toBeCloseTo(1.0116, 3);
    expect(long.ptt).toBeGreaterThan(0.01 + 100 + 16);
  });

  test('carried on twice is carried on once', () => {
    const once = startFilter(60, 0.01);
    const twice = startFilter(60, 0.01);

    predict(once, 7);
    predict(twice, 3);
    predict(twice, 4);

    for (const key of ['ptt', 'pts', 'ptc', 'pss', 'psc', 'pcc'] as const) {
      expect(twice[key] / once[key]).toBeCloseTo(1, 9);
    }
  });

  test('stays a covariance through a hundred thousand readings', () => {
    const filter = startFilter(60, 0.01);
    for (let i = 0; i < 100_000; i++) {
      predict(filter, 0.2);
      correct(filter, 60 + 8 * Math.sin(i / 200), 0.003);
    }

    const { ptt, pts, pss, pcc, psc } = filter;
    expect(Math.min(ptt, pss, pcc)).toBeGreaterThan(0);
    expect(ptt * pss - pts * pts).toBeGreaterThan(0);
    expect(pss * pcc - psc * psc).toBeGreaterThan(0);
  });
});
