import { describe, expect, test } from 'vitest';
import {
  LN_LAG,
  LN_QUICK,
  LN_SLOW_OVER_QUICK,
  LOGIT_SECOND,
  LOGIT_THIRD,
  modesOf,
  parameterCount,
  placeOfLevel,
  placeOfStart,
  placeOfSwitch,
  plantSlopes,
  plantTemps,
  SHARE_QUICK,
  SHARE_SLOW,
  solvePlant,
  type PlantShape,
} from '#shared/analysis/turns/switched-plant.ts';

const SHAPE: PlantShape = { switches: 3, startS: 0, endS: 400 };

function parametersFor(startsK: number[]): Float64Array {
  const parameters = new Float64Array(parameterCount(SHAPE));
  parameters[LN_QUICK] = Math.log(90);
  parameters[LN_SLOW_OVER_QUICK] = Math.log(5);
  parameters[LN_LAG] = Math.log(11);
  parameters[LOGIT_SECOND] = 0.2;
  parameters[LOGIT_THIRD] = -0.4;
  parameters[SHARE_QUICK] = 0.6;
  parameters[SHARE_SLOW] = 0.25;
  [100, 170, 290].forEach((timeS, k) => (parameters[placeOfSwitch(k)] = timeS));
  [95, 20, 97, 22].forEach((level, leg) => (parameters[placeOfLevel(SHAPE, leg)] = level));
  startsK.forEach((startK, mode) => (parameters[placeOfStart(SHAPE, mode)] = startK));
  return parameters;
}

/** The same plant as a chain, by Euler steps: two stores and a straight share side by side, then three lags in a row. */
function simulate(parameters: Float64Array, timesS: number[]): number[] {
  const stepS = 0.002;
  const { tausS } = modesOf(parameters);
  const [quickS, slowS, ...lagsS] = tausS;
  const levels = [95, 20, 97, 22];
  let quickC = 20;
  let slowC = 20;
  const laggedC = [20, 20, 20];
  const found: number[] = [];
  for (let i = 0; found.length < timesS.length; i++) {
    const timeS = i * stepS;
    if (timeS >= timesS[found.length]!) found.push(laggedC[2]!);
    const level = levels[[100, 170, 290].filter((switchS) => timeS >= switchS).length]!;
    let into = 0.6 * quickC + 0.25 * slowC + 0.15 * level;
    quickC += ((level - quickC) / quickS!) * stepS;
    slowC += ((level - slowC) / slowS!) * stepS;
    lagsS.forEach((lagS, k) => {
      const wasC = laggedC[k]!;
      laggedC[k]! += ((into - wasC) / lagS) * stepS;
      into = wasC;
    });
  }
  return found;
}

describe('a switched plant', () => {
  test('is the chain of stores and lags that it stands for, solved in closed form', () => {
    const timesS = [1, 30, 99, 104, 120, 180, 250, 300, 399];
    const atRest = parametersFor(Array.from({ length: 5 }, () => 20 - 95));

    const tempsC = new Float64Array(timesS.length);
    plantTemps(solvePlant(atRest, SHAPE), Float64Array.from(timesS), tempsC);

    const simulatedC = simulate(atRest, timesS);
    tempsC.forEach((tempC, i) => expect(Math.abs(tempC - simulatedC[i]!)).toBeLessThan(0.01));
  });

  test('answers a level that never changes with that level: its parts sum to 1', () => {
    const { parts } = modesOf(parametersFor([]));

    expect(parts.reduce((sum, part) => sum + part, 0)).toBeCloseTo(1, 10);
  });

  test('knows its slope by every parameter', () => {
    const parameters = parametersFor([-70, -60, 4, 3, 1]);
    const timesS = Float64Array.from({ length: 80 }, (_, i) => 5 * i + 0.3);
    const p = parameters.length;

    const slopes = plantSlopes(parameters, SHAPE, timesS);

    const at = (j: number, stepped: number) => {
      const pushed = Float64Array.from(parameters);
      pushed[j]! += stepped;
      const tempsC = new Float64Array(timesS.length);
      plantTemps(solvePlant(pushed, SHAPE), timesS, tempsC);
      return tempsC;
    };
    for (let j = 0; j < p; j++) {
      const above = at(j, 1e-3);
      const below = at(j, -1e-3);
      timesS.forEach((_, i) => {
        const slope = (above[i]! - below[i]!) / 2e-3;
        expect(Math.abs(slopes[i * p + j]! - slope)).toBeLessThan(1e-3 * (1 + Math.abs(slope)));
      });
    }
  });
});
