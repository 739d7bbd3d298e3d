import { median } from '../statistics/quantile.ts';

/** A stretch that is fitted at once: some consecutive turns with a leg at either side. */
export type FitWindow = {
  /** First turn and the one past the last. */
  from: number;
  to: number;
  startS: number;
  endS: number;
};

/** More at once costs much and says little more about any one of them. */
const MOST_TURNS = 12;
/** A leg this much longer than the usual one of its kind is no longer one first-order response. */
const LONG_LEG = 2.5;
/** How much of a long leg is used beside a turn, in usual legs. */
const USED_OF_LONG = 1.2;
/** The record's own start is rounded by the lags; this share of a short first leg is left out. */
const LEFT_OUT_AT_START = 0.12;

/**
 * Cuts a record's turns into windows: at most twelve at once, and never across a leg much longer than usual.
 *
 * @param edgesS times of the turns with the record's first and last extreme around them, s
 * @returns windows in order; every turn (1 to edges − 2) is in exactly one
 */
export function planWindows(edgesS: ArrayLike<number>): FitWindow[] {
  const turns = edgesS.length - 2;
  const usualS = [usualLeg(edgesS, 0), usualLeg(edgesS, 1)] as const;
  const windows: FitWindow[] = [];
  let from = 1;
  while (from <= turns) {
    let to = from + 1;
    while (to <= turns && to - from < MOST_TURNS && !isLong(edgesS, to - 1, usualS)) to++;
    windows.push({ from, to, ...reach(edgesS, from, to, usualS) });
    from = to;
  }
  return windows;
}

type Usual = readonly [number, number];

/** Median length of the inner legs that start at an edge of this parity, s; NaN where there are none. */
function usualLeg(edgesS: ArrayLike<number>, parity: number): number {
  const lengths: number[] = [];
  for (let leg = 1; leg < edgesS.length - 2; leg++) {
    if (leg % 2 === parity) lengths.push(edgesS[leg + 1]! - edgesS[leg]!);
  }
  return lengths.length > 0 ? median(lengths) : NaN;
}

function isLong(edgesS: ArrayLike<number>, leg: number, usualS: Usual): boolean {
  return edgesS[leg + 1]! - edgesS[leg]! > LONG_LEG * usualS[(leg % 2) as 0 | 1];
}

function reach(edgesS: ArrayLike<number>, from: number, to: number, usualS: Usual) {
  const before = used(edgesS, from - 1, usualS);
  const after = used(edgesS, to - 1, usualS);
  return { startS: edgesS[from]! - before, endS: edgesS[to - 1]! + after };
}

/** How much of a window's outer leg is used, s. */
function used(edgesS: ArrayLike<number>, leg: number, usualS: Usual): number {
  const lengthS = edgesS[leg + 1]! - edgesS[leg]!;
  const isFirst = leg === 0;
  const whole = lengthS * (isFirst ? 1 - LEFT_OUT_AT_START : 1);
  const ownS = usualS[(leg % 2) as 0 | 1];
  const otherS = usualS[(1 - (leg % 2)) as 0 | 1];
  const usual = Number.isNaN(ownS) ? otherS : ownS;
  if (!Number.isNaN(usual)) return Math.min(whole, USED_OF_LONG * usual);
  // A lone turn: as much of the longer side as the shorter one calls for.
  const neighbour = isFirst ? leg + 1 : leg - 1;
  const neighbourS = edgesS[neighbour + 1]! - edgesS[neighbour]!;
  return Math.min(whole, 2 * neighbourS);
}
