import type { Evidence, Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { median, quantile } from '../statistics/quantile.ts';
import { firstCrossing, marksWithin, spanOf, totalU } from './trace.ts';

/** Clean off-times for which a fall may hang above the reset band. */
const HANG_TIMES = 3;
/** A fall at equal temperature that takes this many times the run's clean ones keeps some heat. */
const SLOW_TIMES = 1.6;
/** Least span over which two falls are compared, K (7 °F). */
const LEAST_SPAN_K = 7 / 1.8;
/** Peaks further apart leave the drum unequally hot, and their falls do not compare, K (5 °F). */
const ALIKE_PEAKS_K = 5 / 1.8;
/** How long a fall must have lasted before its asymptote is that of the drum and not of the heater's own heat, s. */
const SETTLED_S = 120;
/** Within this of its asymptote a leg has levelled off, K (3 °F). */
const LEVEL_K = 3 / 1.8;

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
      const level = levelsInBand(leg, facts, rating);
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
  return (
    leg.hasGap ||
    marksWithin(facts, spanOf(leg), ['heat-off', 'stopped', 'door', 'duct-off']).length > 0
  );
}

function hangs(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { lowC } = bandOf('reset', rating);
  const usualOffS = usualOff(leg, facts, rating);
  if (usualOffS === null || leg.from.tempC <= lowC) return null;
  const span = spanOf(leg);
  const leftS = firstCrossing(facts, span, lowC, 'down') ?? span.toS;
  const hangS = leftS - span.fromS;
  if (hangS <= HANG_TIMES * usualOffS) return null;
  return toFinding(leg, facts, { how: 'hangs', hangS, usualOffS });
}

/** Median of the run's other complete falls; with none, from the heating leg before. */
function usualOff(leg: RunLeg, facts: RunFacts, rating: Rating): number | null {
  const others = completeFalls(facts).filter((other) => other !== leg);
  if (others.length > 0) return median(others.map(({ from, to }) => to.timeS - from.timeS));
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

function fallsSlowly(leg: RunLeg, facts: RunFacts): Finding | null {
  const others = facts.legs.filter(
    (other) =>
      other !== leg &&
      other.kind === 'cooling' &&
      other.from.turnedBy === 'machine' &&
      !isDisturbed(other, facts),
  );
  const rates = others.flatMap((other) => comparedFalls(leg, other, facts));
  if (rates.length === 0) return null;
  const times = quantile(
    rates.map(({ times }) => times),
    0.5,
  );
  const leastExtraS = Math.min(...rates.map(({ extraS }) => extraS));
  // Crossings of a coarse record are known to about half its spacing each.
  if (times < SLOW_TIMES || leastExtraS < 1.5 * facts.spacingS) return null;
  const first = rates[0]!;
  return toFinding(leg, facts, {
    how: 'falls-slowly',
    fallRateKPerS: first.spanK / first.ownS,
    usualRateKPerS: (first.spanK / first.ownS) * times,
    shareOfUsualRate: 1 / times,
    atC: first.middleC,
  });
}

/** How much longer a fall takes than another through the span that both pass clear of their corners. */
function comparedFalls(leg: RunLeg, other: RunLeg, facts: RunFacts) {
  if (Math.abs(leg.from.tempC - other.from.tempC) > ALIKE_PEAKS_K) return [];
  const highC = Math.min(leg.from.tempC, other.from.tempC);
  const lowC = Math.max(leg.to.tempC, other.to.tempC);
  const topC = highC - 0.2 * (highC - lowC);
  const footC = lowC + 0.2 * (highC - lowC);
  if (topC - footC < LEAST_SPAN_K) return [];
  const ownS = fallTime(leg, facts, topC, footC);
  const otherS = fallTime(other, facts, topC, footC);
  if (ownS === null || otherS === null || otherS <= 0) return [];
  const spanK = topC - footC;
  return [
    { times: ownS / otherS, extraS: ownS - otherS, ownS, spanK, middleC: (topC + footC) / 2 },
  ];
}

function fallTime(leg: RunLeg, facts: RunFacts, topC: number, footC: number): number | null {
  const fromS = firstCrossing(facts, spanOf(leg), topC, 'down');
  const toS = firstCrossing(facts, spanOf(leg), footC, 'down');
  return fromS === null || toS === null ? null : toS - fromS;
}

function levelsOff(leg: RunLeg, facts: RunFacts, rating: Rating): Finding | null {
  const { fit, from, to } = leg;
  if (!fit || to.turnedBy !== 'end') return null;
  const lastedS = to.timeS - from.timeS;
  if (lastedS < Math.max(SETTLED_S, fit.tauS)) return null;
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
  const slowed = knee.slopeAfterKPerS < 0.5 * knee.slopeBeforeKPerS;
  const level = fit.asymptoteC - to.tempC < LEVEL_K && to.tempC < highEndC;
  if (!inBand || !slowed || !level || to.timeS - knee.timeS < SETTLED_S) return null;
  return toFinding(leg, facts, { how: 'levels-off' });
}

function toFinding(leg: RunLeg, { roomC }: RunFacts, seen: Evidence): Finding {
  return {
    code: 'heat-stays-on',
    fromS: leg.from.timeS,
    toS: leg.to.timeS,
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
      roomC,
    },
  };
}
