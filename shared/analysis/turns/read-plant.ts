import { gradientError } from '../statistics/solve-normal.ts';
import { studentTQuantile } from '../statistics/student-t.ts';
import type { FittedPlant } from './fit-plant.ts';
import type { LocatedTurn } from './locate-turns.ts';
import { widening } from './misfit.ts';
import {
  placeOfSwitch,
  plantAt,
  plantSlopes,
  solvePlant,
  type SolvedPlant,
} from './switched-plant.ts';

/** A switch instant less certain than this share of the leg after it is not shown by the record. */
const MOST_SWITCH_U = 0.35;
/**
 * A further lag too short to be told from the third, or the air's own way to the probe, would move every switch to an
 * earlier time: taken as anything up to the third lag, rectangular, k = 2 (JCGM 100, 4.3.7).
 */
const HIDDEN_LAG = 2 / Math.sqrt(12);
const LAGS_TO_TURN = 10;
/** No machine is quite so linear, nor its lags just three: errors are widened by this (empirical, seeds 401 to 403). */
const UNSEEN_SHAPE = 1.05;

/**
 * Reads turns off a fitted plant: temperature and time of the noise-free extreme, and the switch before it, each with
 * the uncertainty that the parameters' covariance gives it, widened by what the residuals show of misfit.
 *
 * @returns for turn k of the window and its kind; null where anything is not finite
 */
export function plantReader(fit: FittedPlant, timesS: Float64Array) {
  const { shape, parameters, factor, degrees } = fit;
  const solved = solvePlant(parameters, shape);
  const lagsS = solved.tausS[2]! + solved.tausS[3]! + solved.tausS[4]!;
  const coverage = studentTQuantile(0.97725, Math.max(1.5, degrees));
  const factorK = UNSEEN_SHAPE * coverage * widening(fit, timesS);
  const p = parameters.length;
  return (k: number, kind: 'peak' | 'valley'): LocatedTurn | null => {
    const switchS = parameters[placeOfSwitch(k)]!;
    const nextS = k + 1 < shape.switches ? parameters[placeOfSwitch(k + 1)]! : shape.endS;
    const untilS = Math.min(nextS, switchS + LAGS_TO_TURN * lagsS);
    const timeS = extremeBetween(solved, k + 1, switchS, untilS, kind === 'peak' ? 1 : -1);
    const tempC = plantAt(solved, k + 1, timeS);
    const rows = plantSlopes(parameters, shape, Float64Array.of(switchS, timeS));
    const uK = factorK * gradientError(factor, rows.subarray(p), p);
    const unit = new Float64Array(p);
    unit[placeOfSwitch(k)] = 1;
    const fittedUS = factorK * gradientError(factor, unit, p);
    if (!Number.isFinite(tempC + uK + timeS + fittedUS)) return null;
    if (fittedUS > MOST_SWITCH_U * (nextS - switchS)) return { timeS, tempC, uK, switched: null };
    const switchC = plantAt(solved, k, switchS);
    const slopeKPerS = slopeAt(solved, k, switchS);
    const hiddenS = HIDDEN_LAG * solved.tausS[4]!;
    const moving = rows.slice(0, p);
    moving[placeOfSwitch(k)] = slopeKPerS;
    const fittedUK = factorK * gradientError(factor, moving, p);
    const switched = {
      timeS: switchS,
      tempC: switchC,
      uS: Math.hypot(fittedUS, hiddenS),
      uK: Math.hypot(fittedUK, slopeKPerS * hiddenS),
    };
    return { timeS, tempC, uK, switched };
  };
}

function slopeAt(solved: SolvedPlant, leg: number, timeS: number): number {
  const stepS = 1e-3 * solved.tausS[2]!;
  return (plantAt(solved, leg, timeS) - plantAt(solved, leg, timeS - stepS)) / stepS;
}

const PLACES = 60;
const GOLDEN = 0.381966;

/** Time of a leg's greatest (sign 1) or least (sign −1) temperature between two times, s. */
function extremeBetween(
  solved: SolvedPlant,
  leg: number,
  fromS: number,
  toS: number,
  sign: 1 | -1,
): number {
  const stepS = (toS - fromS) / PLACES;
  let best = 0;
  let bestC = -Infinity;
  for (let i = 0; i <= PLACES; i++) {
    const tempC = sign * plantAt(solved, leg, fromS + i * stepS);
    if (tempC > bestC) {
      bestC = tempC;
      best = i;
    }
  }
  let lowS = fromS + Math.max(0, best - 1) * stepS;
  let highS = fromS + Math.min(PLACES, best + 1) * stepS;
  for (let i = 0; i < 40; i++) {
    const aS = lowS + GOLDEN * (highS - lowS);
    const bS = highS - GOLDEN * (highS - lowS);
    if (sign * plantAt(solved, leg, aS) < sign * plantAt(solved, leg, bS)) lowS = aS;
    else highS = bS;
  }
  return (lowS + highS) / 2;
}
