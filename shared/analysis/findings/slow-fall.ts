import type { Evidence } from '../analysis.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { firstCrossing, isDisturbed, nearestLegs, spanOf } from './trace.ts';

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
 * Evidence that a fall is slow at equal temperature against the run's cleanest one from a like peak; null where it is
 * not, or where none compares.
 */
export function slowFall(leg: RunLeg, falls: RunLeg[], facts: RunFacts): Evidence | null {
  const others = nearestLegs(falls, leg).filter(
    (other) => isAlike(leg, other) && !isAsFast(leg, other),
  );
  if (others.length === 0) return null;
  const compared = others.flatMap((other) => [
    ...comparedFalls(leg, other, facts),
    ...comparedWholes(leg, other),
  ]);
  const cleanest = compared.reduce<(typeof compared)[number] | null>(
    (best, one) => (best && best.times >= one.times ? best : one),
    null,
  );
  // Between a few readings of a coarse record a whole cycle may hide.
  const leastExtraS = Math.max(LEAST_EXTRA_S, HIDING_READINGS * facts.spacingS);
  if (!cleanest || cleanest.times < SLOW_TIMES || cleanest.extraS < leastExtraS) return null;
  return {
    how: 'falls-slowly',
    fallRateKPerS: cleanest.spanK / cleanest.ownS,
    usualRateKPerS: (cleanest.spanK / cleanest.ownS) * cleanest.times,
    shareOfUsualRate: 1 / cleanest.times,
    atC: cleanest.middleC,
  };
}

/** How much longer a fall takes than another through the span that both pass clear of their corners. */
function comparedFalls(leg: RunLeg, other: RunLeg, facts: RunFacts) {
  const highC = Math.min(leg.from.tempC, other.from.tempC);
  const lowC = Math.max(leg.to.tempC, other.to.tempC);
  const topC = highC - 0.2 * (highC - lowC);
  const footC = lowC + 0.2 * (highC - lowC);
  if (topC - footC < LEAST_SPAN_K) return [];
  const ownS = fallTime(leg, facts, topC, footC);
  const otherS = fallTime(other, facts, topC, footC);
  if (ownS === null || otherS === null || otherS < LEAST_READINGS * facts.spacingS) return [];
  const spanK = topC - footC;
  return [
    { times: ownS / otherS, extraS: ownS - otherS, ownS, spanK, middleC: (topC + footC) / 2 },
  ];
}

/** A cheap first look that settles nearly every pair of a sound machine's falls: alike from turn to turn, and as fast. */
function isAsFast(leg: RunLeg, other: RunLeg): boolean {
  return (
    areWholeAlike(leg, other) &&
    leg.to.timeS - leg.from.timeS < AS_FAST_TIMES * (other.to.timeS - other.from.timeS)
  );
}

/** Whether two falls both end in a turn of the machine, and near each other. */
function areWholeAlike(leg: RunLeg, other: RunLeg): boolean {
  const whole = leg.to.turnedBy === 'machine' && other.to.turnedBy === 'machine';
  return whole && Math.abs(leg.to.tempC - other.to.tempC) <= ALIKE_PEAKS_K;
}

/** The same of two whole falls between like turns: the turns are located better than a coarse record crosses levels. */
function comparedWholes(leg: RunLeg, other: RunLeg) {
  if (!areWholeAlike(leg, other)) return [];
  const ownS = leg.to.timeS - leg.from.timeS;
  const otherS = other.to.timeS - other.from.timeS;
  const spanK = leg.from.tempC - leg.to.tempC;
  const middleC = (leg.from.tempC + leg.to.tempC) / 2;
  return [{ times: ownS / otherS, extraS: ownS - otherS, ownS, spanK, middleC }];
}

function fallTime(leg: RunLeg, facts: RunFacts, topC: number, footC: number): number | null {
  const fromS = firstCrossing(facts, spanOf(leg), topC, 'down');
  const toS = firstCrossing(facts, spanOf(leg), footC, 'down');
  return fromS === null || toS === null ? null : toS - fromS;
}
