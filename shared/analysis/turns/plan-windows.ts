import { median } from '../statistics/quantile.ts';

/** A stretch that is fitted at once: some consecutive turns with a leg at either side. */
export type FitWindow = {
  /** First turn fitted and the one past the last. */
  from: number;
  to: number;
  /** First turn read off this fit and the one past the last: a turn at the window's edge is there as a neighbour. */
  readFrom: number;
  readTo: number;
  startS: number;
  endS: number;
};

/** A leg this much longer than the usual one of its kind is no longer one first-order response. */
const LONG_LEG = 2.5;
/** How much of a long leg is used beside a turn, in usual legs. */
const USED_OF_LONG = 1.2;
/**
 * Left out at the record's own ends, as a share of the leg: the start is rounded by the lags, and the last extreme
 * may be the start of a turn that the record does not show whole.
 */
export const LEFT_OUT = 0.12;
/** Left out where the leg goes on to a turn that is not in the window: its rounded corner. */
const CORNER = 0.4;

/**
 * Cuts a record's turns into windows: at most so many at once, and never across a leg much longer than usual. Where a
 * window ends between like legs it takes in one turn more as a neighbour.
 *
 * @param edgesS times of the turns with the record's first and last extreme around them, s
 * @param mostTurns how many at once: more cost much and say little more about any one of them
 * @returns windows in order; every turn (1 to edges − 2) is read off exactly one
 */
export function planWindows(edgesS: ArrayLike<number>, mostTurns: number): FitWindow[] {
  const turns = edgesS.length - 2;
  const usualS = [usualLeg(edgesS, 0), usualLeg(edgesS, 1)] as const;
  const isJoined = (leg: number) => leg > 0 && leg < turns && !isLong(edgesS, leg, usualS);
  const windows: FitWindow[] = [];
  let readFrom = 1;
  while (readFrom <= turns) {
    let readTo = readFrom + 1;
    while (readTo <= turns && readTo - readFrom < mostTurns && isJoined(readTo - 1)) readTo++;
    const from = isJoined(readFrom - 1) ? readFrom - 1 : readFrom;
    const to = isJoined(readTo - 1) ? readTo + 1 : readTo;
    windows.push({ from, to, readFrom, readTo, ...reach(edgesS, from, to, usualS) });
    readFrom = readTo;
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
  const isOwnEnd = isFirst || leg === edgesS.length - 2;
  const whole = lengthS * (1 - (isOwnEnd ? LEFT_OUT : CORNER));
  const ownS = usualS[(leg % 2) as 0 | 1];
  const otherS = usualS[(1 - (leg % 2)) as 0 | 1];
  const usual = Number.isNaN(ownS) ? otherS : ownS;
  if (!Number.isNaN(usual)) return Math.min(whole, USED_OF_LONG * usual);
  // A lone turn: as much of the longer side as the shorter one calls for.
  const neighbour = isFirst ? leg + 1 : leg - 1;
  const neighbourS = edgesS[neighbour + 1]! - edgesS[neighbour]!;
  return Math.min(whole, 2 * neighbourS);
}
