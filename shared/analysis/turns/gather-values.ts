import { firstAtOrAfter } from '../first-at-or-after.ts';
import type { BinnedView } from '../run-facts.ts';
import type { FitWindow } from './plan-windows.ts';

/** Readings of a window as they are fitted. */
export type WindowValues = {
  timesS: Float64Array;
  tempsC: Float64Array;
  /** Readings behind each value over the usual number. */
  weights: Float64Array;
  /** That number. */
  averaged: number;
};

/** Values a leg keeps: of what lies near its turns, and of the rest; more are averaged. */
const NEAR_VALUES = 50;
const FAR_VALUES = 16;
export const VALUES_PER_LEG = NEAR_VALUES + FAR_VALUES;
/** Near a turn is within this share of a usual leg: there an average would flatten the corner. */
const NEAR_SHARE = 0.12;

/**
 * The window's values, averaged where there are more than its legs need: far from turns first, where legs are straight.
 *
 * @param turnsS times of the window's turns, rising, s
 */
export function gatherValues(
  view: BinnedView,
  window: FitWindow,
  turnsS: ArrayLike<number>,
): WindowValues {
  const from = firstAtOrAfter(view.timesS, window.startS - 1e-9);
  const to = firstAtOrAfter(view.timesS, window.endS + 1e-9);
  const legs = turnsS.length + 1;
  const nearS = (NEAR_SHARE * (window.endS - window.startS)) / legs;
  const eachNear = Math.max(1, Math.ceil((2 * NEAR_SHARE * (to - from)) / (legs * NEAR_VALUES)));
  const rest = (1 - 2 * NEAR_SHARE) * (to - from);
  const isMany = to - from > legs * VALUES_PER_LEG;
  const eachFar = isMany ? Math.max(eachNear, Math.ceil(rest / (legs * FAR_VALUES))) : eachNear;
  const timesS: number[] = [];
  const tempsC: number[] = [];
  const weights: number[] = [];
  let next = 0;
  for (let i = from; i < to;) {
    const firstS = view.timesS[i]!;
    while (next < turnsS.length && firstS > turnsS[next]! + nearS) next++;
    const untilNearS = (turnsS[next] ?? Infinity) - nearS;
    const each = firstS >= untilNearS ? eachNear : eachFar;
    const lastS = Math.min(
      firstS + (each + 1) * view.widthS,
      firstS >= untilNearS ? Infinity : untilNearS,
    );
    let sumS = 0;
    let sumC = 0;
    let count = 0;
    for (; i < to && count < each && (count === 0 || view.timesS[i]! < lastS); i++) {
      sumS += view.timesS[i]!;
      sumC += view.tempsC[i]!;
      count++;
    }
    timesS.push(sumS / count);
    tempsC.push(sumC / count);
    weights.push(count / eachNear);
  }
  return {
    timesS: Float64Array.from(timesS),
    tempsC: Float64Array.from(tempsC),
    weights: Float64Array.from(weights),
    averaged: eachNear,
  };
}
