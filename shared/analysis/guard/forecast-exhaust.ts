import type { ExhaustFilter } from './exhaust-filter.ts';

/**
 * A heating leg carried on as a first-order response from where it is: T(t) = T + s·(1 − e^(−kt))/k, which levels off
 * at T + s/k; the same as A − (A − T0)·e^(−t/τ) with k = 1/τ.
 */
export type Course = Pick<ExhaustFilter, 'tempC' | 'slopeKPerS' | 'ptt' | 'pts' | 'pss'> & {
  /** Share of the slope that is lost in a second, 1/s. */
  fadePerS: number;
  /** Its standard deviation, 1/s. */
  fadeErrorPerS: number;
};

/** When a temperature is reached, s from now: an interval of 95 %. */
export type TimeTo = {
  earliestS: number;
  /** null: not within what is foreseen. */
  likelyS: number | null;
  latestS: number | null;
};

/**
 * How the slope of heating legs fades, 1/s: at first with the heater's own warming, later with the drum's (bench
 * model, seeds 1–4, 150 to 196 °F: medians 0.032 at 20 s of the leg, 0.0125 at 55, 0.0049 at 95, 0.0038 from 200 on).
 */
const SLOW_FADE_PER_S = 0.0038;
const QUICK_FADE_PER_S = 0.03;
const QUICK_FOR_S = 45;
/** Standard deviation of that, as a share of it. */
const FADE_SPREAD = 0.5;
const MOST_FADE_PER_S = 0.2;
/** A slope this small or smaller says nothing of how it fades, K/s. */
const LEAST_SLOPE_KPERS = 0.01;
/** As far as is foreseen, s. */
export const FORESEEN_S = 600;
/** Deviations of a 95 % interval. */
const INTERVAL_DEVIATIONS = 1.96;
const HALVINGS = 24;

/**
 * The course of the exhaust if nothing changes: the fade is what the curvature says and what legs of this age do,
 * weighted by their variances.
 *
 * @param ageS of the leg, s
 */
export function foresee(now: ExhaustFilter, ageS: number): Course {
  const usual = SLOW_FADE_PER_S + QUICK_FADE_PER_S * Math.exp(-((ageS / QUICK_FOR_S) ** 2));
  const usualVar = (FADE_SPREAD * usual) ** 2;
  const slope = Math.max(LEAST_SLOPE_KPERS, now.slopeKPerS);
  const seen = -now.curveKPerS2 / slope;
  const seenVar = (now.pcc + seen * seen * now.pss) / (slope * slope);
  const fade = usual + (usualVar / (usualVar + seenVar)) * (seen - usual);
  return {
    tempC: now.tempC,
    slopeKPerS: now.slopeKPerS,
    ptt: now.ptt,
    pts: now.pts,
    pss: now.pss,
    fadePerS: Math.min(MOST_FADE_PER_S, Math.max(0, fade)),
    fadeErrorPerS: Math.sqrt((usualVar * seenVar) / (usualVar + seenVar)),
  };
}

/** °C where the exhaust will be after a time, s. */
export function tempAfter({ tempC, slopeKPerS, fadePerS }: Course, afterS: number): number {
  return tempC + slopeKPerS * fadedTime(fadePerS, afterS);
}

/** Standard deviation of `tempAfter`, K: to first order in temperature, slope and fade (JCGM 100:2008, 5.2.2). */
export function spreadAfter(course: Course, afterS: number): number {
  const { ptt, pts, pss, slopeKPerS, fadePerS, fadeErrorPerS } = course;
  const bySlope = fadedTime(fadePerS, afterS);
  const byFade = slopeKPerS * fadeWeight(fadePerS, afterS) * fadeErrorPerS;
  const variance = ptt + bySlope * (2 * pts + bySlope * pss) + byFade * byFade;
  return Math.sqrt(Math.max(0, variance));
}

/** When the course reaches a temperature; null where not even its upper bound does within 600 s. */
export function timeTo(course: Course, tempC: number): TimeTo | null {
  const earliestS = crossing(course, tempC, INTERVAL_DEVIATIONS);
  if (earliestS === null) return null;
  const likelyS = crossing(course, tempC, 0);
  return { earliestS, likelyS, latestS: likelyS && crossing(course, tempC, -INTERVAL_DEVIATIONS) };
}

/** First time at which the course, so many deviations up, is at a temperature; found by halving. */
function crossing(course: Course, tempC: number, deviations: number): number | null {
  const isThere = (afterS: number) =>
    tempAfter(course, afterS) + deviations * spreadAfter(course, afterS) >= tempC;
  if (isThere(0)) return 0;
  // A lower bound widens with time and may turn back: looked for in steps that grow.
  let beforeS = 0;
  let untilS = 5;
  while (!isThere(untilS)) {
    if (untilS >= FORESEEN_S) return null;
    beforeS = untilS;
    untilS = Math.min(FORESEEN_S, 1.5 * untilS);
  }
  for (let halving = 0; halving < HALVINGS; halving++) {
    const middleS = 0.5 * (beforeS + untilS);
    if (isThere(middleS)) untilS = middleS;
    else beforeS = middleS;
  }
  return untilS;
}

/** (1 − e^(−kt))/k, which is t where k is 0. */
function fadedTime(k: number, t: number): number {
  const x = k * t;
  return x < 1e-4 ? t * (1 - x / 2) : (1 - Math.exp(-x)) / k;
}

/** What a little more fade takes off it: (1 − (1 + kt)·e^(−kt))/k², which is t²/2 where k is 0. */
function fadeWeight(k: number, t: number): number {
  const x = k * t;
  return x < 1e-3 ? t * t * (0.5 - x / 3) : (1 - (1 + x) * Math.exp(-x)) / (k * k);
}
