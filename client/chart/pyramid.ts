import type { Span } from './strip.ts';

/**
 * Lowest and highest of every 4, 16, 64 … readings, so that what a window of the record reaches is found without
 * reading it all. Nothing is thinned: a peak of one reading stands in every level.
 */
export type Pyramid = {
  /** s, never falling. */
  timesS: Float64Array;
  tempsC: Float64Array;
  /** levels[k] holds the extremes of 4^(k+1) readings each. */
  levels: { lowC: Float64Array; highC: Float64Array }[];
  /** Sorted spans without readings. */
  gaps: Span[];
};

/** What each pixel column of a window reaches. A column without readings has first === past. */
export type Columns = {
  fromS: number;
  toS: number;
  /** Index of the first reading in the column, and one past its last. */
  first: Int32Array;
  past: Int32Array;
  lowC: Float64Array;
  highC: Float64Array;
};

const WAYS = 4;

/** @throws {RangeError} lengths differ */
export function buildPyramid(timesS: Float64Array, tempsC: Float64Array, gaps: Span[]): Pyramid {
  if (timesS.length !== tempsC.length) {
    throw new RangeError(`${timesS.length} times but ${tempsC.length} temperatures`);
  }
  const levels: Pyramid['levels'] = [];
  let below = { lowC: tempsC, highC: tempsC };
  while (below.lowC.length > WAYS) {
    below = { lowC: fold(below.lowC, Math.min), highC: fold(below.highC, Math.max) };
    levels.push(below);
  }
  return { timesS, tempsC, levels, gaps: [...gaps].sort((a, b) => a.fromS - b.fromS) };
}

function fold(of: Float64Array, pick: (a: number, b: number) => number): Float64Array {
  const folded = new Float64Array(Math.ceil(of.length / WAYS));
  for (let i = 0; i < folded.length; i++) {
    const end = Math.min(of.length, (i + 1) * WAYS);
    let value = of[i * WAYS]!;
    for (let j = i * WAYS + 1; j < end; j++) value = pick(value, of[j]!);
    folded[i] = value;
  }
  return folded;
}

/** Lowest and highest of readings first … past − 1; null where there are none. */
export function reachOf(
  pyramid: Pyramid,
  first: number,
  past: number,
): { lowC: number; highC: number } | null {
  if (past <= first) return null;
  let lowC = Infinity;
  let highC = -Infinity;
  let level = { lowC: pyramid.tempsC, highC: pyramid.tempsC };
  let from = first;
  let to = past;
  for (let up = 0; from < to; up++) {
    const coarser = pyramid.levels[up];
    const take = (i: number) => {
      lowC = Math.min(lowC, level.lowC[i]!);
      highC = Math.max(highC, level.highC[i]!);
    };
    while (from < to && (!coarser || from % WAYS !== 0)) take(from++);
    while (from < to && to % WAYS !== 0) take(--to);
    if (!coarser) break;
    level = coarser;
    from /= WAYS;
    to /= WAYS;
  }
  return { lowC, highC };
}

/** Index of the first reading at or after a time. */
export function indexAtOrAfter(timesS: Float64Array, timeS: number): number {
  let from = 0;
  let to = timesS.length;
  while (from < to) {
    const middle = (from + to) >> 1;
    if (timesS[middle]! < timeS) from = middle + 1;
    else to = middle;
  }
  return from;
}

/** The window cut into equal columns of time, each closed on the left; the last is closed on both sides. */
export function columnsInView(
  pyramid: Pyramid,
  fromS: number,
  toS: number,
  columns: number,
): Columns {
  const first = new Int32Array(columns);
  const past = new Int32Array(columns);
  const lowC = new Float64Array(columns).fill(NaN);
  const highC = new Float64Array(columns).fill(NaN);
  let from = indexAtOrAfter(pyramid.timesS, fromS);
  const last = indexPast(pyramid.timesS, toS);
  for (let c = 0; c < columns; c++) {
    const endS = columnStart(fromS, toS, columns, c + 1);
    const to = c === columns - 1 ? last : Math.min(last, indexAtOrAfter(pyramid.timesS, endS));
    first[c] = from;
    past[c] = to;
    const reach = reachOf(pyramid, from, to);
    if (reach) {
      lowC[c] = reach.lowC;
      highC[c] = reach.highC;
    }
    from = to;
  }
  return { fromS, toS, first, past, lowC, highC };
}

/** Where a column begins, s; one formula, so that neighbours share their edge to the last bit. */
export function columnStart(fromS: number, toS: number, columns: number, column: number): number {
  return fromS + ((toS - fromS) * column) / columns;
}

function indexPast(timesS: Float64Array, timeS: number): number {
  let i = indexAtOrAfter(timesS, timeS);
  while (i < timesS.length && timesS[i] === timeS) i++;
  return i;
}

/** Whether a gap lies between two neighbouring readings. */
export function isGapBetween(gaps: Span[], beforeS: number, afterS: number): boolean {
  let from = 0;
  let to = gaps.length;
  while (from < to) {
    const middle = (from + to) >> 1;
    if (gaps[middle]!.toS <= beforeS) from = middle + 1;
    else to = middle;
  }
  const gap = gaps[from];
  return gap !== undefined && gap.fromS < afterS;
}

/** Index of the reading nearest to a time; −1 where there are none. */
export function nearestReading({ timesS }: Pick<Pyramid, 'timesS'>, timeS: number): number {
  const after = indexAtOrAfter(timesS, timeS);
  if (after === 0) return timesS.length > 0 ? 0 : -1;
  if (after === timesS.length) return after - 1;
  return timesS[after]! - timeS < timeS - timesS[after - 1]! ? after : after - 1;
}
