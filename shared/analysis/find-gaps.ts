import type { Gap } from './run-facts.ts';
import { median } from './statistics/quantile.ts';

/** A span is a gap when it is longer than this many usual spacings … */
const SPACINGS = 4;
/** … and than this: by hand, nobody is as regular as a probe. */
const LEAST_GAP_S = 3;
const LOOKED_AT = 20_000;

/** Usual spacing of the readings, s: the median, looked for in evenly spread places of a long record. */
export function usualSpacing(timesS: Float64Array): number {
  const n = timesS.length;
  if (n < 2) return 0;
  const stride = Math.max(1, Math.floor((n - 1) / LOOKED_AT));
  const steps = new Float64Array(Math.floor((n - 2) / stride) + 1);
  for (let k = 0; k < steps.length; k++) steps[k] = timesS[k * stride + 1]! - timesS[k * stride]!;
  return median(steps);
}

/**
 * Spans in which readings are missing.
 *
 * @param timesS strictly rising, s
 * @param spacingS usual spacing, s
 */
export function findGaps(timesS: Float64Array, spacingS: number): Gap[] {
  const least = Math.max(SPACINGS * spacingS, LEAST_GAP_S);
  const gaps: Gap[] = [];
  for (let i = 1; i < timesS.length; i++) {
    if (timesS[i]! - timesS[i - 1]! <= least) continue;
    gaps.push({ fromS: timesS[i - 1]!, toS: timesS[i]!, beforeIndex: i - 1, afterIndex: i });
  }
  return gaps;
}

/** Those of a record's gaps, in time order, that reach into a stretch of it. */
export function gapsWithin(gaps: Gap[], fromS: number, toS: number): Gap[] {
  let low = 0;
  let high = gaps.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (gaps[middle]!.toS <= fromS) low = middle + 1;
    else high = middle;
  }
  let end = low;
  while (end < gaps.length && gaps[end]!.fromS < toS) end++;
  return gaps.slice(low, end);
}
