import { expect, test } from 'vitest';
import {
  legsAt,
  LN_LAG,
  LN_TAU_COOL,
  LN_TAU_FIRST,
  LN_TAU_HEAT,
  lagsOf,
  parameterCount,
  placeOfNode,
  placeOfRamp,
  placeOfSwitch,
  solveLegs,
  type LegShape,
} from '#shared/analysis/turns/lagged-legs.ts';

const SHAPE: LegShape = { switches: 2, heatsFirst: true, startS: 0, endS: 260 };

function exampleParameters(): Float64Array {
  const parameters = new Float64Array(parameterCount(SHAPE));
  parameters[LN_TAU_HEAT] = Math.log(70);
  parameters[LN_TAU_COOL] = Math.log(90);
  parameters[LN_TAU_FIRST] = Math.log(150);
  parameters[LN_LAG] = Math.log(12);
  parameters[placeOfSwitch(0)] = 101.3;
  parameters[placeOfSwitch(1)] = 160.7;
  [50, 68, 55, 70].forEach((tempC, k) => (parameters[placeOfNode(SHAPE, k)] = tempC));
  [2, -1.5, 3].forEach((rampK, leg) => (parameters[placeOfRamp(SHAPE, leg)] = rampK));
  return parameters;
}

/** The unlagged exhaust, straight from its definition. */
function unlagged(parameters: Float64Array, timeS: number): number {
  const leg =
    timeS < parameters[placeOfSwitch(0)]! ? 0 : timeS < parameters[placeOfSwitch(1)]! ? 1 : 2;
  const fromS = [0, 101.3, 160.7][leg]!;
  const lengthS = [101.3, 59.4, 99.3][leg]!;
  const tauS = [150, 90, 70][leg]!;
  const rampK = [2, -1.5, 3][leg]!;
  const fromC = [50, 68, 55][leg]!;
  const toC = [68, 55, 70][leg]!;
  const share = (1 - Math.exp(-(timeS - fromS) / tauS)) / (1 - Math.exp(-lengthS / tauS));
  return fromC + (toC - fromC - rampK) * share + (rampK * (timeS - fromS)) / lengthS;
}

test('the closed form of two lags agrees with stepping through them', () => {
  const parameters = exampleParameters();
  const { lagAS, lagBS } = lagsOf(parameters);
  const timesS = Float64Array.from({ length: 250 }, (_, i) => 5 + i);
  const closed = new Float64Array(timesS.length);

  legsAt(solveLegs(parameters, SHAPE), timesS, closed);

  // Euler's method at 1 ms, from where the first leg's own settled answer says the lags stand.
  const stepS = 0.001;
  const start = new Float64Array(1);
  legsAt(solveLegs(parameters, SHAPE), Float64Array.from([0]), start);
  let second = start[0]!;
  const slope = (unlagged(parameters, 0.5) - unlagged(parameters, 0)) / 0.5;
  let first = second + lagBS * slope;
  let at = 0;
  for (let step = 0; at < timesS.length; step++) {
    const timeS = step * stepS;
    if (timeS >= timesS[at]! - stepS / 2) {
      // The first lag's start is a guess to first order: forgotten after some lags.
      if (timeS > 80) expect(Math.abs(second - closed[at]!)).toBeLessThan(2e-3);
      at++;
    }
    const firstBefore = first;
    first += ((unlagged(parameters, timeS) - first) / lagAS) * stepS;
    second += ((firstBefore - second) / lagBS) * stepS;
  }
});

test('lags keep their sum and their order', () => {
  const parameters = exampleParameters();
  for (const logit of [-30, 0, 30]) {
    parameters[LN_LAG + 1] = logit;
    const { lagAS, lagBS } = lagsOf(parameters);
    expect(lagAS + lagBS).toBeCloseTo(12, 9);
    expect(lagBS).toBeLessThan(lagAS);
    expect(lagBS).toBeGreaterThan(0);
  }
});
