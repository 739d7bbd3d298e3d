import type { Series } from '#shared/analysis/series.ts';
import { seededNormal } from './build-series.ts';

const QUICK = { gainK: 22, tauS: 18 };
const SLOW = { gainK: 60, tauS: 320 };
const LAG_S = 4;
const FIRST_S = 300;
const HALF_S = 170;
const TURNS = 9;

/**
 * Air and drum metal side by side: a quick and a slow first-order answer to the heat's being switched, summed and seen
 * through one lag, with readings each second. Every switch adds ± the closed step answer of two first-order stages,
 * `1 − (τ·e^(−s/τ) − lag·e^(−s/lag))/(τ − lag)`; a true turn is the extreme of that sum, to 0.01 s.
 */
export function buildTwoPacedRun(seed: number): { series: Series; turnsC: number[] } {
  const normal = seededNormal(seed);
  const count = FIRST_S + TURNS * HALF_S;
  const timesS = Float64Array.from({ length: count }, (_, i) => i);
  const tempsC = timesS.map((timeS) => exhaustAt(timeS) + 0.08 * normal());
  const turnsC = Array.from({ length: TURNS }, (_, k) => {
    const sign = k % 2 === 0 ? 1 : -1;
    let bestC = -Infinity;
    for (let sinceS = 0; sinceS < 20; sinceS += 0.01) {
      bestC = Math.max(bestC, sign * exhaustAt(FIRST_S + k * HALF_S + sinceS));
    }
    return sign * bestC;
  });
  return { series: { timesS, tempsC }, turnsC };
}

function exhaustAt(timeS: number): number {
  let tempC = 20 + answer(timeS);
  for (let k = 0; k < TURNS; k++) {
    tempC += (k % 2 === 0 ? -1 : 1) * answer(timeS - FIRST_S - k * HALF_S);
  }
  return tempC;
}

function answer(sinceS: number): number {
  if (sinceS <= 0) return 0;
  return [QUICK, SLOW].reduce((sum, { gainK, tauS }) => sum + gainK * stepAnswer(sinceS, tauS), 0);
}

function stepAnswer(sinceS: number, tauS: number): number {
  const slow = tauS * Math.exp(-sinceS / tauS);
  const quick = LAG_S * Math.exp(-sinceS / LAG_S);
  return 1 - (slow - quick) / (tauS - LAG_S);
}
