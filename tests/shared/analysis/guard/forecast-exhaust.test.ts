import { describe, expect, test } from 'vitest';
import {
  foresee,
  spreadAfter,
  tempAfter,
  timeTo,
} from '#shared/analysis/guard/forecast-exhaust.ts';
import { guardReading, startGuard } from '#shared/analysis/guard/guard.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';

const SETUP = {
  rating: DEFAULT_RATING,
  probe: { accuracyK: 1, calibrationUK: 0, responseS: 3, correction: null },
};
const CEILING_C = DEFAULT_RATING.ceilingC;

/** Step response of first order (any text on control): reaches Tc at τ·ln((A − T0)/(A − Tc)). */
function crossingS(asymptoteC: number, startC: number, tauS: number, tempC: number): number {
  return tauS * Math.log((asymptoteC - startC) / (asymptoteC - tempC));
}

function rise(asymptoteC: number, startC: number, tauS: number) {
  return (timeS: number) => asymptoteC - (asymptoteC - startC) * Math.exp(-timeS / tauS);
}

describe('a course', () => {
  const course = {
    tempC: 75,
    slopeKPerS: 0.1,
    fadePerS: 0.005,
    fadeErrorPerS: 0,
    ptt: 0,
    pts: 0,
    pss: 0,
  };

  test('is a first-order response', () => {
    // T levels off at 75 + 0.1/0.005 = 95 °C with τ = 200 s.
    expect(tempAfter(course, 1e5)).toBeCloseTo(95, 6);
    expect(tempAfter(course, 200)).toBeCloseTo(95 - 20 * Math.exp(-1), 9);
  });

  test('reaches a temperature at τ·ln((A − T0)/(A − Tc))', () => {
    const time = timeTo(course, CEILING_C);

    expect(time?.likelyS).toBeCloseTo(crossingS(95, 75, 200, CEILING_C), 3);
    expect(time?.earliestS).toBe(time?.likelyS);
    expect(time?.latestS).toBe(time?.likelyS);
  });

  test('says of a level that it does not reach that it is not foreseen', () => {
    expect(timeTo(course, 95.1)).toBeNull();
  });

  test('without fade goes straight on', () => {
    expect(timeTo({ ...course, fadePerS: 0 }, 85)?.likelyS).toBeCloseTo(100, 3);
  });

  test('spreads by temperature, slope and fade', () => {
    // JCGM 100, 5.2.2: T + s·t with u(T) = 0.3, u(s) = 0.01 and r = 0 after 40 s: √(0.09 + 0.16).
    const straight = { ...course, fadePerS: 0, ptt: 0.09, pss: 0.0001 };

    expect(spreadAfter(straight, 40)).toBeCloseTo(0.5, 9);
    // ∂/∂k of s·(1 − e^(−kt))/k at k = 0 is −s·t²/2.
    expect(spreadAfter({ ...course, fadePerS: 0, fadeErrorPerS: 0.001 }, 40)).toBeCloseTo(0.08, 9);
  });

  test('spreads by fade as the course itself bends with it', () => {
    // Central difference of the course in its fade (JCGM 100, 5.1.3, note 2).
    const step = 1e-6;
    const up = tempAfter({ ...course, fadePerS: 0.005 + step }, 150);
    const down = tempAfter({ ...course, fadePerS: 0.005 - step }, 150);

    const spreadK = spreadAfter({ ...course, fadeErrorPerS: 0.001 }, 150);

    expect(spreadK).toBeCloseTo((Math.abs(up - down) / (2 * step)) * 0.001, 6);
  });

  test('of an exact curvature takes its fade from that, of an unknown one from legs of its age', () => {
    const exact = {
      tempC: 75,
      slopeKPerS: 0.1,
      curveKPerS2: -0.001,
      ptt: 0,
      pts: 0,
      ptc: 0,
      pss: 0,
      psc: 0,
      pcc: 0,
    };

    expect(foresee(exact, 300).fadePerS).toBeCloseTo(0.01, 9);
    expect(foresee({ ...exact, pcc: 1 }, 300).fadePerS).toBeCloseTo(0.0038, 4);
    expect(foresee({ ...exact, pcc: 1 }, 10).fadePerS).toBeGreaterThan(0.02);
  });
});

describe('the forecast of a first-order rise', () => {
  test.each([
    [120, 25, 150, 1],
    [105, 25, 200, 2],
    [115, 40, 120, 10],
  ])('to %i °C from %i with τ = %i s, every %i s, holds the true time', (a, t0, tau, everyS) => {
    const truth = rise(a, t0, tau);
    const trueS = crossingS(a, t0, tau, CEILING_C);
    let state = startGuard(SETUP);
    let held = 0;
    let said = 0;
    for (let timeS = 0; timeS < trueS; timeS += everyS) {
      state = guardReading(state, { timeS, tempC: truth(timeS) });
      const crossing = state.forecast?.ceiling;
      if (!crossing) continue;
      said++;
      if (crossing.earliestS <= trueS && trueS <= (crossing.latestS ?? Infinity)) held++;
    }

    expect(said).toBeGreaterThan(2);
    expect(held / said).toBeGreaterThan(0.9);
  });

  test('holds it in nine of ten looks where readings scatter', () => {
    let held = 0;
    let said = 0;
    for (let seed = 1; seed <= 40; seed++) {
      const random = createRandom(seed);
      const truth = rise(random.between(95, 130), 25, random.between(100, 260));
      let trueS = 0;
      while (truth(trueS) < CEILING_C) trueS += 0.5;
      let state = startGuard(SETUP);
      for (let timeS = 0; timeS < trueS - 15; timeS += 2) {
        state = guardReading(state, { timeS, tempC: truth(timeS) + 0.3 * random.gaussian() });
        const crossing = state.forecast?.ceiling;
        if (!crossing || timeS % 20 !== 0) continue;
        said++;
        if (crossing.earliestS <= trueS && trueS <= (crossing.latestS ?? Infinity)) held++;
      }
    }

    expect(said).toBeGreaterThan(100);
    expect(held / said).toBeGreaterThan(0.9);
  });
});
