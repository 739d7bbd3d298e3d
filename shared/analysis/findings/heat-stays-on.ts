import type { Evidence, Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import { firstCrossing, marksWithin, spanOf, spanWithTail, totalU } from './trace.ts';

/** Clean off-times for which a fall may hang above the reset band. */
const HANG_TIMES = 3;
/** A fall at equal temperature that takes this many times the run's cleanest keeps some heat … */
const SLOW_TIMES = 1.7;
/** … if it takes this much longer too, so that a short one is no matter of a second, s. */
const LEAST_EXTRA_S = 12;
/** A pause in the readings of more than this share of a fall may hide a turn. */
const HIDING_SHARE = 0.2;
/** Least span over which two falls are compared, K (7 °F). */
const LEAST_SPAN_K = 7 / 1.8;
/** Peaks further apart leave the drum unequally hot, and their falls do not compare, K (5 °F). */
const ALIKE_PEAKS_K = 5 / 1.8;
/** How long a fall must have lasted before its asymptote is that of the drum and not of the heater's own heat, s. */
const SETTLED_S = 120;
/** Within this of its asymptote a leg has levelled off, K (3 °F). */
const LEVEL_K = 3 / 1.8;
/** A rise slower than this before its knee was level already, K/s (2 °F a minute). */
const RISING_K_PER_S = 2 / 1.8 / 60;
/** A fall needs this many readings between the two levels for its time to be known. */
const LEAST_READINGS = 3;

/**
 * The thermostat opened and some heat stays on: the exhaust hangs above the reset band, falls too slowly, or levels
 * off below band and allowance.
 *
 * Assumes equal airflow through the run, so that clean falls pass equal temperatures at equal rates; where no clean
 * fall is there to go by, a first-order fall with the heating leg's τ from the peak to the rated reset.
 *
 * Evidence: how (hangs, falls-slowly, levels-off), hangS, usualOffS, fallRateKPerS, usualRateKPerS, shareOfUsualRate,
 * atC, asymptoteC, asymptoteUK, roomC; those that do not apply are null.
 */
export function findHeatStaysOn(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  if (!rating) return null;
  for (const leg of facts.legs) {
    if (leg.kind === 'heating') {
      const level =
        levelsInBand(leg, facts, rating) ??
        risesAgain(leg, facts, rating) ??
        staysAtTop(leg, facts, rating);
      if (level) return level;
    } else if (leg.from.turnedBy === 'machine' && !isDisturbed(leg, facts)) {
      const found =
        hangs(leg, facts, rating) ?? fallsSlowly(leg, facts) ?? levelsOff(leg, facts, rating);
      if (found) return found;
    }
  }
  return null;
}

/** A door or a machine turned off changes the fall; that is no fault. */
function isDisturbed(leg: RunLeg, facts: RunFacts): boolean {
  const { fromS, toS } = spanOf(leg);
  const hidden = facts.gaps.some(
    (gap) =>
      gap.fromS < toS && gap.toS > fromS && gap.toS - gap.fromS > HIDING_SHARE * (toS - fromS),
  );
  const marks = marksWithin(facts, { fromS, toS }, ['heat-off', 'stopped', 'door', 'duct-off']);
  return hidden || marks.length > 0;
}

function hangs(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { lowC } = bandOf('reset', rating);
  const usualOffS = usualOff(leg, facts, rating);
  if (usualOffS === null || leg.from.tempC <= lowC) return null;
  const span = spanWithTail(leg, facts);
  const leftS = firstCrossing(facts, span, lowC, 'down') ?? span.toS;
  const hangS = leftS - span.fromS;
  if (hangS <= Math.max(HANG_TIMES * usualOffS, usualOffS + 2 * LEAST_EXTRA_S)) return null;
  return toFinding(leg, facts, { how: 'hangs', hangS, usualOffS });
}

/**
 * The off-time of the run's cleanest fall from a like peak: once a coil is grounded most falls may be slow, so that a
 * median would not be a clean one. With none, from the heating leg before.
 */
function usualOff(leg: RunLeg, facts: RunFacts, rating: Rating): number | null {
  const others = completeFalls(facts).filter((other) => other !== leg && isAlike(leg, other));
  if (others.length > 0) return Math.min(...others.map(({ from, to }) => to.timeS - from.timeS));
  const heating = facts.legs[facts.legs.indexOf(leg) - 1];
  const { roomC } = facts;
  if (!heating?.fit || roomC === null || roomC >= rating.closesC) return null;
  return heating.fit.tauS * Math.log((leg.from.tempC - roomC) / (rating.closesC - roomC));
}

function completeFalls({ legs }: RunFacts): RunLeg[] {
  return legs.filter(
    ({ kind, from, to }) =>
      kind === 'cooling' && from.turnedBy === 'machine' && to.turnedBy === 'machine',
  );
}

function isAlike(leg: RunLeg, other: RunLeg): boolean {
  return Math.abs(leg.from.tempC - other.from.tempC) <= ALIKE_PEAKS_K;
}

function fallsSlowly(leg: RunLeg, facts: RunFacts): Finding | null {
  const others = facts.legs.filter(
    (other) =>
      other !== leg &&
      other.kind === 'cooling' &&
      other.from.turnedBy === 'machine' &&
      isAlike(leg, other) &&
      !isDisturbed(other, facts),
  );
  const compared = others.flatMap((other) => [
    ...comparedFalls(leg, other, facts),
    ...comparedWholes(leg, other),
  ]);
  const cleanest = compared.reduce<(typeof compared)[number] | null>(
    (best, one) => (best && best.times >= one.times ? best : one),
    null,
  );
  // Crossings of a coarse record are known to about half its spacing each.
  const leastExtraS = Math.max(LEAST_EXTRA_S, 2 * facts.spacingS);
  if (!cleanest || cleanest.times < SLOW_TIMES || cleanest.extraS < leastExtraS) return null;
  return toFinding(leg, facts, {
    how: 'falls-slowly',
    fallRateKPerS: cleanest.spanK / cleanest.ownS,
    usualRateKPerS: (cleanest.spanK / cleanest.ownS) * cleanest.times,
    shareOfUsualRate: 1 / cleanest.times,
    atC: cleanest.middleC,
  });
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

/** The same of two whole falls between like turns: the turns are located better than a coarse record crosses levels. */
function comparedWholes(leg: RunLeg, other: RunLeg) {
  const whole = leg.to.turnedBy === 'machine' && other.to.turnedBy === 'machine';
  if (!whole || Math.abs(leg.to.tempC - other.to.tempC) > ALIKE_PEAKS_K) return [];
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

function levelsOff(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { fit, to } = leg;
  if (!fit || to.turnedBy !== 'end') return null;
  if (lasted(leg, facts) < Math.max(SETTLED_S, fit.tauS)) return null;
  const lowestC = fit.asymptoteC - 2 * fit.asymptoteErrorK - totalU(facts, to);
  if (lowestC <= bandOf('reset', rating).lowC) return null;
  return toFinding(leg, facts, { how: 'levels-off' });
}

/** The rise bends in the opens band and levels off under the allowance: opened, with part of the heat left on. */
function levelsInBand(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { knee, fit, to } = leg;
  if (!knee || !fit || to.turnedBy !== 'end' || leg.hasGap) return null;
  const { lowC, highC, highEndC } = bandOf('cut-out', rating);
  const uK = totalU(facts, to);
  const inBand = knee.tempC + uK >= lowC && knee.tempC - uK <= highC;
  const slowed =
    knee.slopeBeforeKPerS > RISING_K_PER_S && knee.slopeAfterKPerS < 0.5 * knee.slopeBeforeKPerS;
  const level = fit.asymptoteC - to.tempC < LEVEL_K && to.tempC < highEndC;
  if (!inBand || !slowed || !level || spanWithTail(leg, facts).toS - knee.timeS < SETTLED_S)
    return null;
  return toFinding(leg, facts, { how: 'levels-off' });
}

/** After a cut-out the exhaust turned up again well above any reset, and stays: heat that no reset brought back. */
function risesAgain(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { from, to } = leg;
  if (from.turnedBy !== 'machine' || to.turnedBy !== 'end' || leg.hasGap) return null;
  const ownC = facts.resets.filter(({ timeS }) => timeS < from.timeS).map(({ tempC }) => tempC);
  const highestResetC = Math.max(bandOf('reset', rating).highC, ...ownC);
  const above = from.tempC - totalU(facts, from) > highestResetC + ALIKE_PEAKS_K;
  if (!above || lasted(leg, facts) < SETTLED_S) return null;
  if (to.tempC > bandOf('cut-out', rating).highEndC) return null;
  return toFinding(leg, facts, { how: 'levels-off' });
}

/** The last rise reached the machine's own cut-outs and stayed there, under the allowance, with none. */
function staysAtTop(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { to } = leg;
  const own = facts.cutOuts.filter(({ timeS }) => timeS < leg.to.timeS);
  if (own.length === 0 || to.turnedBy !== 'end' || leg.hasGap) return null;
  const ownC = median(own.map(({ tempC }) => tempC));
  const span = spanWithTail(leg, facts);
  const reachedS = firstCrossing(facts, span, ownC, 'up');
  if (reachedS === null || span.toS - reachedS < SETTLED_S) return null;
  if (to.tempC > bandOf('cut-out', rating).highEndC) return null;
  return toFinding(leg, facts, { how: 'levels-off' });
}

/** How long a leg lasted, a level stretch after it included, s. */
function lasted(leg: RunLeg, facts: RunFacts): number {
  const { fromS, toS } = spanWithTail(leg, facts);
  return toS - fromS;
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
