import type { DisplayUnit } from '../units.ts';

/** What the next reading should be about, from the last two. In the run's unit. */
export type Expected = {
  temp: number;
  /** Seconds since the last reading. */
  gapS: number;
  /** How fast it moved between the last two, per s; 0 where that is not known. */
  slopePerS: number;
};

type Reading = { atS: number; temp: number };

/** Between readings further apart than this a slope says nothing of what comes next. */
const SLOPE_GAP_S = 45;
/** An exhaust turns within seconds, so its line is followed only so far. */
const FOLLOW_S = 15;
/** What an exhaust does at most: it falls by 0.8 °F/s at a cut-out and more with a door open (common practice). */
const MOST_F_PER_S = 1.5;
/** What a hand, a probe and rounding add. */
const SLACK_F = 10;

/** @returns null before the first reading */
export function expectReading(
  last: Reading | null,
  before: Reading | null,
  atS: number,
): Expected | null {
  if (!last) return null;
  const gapS = Math.max(0, atS - last.atS);
  const apartS = before ? last.atS - before.atS : Infinity;
  const slopePerS =
    before && apartS > 0 && apartS <= SLOPE_GAP_S ? (last.temp - before.temp) / apartS : 0;
  return { temp: last.temp + slopePerS * Math.min(gapS, FOLLOW_S), gapS, slopePerS };
}

/** Where the reading may lie: wider the longer nobody looked, and the faster it moved. */
export function plausibleSpan(
  { temp, gapS, slopePerS }: Expected,
  unit: DisplayUnit,
): { low: number; high: number } {
  const perDegree = unit === 'F' ? 1 : 1 / 1.8;
  const fastest = Math.max(MOST_F_PER_S * perDegree, 1.5 * Math.abs(slopePerS));
  const reach = SLACK_F * perDegree + fastest * gapS;
  return { low: temp - reach, high: temp + reach };
}
