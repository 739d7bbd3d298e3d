import type { Evidence } from '../analysis.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { mean } from './judged-points.ts';
import { firstCrossing, isDisturbed, nearestLegs, spanOf, temperatureAt } from './trace.ts';

/** A fall at equal temperature that takes this many times the run's cleanest keeps some heat … */
const SLOW_TIMES = 1.7;
/** … if it takes this much longer too, so that a short one is no matter of a second, s. */
export const LEAST_EXTRA_S = 12;
/** Readings that a fall must take longer by. */
const HIDING_READINGS = 4;
/** Least span over which two falls are compared, K (7 °F). */
const LEAST_SPAN_K = 7 / 1.8;
/** Peaks further apart leave the drum unequally hot, and their falls do not compare, K (5 °F). */
export const ALIKE_PEAKS_K = 5 / 1.8;
/** Whole falls whose times differ by less than this do not differ by SLOW_TIMES in their middle. */
const AS_FAST_TIMES = 1.2;
/** A fall needs this many readings between the two levels for its time to be known. */
const LEAST_READINGS = 3;

/** Whether two falls start from peaks so near each other that they compare. */
export function isAlike(leg: RunLeg, other: RunLeg): boolean {
  return Math.abs(leg.from.tempC - other.from.tempC) <= ALIKE_PEAKS_K;
}

/** The falls after a cut-out that nobody disturbed: what a fall may be compared with. */
export function undisturbedFalls(facts: RunFacts): RunLeg[] {
  return facts.legs.filter(
    (leg) => leg.kind === 'cooling' && leg.from.turnedBy === 'machine' && !isDisturbed(leg, facts),
  );
}

/**
 * Evidence that a fall is slow at equal temperature against the run's cleanest one from a like peak, or against that
 * of the machine's clean run; null where it is not, or where none compares.
 */
export function slowFall(leg: RunLeg, falls: RunLeg[], facts: RunFacts): Evidence | null {
  const near = nearestLegs(falls, leg);
  const others = near.filter((other) => isAlike(leg, other) && !isAsFast(leg, other));
  if (others.length === 0 && !facts.input.reference) return null;
  const compared = others.flatMap((other) => [
    ...comparedFalls(leg, other, facts),
    ...comparedWholes(leg, other),
  ]);
  const slow = [...compared, ...comparedReference(leg, facts)].filter(({ times, extraS }) => {
    // Between a few readings of a coarse record a whole cycle may hide.
    const leastExtraS = Math.max(LEAST_EXTRA_S, HIDING_READINGS * facts.spacingS);
    return times >= SLOW_TIMES && extraS >= leastExtraS;
  });
  const [slowest] = slow.sort((a, b) => b.times - a.times);
  const found = slowest ?? slowFromHere(leg, near);
  return found && !quickensAgain(leg, facts) ? toEvidence(found) : null;
}

/** Where the parts of a fall that are compared begin and end, as shares of its time: clear of both rounded corners. */
const PARTS = [0.15, 0.4, 0.65, 0.9];
/** A part that falls this many times as quickly as the one before it had heat before it, and none in it. */
const QUICKENS_TIMES = 1.3;

/**
 * Whether a fall slows down and then quickens: a short heat lies in it, too small to be a turn. Heat that stays on makes
 * a fall slower and slower, as any first-order fall is.
 */
function quickensAgain({ from, to }: RunLeg, facts: RunFacts): boolean {
  const lengthS = to.timeS - from.timeS;
  const tempsC = PARTS.map((share) => temperatureAt(facts, from.timeS + share * lengthS) ?? NaN);
  const dropsK = tempsC.slice(1).map((tempC, i) => tempsC[i]! - tempC);
  const noiseK = 2 * Math.SQRT2 * facts.binned.smoothNoiseK;
  return dropsK.slice(1).some((dropK, i) => dropK > QUICKENS_TIMES * dropsK[i]! + noiseK);
}

function toEvidence({ spanK, ownS, times, middleC }: Compared): Evidence {
  return {
    how: 'falls-slowly',
    fallRateKPerS: spanK / ownS,
    usualRateKPerS: (spanK / ownS) * times,
    shareOfUsualRate: 1 / times,
    atC: middleC,
  };
}

/** A fall beside another, through the same span. */
type Compared = { times: number; extraS: number; ownS: number; spanK: number; middleC: number };

/** Falls of each kind that it takes where one by itself is a matter of a few readings. */
const LEAST_EACH = 2;
/** The quickest slow fall takes this many times the slowest clean one. */
const APART_TIMES = 1.3;
/** A hidden cycle is a second fall and its heat: more than this many falls in all. */
const HIDDEN_CYCLE_FALLS = 1.5;

/**
 * A fall between like turns in a coarse record: slow where every such fall near it is from it on, and none before. What
 * takes so much longer that a whole cycle may hide between its readings is left alone.
 */
