import type { Mark, MarkKind } from '../series.ts';
import { gapsWithin } from '../find-gaps.ts';
import { firstAtOrAfter } from '../first-at-or-after.ts';
import type { Extreme, RunFacts, RunLeg } from '../run-facts.ts';
import { totalUncertainty } from '../judge-point.ts';

/** A mark is tapped a little after the fact, s. */
const TAPPED_LATE_S = 3;

/** A pause in the readings of more than this share of a leg may hide a turn. */
const HIDING_SHARE = 0.2;

/** Expanded uncertainty of an extreme with the probe's part, K. */
export function totalU({ input }: RunFacts, { uK, tempC }: Pick<Extreme, 'uK' | 'tempC'>): number {
  return totalUncertainty(uK, input.probe, tempC);
}

/**
 * When the smoothed record first passes a level within a span, s; null where it does not.
 *
 * @param direction up: from below to at least the level; down: the reverse
 */
export function firstCrossing(
  { binned }: RunFacts,
  { fromS, toS }: { fromS: number; toS: number },
  levelC: number,
  direction: 'up' | 'down',
): number | null {
  const { timesS, smoothC } = binned;
  const sign = direction === 'up' ? 1 : -1;
  for (let i = firstAtOrAfter(timesS, fromS); i < timesS.length; i++) {
    const timeS = timesS[i]!;
    if (timeS > toS) return null;
    const over = sign * (smoothC[i]! - levelC);
    if (over < 0) continue;
    const before = i > 0 ? sign * (levelC - smoothC[i - 1]!) : 0;
    if (i === 0 || timesS[i - 1]! < fromS || before <= 0) return timeS;
    return timesS[i - 1]! + ((timeS - timesS[i - 1]!) * before) / (before + over);
  }
  return null;
}

/** The smoothed record at a time, °C, held at the ends; null for an empty record. */
export function temperatureAt({ binned }: RunFacts, timeS: number): number | null {
  const { timesS, smoothC } = binned;
  const n = timesS.length;
  if (n === 0) return null;
  const after = firstAtOrAfter(timesS, timeS);
  if (after === 0) return smoothC[0]!;
  if (after === n) return smoothC[n - 1]!;
  const share = (timeS - timesS[after - 1]!) / (timesS[after]! - timesS[after - 1]!);
  return smoothC[after - 1]! + share * (smoothC[after]! - smoothC[after - 1]!);
}

/** Marks of some kinds that belong to a stretch of the record, in order. */
export function marksWithin(
  { input }: RunFacts,
  { fromS, toS }: { fromS: number; toS: number },
  kinds: MarkKind[],
): Mark[] {
  if (input.marks.length === 0) return [];
  return input.marks
    .filter(
      ({ kind, timeS }) => kinds.includes(kind) && timeS > fromS && timeS <= toS + TAPPED_LATE_S,
    )
    .sort((a, b) => a.timeS - b.timeS);
}

/** How many legs on either side a leg is compared with: the machine as it was about then, at a bounded cost. */
const NEAR_LEGS = 24;
/** The same among thousands, where the machine as it was about then is shown by fewer. */
const MANY_LEGS = 200;
const NEAR_AMONG_MANY = 8;

/** The legs nearest in time to one of a record, itself left out; `legs` in time order. */
export function nearestLegs(legs: RunLeg[], leg: RunLeg): RunLeg[] {
  let low = 0;
  let high = legs.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (legs[middle]!.from.timeS < leg.from.timeS) low = middle + 1;
    else high = middle;
  }
  const reach = legs.length > MANY_LEGS ? NEAR_AMONG_MANY : NEAR_LEGS;
  return legs.slice(Math.max(0, low - reach), low + reach + 1).filter((each) => each !== leg);
}

/** The span of a leg, s. */
export function spanOf({ from, to }: RunLeg): { fromS: number; toS: number } {
  return { fromS: from.timeS, toS: to.timeS };
}

/**
 * The span of a leg with what the record holds after it: the last extreme lies where the exhaust stopped moving by a
 * swing, and a level stretch may follow.
 */
export function spanWithTail(leg: RunLeg, { series }: RunFacts): { fromS: number; toS: number } {
  const lastS = series.timesS.at(-1) ?? leg.to.timeS;
  return { fromS: leg.from.timeS, toS: leg.to.turnedBy === 'end' ? lastS : leg.to.timeS };
}

/** How long a leg lasted, a level stretch after it included, s. */
export function lasted(leg: RunLeg, facts: RunFacts): number {
  const { fromS, toS } = spanWithTail(leg, facts);
  return toS - fromS;
}

/** A door or a machine turned off changes the fall; that is no fault. */
export function isDisturbed(leg: RunLeg, facts: RunFacts): boolean {
  const { fromS, toS } = spanOf(leg);
  const marks = marksWithin(facts, { fromS, toS }, ['heat-off', 'stopped', 'door', 'duct-off']);
  return hidesTurn(leg, facts) || marks.length > 0;
}

/** Whether a pause in the readings is long enough, beside its leg, to hide a turn. */
export function hidesTurn(leg: RunLeg, facts: RunFacts): boolean {
  if (facts.gaps.length === 0) return false;
  const { fromS, toS } = spanWithTail(leg, facts);
  return gapsWithin(facts.gaps, fromS, toS).some(
    (gap) => gap.toS - gap.fromS > HIDING_SHARE * (toS - fromS),
  );
}
