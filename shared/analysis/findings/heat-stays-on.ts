import type { Evidence, Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import { SETTLED_S, staysLevel } from './level-heat.ts';
import { isAlike, LEAST_EXTRA_S, slowFall, undisturbedFalls } from './slow-fall.ts';
import { firstCrossing, isDisturbed, lasted, nearestLegs, spanWithTail, totalU } from './trace.ts';

/** Clean off-times for which a fall may hang above the reset band. */
const HANG_TIMES = 3;
/** Between this many readings a whole cycle may hide, and look like one long fall. */
const HIDDEN_CYCLE_READINGS = 8;
/** Readings that a fall must span to be a measure, where some do. */
const SURE_READINGS = 4;
/** A fall to be judged by where it heads for lasts this long, s, and this many times what the drum alone takes. */
const LONG_FALL_S = 100;
const LONG_FALL_TIMES = 1.2;
/** Share of the way from the room up to the peak that is far above the room. */
const FAR_SHARE = 0.55;
/** Share of the rated differential that a fall must cover to be a measure for others. */
const LEAST_FALL_SHARE = 0.5;

/**
 * The thermostat opened and some heat stays on: the exhaust hangs above the reset band, falls too slowly, or levels
 * off below band and allowance.
 *
 * Assumes equal airflow through the run, so that clean falls pass equal temperatures at equal rates (the run's own, or
 * those of the machine's clean run); where no clean fall is there to go by, a first-order fall with the heating leg's
 * τ from the peak to the rated reset, and an asymptote (Newton's law of cooling) far above the room.
 *
 * Evidence: how (hangs, falls-slowly, levels-off, keeps-off-room), hangS, usualOffS, fallRateKPerS, usualRateKPerS, shareOfUsualRate,
 * atC, asymptoteC, asymptoteUK, roomC; those that do not apply are null.
 */
export function findHeatStaysOn(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  if (!rating) return null;
  const falls = {
    whole: wholeFalls(facts, rating),
    undisturbed: undisturbedFalls(facts),
    slowestTauS: slowestHeating(facts),
  };
  for (const leg of facts.legs) {
    const seen =
      leg.kind === 'heating' ? rising(leg, facts, rating) : falling(leg, falls, facts, rating);
    if (seen) return toFinding(leg, facts, seen);
  }
  return null;
}

function rising(leg: RunLeg, facts: RunFacts, rating: Rating): Evidence | null {
  return staysLevel(leg, facts, rating) ? { how: 'levels-off' } : null;
}

/** What a fall is compared with. */
type Falls = {
  whole: RunLeg[];
  undisturbed: RunLeg[];
  /** The slowest heating leg's τ: that of the drum, s. */
  slowestTauS: number | null;
};

function falling(leg: RunLeg, falls: Falls, facts: RunFacts, rating: Rating): Evidence | null {
  if (leg.from.turnedBy !== 'machine' || isDisturbed(leg, facts)) return null;
  return (
    hangs(leg, falls, facts, rating) ??
    slowFall(leg, falls.undisturbed, facts) ??
    levelsOff(leg, falls, facts, rating) ??
    keepsOffRoom(leg, falls, facts, rating)
  );
}

function hangs(leg: RunLeg, falls: Falls, facts: RunFacts, rating: Rating): Evidence | null {
  const { lowC } = bandOf('reset', rating);
  if (leg.from.tempC <= lowC) return null;
  const span = spanWithTail(leg, facts);
  const leftS = firstCrossing(facts, span, lowC, 'down') ?? span.toS;
  const hangS = leftS - span.fromS;
  if (hangS <= Math.max(2 * LEAST_EXTRA_S, HIDDEN_CYCLE_READINGS * facts.spacingS)) return null;
  const usualOffS = usualOff(leg, falls, facts, rating);
  if (usualOffS === null) return null;
  if (hangS <= Math.max(HANG_TIMES * usualOffS, usualOffS + 2 * LEAST_EXTRA_S)) return null;
  return { how: 'hangs', hangS, usualOffS };
}

/**
 * The off-time of the run's cleanest fall from a like peak: once a coil is grounded most falls may be slow, so that a
 * median would not be a clean one. With no like peak the median of the others; with no other fall, from the slowest
 * heating leg, which is that of the drum.
 */
function usualOff(leg: RunLeg, falls: Falls, facts: RunFacts, rating: Rating): number | null {
  const others = nearestLegs(falls.whole, leg);
  let shortestS = Infinity;
  for (const other of others) {
    if (isAlike(leg, other)) shortestS = Math.min(shortestS, offTime(other));
  }
  if (shortestS < Infinity) return shortestS;
  if (others.length > 0) return median(others.map(offTime));
  const opened = leg.from.tempC + totalU(facts, leg.from) >= bandOf('cut-out', rating).lowC;
  const { reference } = facts.input;
  if (opened && reference?.fall) return reference.offS;
  return opened ? drumFallTime(leg, falls.slowestTauS, facts, rating) : null;
}

/** How long the drum alone, without the air's quicker part, takes from the peak to the rated reset, s. */
function drumFallTime(
  leg: RunLeg,
  drumTauS: number | null,
  { roomC }: RunFacts,
  rating: Rating,
): number | null {
  if (drumTauS === null || roomC === null || roomC >= rating.closesC) return null;
  return drumTauS * Math.log((leg.from.tempC - roomC) / (rating.closesC - roomC));
}

function offTime({ from, to }: RunLeg): number {
  return to.timeS - from.timeS;
}

function slowestHeating({ legs }: RunFacts): number | null {
  let slowestS: number | null = null;
  for (const { kind, fit } of legs) {
    if (kind === 'heating' && fit) slowestS = Math.max(slowestS ?? 0, fit.tauS);
  }
  return slowestS;
}

/**
 * Complete falls that reach far enough to be the thermostat's: a dip on the way up sets no measure. Nor does one of a
 * few readings, which two wild ones can make, where there are longer ones.
 */
function wholeFalls({ legs, spacingS }: RunFacts, rating: Rating): RunLeg[] {
  const leastK = LEAST_FALL_SHARE * (rating.opensC - rating.closesC);
  const whole = legs.filter(
    ({ kind, from, to }) =>
      kind === 'cooling' &&
      from.turnedBy === 'machine' &&
      to.turnedBy === 'machine' &&
      from.tempC - to.tempC >= leastK,
  );
  const sure = whole.filter((leg) => offTime(leg) >= SURE_READINGS * spacingS);
  return sure.length > 0 ? sure : whole;
}

/** An end of a fall that is shorter than the machine's own falls says nothing: air first, drum later, it only looks level. */
function levelsOff(leg: RunLeg, falls: Falls, facts: RunFacts, rating: Rating): Evidence | null {
  const { fit, to } = leg;
  if (!fit || to.turnedBy !== 'end') return null;
  const usualS = usualOff(leg, falls, facts, rating);
  if (usualS !== null && lasted(leg, facts) < LONG_FALL_TIMES * usualS) return null;
  if (lasted(leg, facts) < Math.max(SETTLED_S, fit.tauS)) return null;
  const lowestC = fit.asymptoteC - 2 * fit.asymptoteErrorK - totalU(facts, to);
  if (lowestC <= bandOf('reset', rating).lowC) return null;
  return { how: 'levels-off' };
}

/**
 * The fall spans at least one τ, lasts longer than the whole drum takes by itself, and heads for a temperature whose
 * lower bound is far above the room: no clean fall is needed to go by.
 *
 * A clean fall is quick at first (air) and slow later (drum), so that its first part alone seems to head for half-way
 * between peak and room: only a long one is asked, and more than half-way is "far above".
 */
function keepsOffRoom(leg: RunLeg, falls: Falls, facts: RunFacts, rating: Rating): Evidence | null {
  const { fit, from } = leg;
  const { roomC } = facts;
  const drumS = drumFallTime(leg, falls.slowestTauS, facts, rating);
  if (!fit || roomC === null || drumS === null || from.tempC <= rating.closesC) return null;
  if (fit.toS - fit.fromS < fit.tauS) return null;
  if (lasted(leg, facts) < Math.max(LONG_FALL_S, LONG_FALL_TIMES * drumS)) return null;
  const lowestC = fit.asymptoteC - 2 * fit.asymptoteErrorK;
  return lowestC > roomC + FAR_SHARE * (from.tempC - roomC) ? { how: 'keeps-off-room' } : null;
}

function toFinding(leg: RunLeg, facts: RunFacts, seen: Evidence): Finding {
  return {
    code: 'heat-stays-on',
    ...spanWithTail(leg, facts),
    evidence: {
      hangS: null,
      usualOffS: null,
      fallRateKPerS: null,
      usualRateKPerS: null,
      shareOfUsualRate: null,
      atC: null,
      ...seen,
      asymptoteC: leg.fit?.asymptoteC ?? null,
      asymptoteUK: leg.fit ? 2 * leg.fit.asymptoteErrorK : null,
      roomC: facts.roomC,
    },
  };
}