function slowFromHere(leg: RunLeg, near: RunLeg[]): Compared | null {
  const like = [leg, ...near].filter((other) => areWholeAlike(leg, other) && isAlike(leg, other));
  const beforeS = like.filter(({ from }) => from.timeS < leg.from.timeS).map(lengthOf);
  const sinceS = like.filter(({ from }) => from.timeS >= leg.from.timeS).map(lengthOf);
  if (beforeS.length < LEAST_EACH || sinceS.length < LEAST_EACH) return null;
  if (Math.min(...sinceS) < APART_TIMES * Math.max(...beforeS)) return null;
  const usualS = mean(beforeS);
  const ownS = mean(sinceS);
  const extraS = ownS - usualS;
  if (ownS < SLOW_TIMES * usualS || extraS < LEAST_EXTRA_S) return null;
  if (Math.max(...sinceS) - usualS > HIDDEN_CYCLE_FALLS * usualS) return null;
  const spanK = leg.from.tempC - leg.to.tempC;
  const middleC = (leg.from.tempC + leg.to.tempC) / 2;
  return { times: ownS / usualS, extraS, ownS, spanK, middleC };
}

function lengthOf({ from, to }: RunLeg): number {
  return to.timeS - from.timeS;
}

/** The same against the machine's clean run, from a like peak, where both are clear of their corners. */
function comparedReference(leg: RunLeg, facts: RunFacts): Compared[] {
  const fall = facts.input.reference?.fall;
  if (!fall || Math.abs(leg.from.tempC - fall.fromC) > ALIKE_PEAKS_K) return [];
  const { topC, footC } = clearSpan(leg.from.tempC, leg.to.tempC, fall.fromC, fall.toC);
  if (topC - footC < LEAST_SPAN_K) return [];
  const ownS = fallTime(leg, facts, topC, footC);
  const otherS = fall.tauS * Math.log((topC - fall.asymptoteC) / (footC - fall.asymptoteC));
  if (ownS === null || !(otherS > 0)) return [];
  return [toCompared(ownS, otherS, topC, footC)];
}

/** What two falls both pass, a fifth of it left out at either end. */
function clearSpan(fromC: number, toC: number, otherFromC: number, otherToC: number) {
  const highC = Math.min(fromC, otherFromC);
  const lowC = Math.max(toC, otherToC);
  return { topC: highC - 0.2 * (highC - lowC), footC: lowC + 0.2 * (highC - lowC) };
}

function toCompared(ownS: number, otherS: number, topC: number, footC: number): Compared {
  return {
    times: ownS / otherS,
    extraS: ownS - otherS,
    ownS,
    spanK: topC - footC,
    middleC: (topC + footC) / 2,
  };
}

/** How much longer a fall takes than another through the span that both pass clear of their corners. */
function comparedFalls(leg: RunLeg, other: RunLeg, facts: RunFacts): Compared[] {
  const { topC, footC } = clearSpan(leg.from.tempC, leg.to.tempC, other.from.tempC, other.to.tempC);
  if (topC - footC < LEAST_SPAN_K) return [];
  const ownS = fallTime(leg, facts, topC, footC);
  const otherS = fallTime(other, facts, topC, footC);
  if (ownS === null || otherS === null || otherS < LEAST_READINGS * facts.spacingS) return [];
  return [toCompared(ownS, otherS, topC, footC)];
}

/** A cheap first look that settles nearly every pair of a sound machine's falls: alike from turn to turn, and as fast. */
function isAsFast(leg: RunLeg, other: RunLeg): boolean {
  return areWholeAlike(leg, other) && lengthOf(leg) < AS_FAST_TIMES * lengthOf(other);
}

/** Whether two falls both end in a turn of the machine, and near each other. */
function areWholeAlike(leg: RunLeg, other: RunLeg): boolean {
  const whole = leg.to.turnedBy === 'machine' && other.to.turnedBy === 'machine';
  return whole && Math.abs(leg.to.tempC - other.to.tempC) <= ALIKE_PEAKS_K;
}

/** The same of two whole falls between like turns: the turns are located better than a coarse record crosses levels. */
function comparedWholes(leg: RunLeg, other: RunLeg): Compared[] {
  if (!areWholeAlike(leg, other)) return [];
  const ownS = lengthOf(leg);
  const otherS = lengthOf(other);
  const spanK = leg.from.tempC - leg.to.tempC;
  const middleC = (leg.from.tempC + leg.to.tempC) / 2;
  return [{ times: ownS / otherS, extraS: ownS - otherS, ownS, spanK, middleC }];
}

function fallTime(leg: RunLeg, facts: RunFacts, topC: number, footC: number): number | null {
  const fromS = firstCrossing(facts, spanOf(leg), topC, 'down');
  const toS = firstCrossing(facts, spanOf(leg), footC, 'down');
  return fromS === null || toS === null ? null : toS - fromS;
}
