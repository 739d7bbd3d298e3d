import type { Finding } from '../analysis.ts';
import { firstAtOrAfter } from '../first-at-or-after.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { Extreme, RunFacts, RunLeg } from '../run-facts.ts';
import { firstCrossing, marksWithin, spanOf, temperatureAt, totalU } from './trace.ts';

/** A leg must pass cut-outs that the machine makes up there by itself by this much to be another thing, K (3 °F). */
const BEYOND_OWN_K = 3 / 1.8;
/** A record this coarse is one of single readings, and two of them up there are no noise, s. */
const COARSE_S = 5;
/** Within this of its asymptote a leg has levelled off, K (2 °F). */
const LEVEL_K = 2 / 1.8;

/**
 * Heat goes on with no cut-out until the exhaust is above the opens band and its allowance.
 *
 * Assumes that a sound thermostat, whose air may run ahead of it by the allowance, has cut out by then; that a peak
 * between band and allowance is overshoot (common practice: near 165 °F for a thermostat of 155).
 *
 * Evidence: aboveFromS, aboveForS (above the band), aboveC (where band and allowance end), peakC, highLimitC,
 * limitAtS, ended (by-hand, levels-off, record-ends, by-itself), afterTrip, clickAtS, clickC, kneeAtS, cutOutsBefore,
 * asymptoteC, asymptoteUK.
 */
export function findRunaway(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  if (!rating) return null;
  const upThere = cutOutsUpThere(facts, bandOf('cut-out', rating).highEndC);
  const leg = facts.legs.find((candidate) => runsAway(candidate, upThere, facts, rating));
  return leg ? toFinding(leg, facts, rating) : null;
}

function runsAway(leg: RunLeg, upThere: Extreme[], facts: RunFacts, rating: Rating): boolean {
  const { to } = leg;
  if (leg.kind !== 'heating') return false;
  const { highEndC } = bandOf('cut-out', rating);
  if (to.tempC >= rating.highLimitC) return true;
  const uK = Math.min(totalU(facts, to), totalU(facts, { ...to, uK: 2 * facts.noiseK }));
  const reachedC = Math.min(to.tempC, highestShown(leg, facts));
  const isAbove = reachedC - uK > highEndC || staysAbove(leg, facts, highEndC);
  if (!isAbove) return reachedC > highEndC && keptComing(leg, reachedC - uK, facts, rating);
  if (to.turnedBy === 'machine') return upThere.every((own) => own === to) && !comesBack(facts, to);
  const highestC = upThere.reduce((high, { tempC }) => Math.max(high, tempC), -Infinity);
  return to.tempC > highestC + BEYOND_OWN_K + uK;
}

/**
 * The thermostat was seen to open in its band, and the heat went on for certain beyond it until a person or the record
 * ended it: two signs, so that the best estimate up there need not be known beyond its uncertainty.
 */
function keptComing(leg: RunLeg, lowestC: number, facts: RunFacts, rating: Rating): boolean {
  if (leg.to.turnedBy === 'machine' || lowestC <= bandOf('cut-out', rating).highC) return false;
  return clickInBand(leg, facts, rating) !== undefined || kneeInBand(leg, facts, rating) !== null;
}

/** The highest that the smoothed record shows in a leg, with its noise, °C: where a fit alone goes higher, it errs. */
function highestShown(leg: RunLeg, { binned }: RunFacts): number {
  const { timesS, smoothC, smoothNoiseK } = binned;
  const { fromS, toS } = spanOf(leg);
  let highestC = -Infinity;
  for (let i = firstAtOrAfter(timesS, fromS); i < timesS.length && timesS[i]! <= toS; i++) {
    highestC = Math.max(highestC, smoothC[i]!);
  }
  return highestC + 2 * smoothNoiseK;
}

/** By hand a peak may be badly located while the readings themselves leave no doubt. */
function staysAbove(leg: RunLeg, facts: RunFacts, highEndC: number): boolean {
  const { timesS, tempsC } = facts.series;
  if (facts.spacingS < COARSE_S) return false;
  const sureC = highEndC + totalU(facts, { uK: facts.roundingK, tempC: highEndC });
  const { fromS, toS } = spanOf(leg);
  let above = 0;
  for (let i = firstAtOrAfter(timesS, fromS); i < timesS.length && timesS[i]! <= toS; i++) {
    if (timesS[i]! > fromS && tempsC[i]! > sureC) above++;
  }
  return above >= 2;
}

/** Where the machine cut out by itself above band and allowance: hot, but it does cut out. */
function cutOutsUpThere({ extremes }: RunFacts, highEndC: number): Extreme[] {
  return extremes.filter(
    ({ kind, turnedBy, tempC }) => kind === 'peak' && turnedBy === 'machine' && tempC > highEndC,
  );
}

function comesBack({ extremes }: RunFacts, peak: Extreme): boolean {
  return extremes.some(
    ({ kind, turnedBy, timeS }) =>
      kind === 'valley' && turnedBy === 'machine' && timeS > peak.timeS,
  );
}

function toFinding(leg: RunLeg, facts: RunFacts, rating: Rating): Finding {
  const { highC, highEndC } = bandOf('cut-out', rating);
  const toS = leg.to.timeS;
  const aboveFromS = firstCrossing(facts, spanOf(leg), highC, 'up') ?? leg.from.timeS;
  const reaches = leg.to.tempC >= rating.highLimitC;
  const click = clickInBand(leg, facts, rating);
  const knee = kneeInBand(leg, facts, rating);
  const cutOutsBefore = facts.cutOuts.filter(({ timeS }) => timeS < toS).length;
  return {
    code: 'runaway',
    fromS: aboveFromS,
    toS,
    evidence: {
      aboveFromS,
      aboveForS: toS - aboveFromS,
      aboveC: highEndC,
      peakC: leg.to.tempC,
      highLimitC: rating.highLimitC,
      limitAtS: reaches ? firstCrossing(facts, spanOf(leg), rating.highLimitC, 'up') : null,
      ended: howEnded(leg, facts),
      afterTrip: isAfterTrip({ earlier: cutOutsBefore > 0, click, knee, facts }),
      clickAtS: click?.timeS ?? null,
      clickC: click ? temperatureAt(facts, click.timeS) : null,
      kneeAtS: knee?.timeS ?? null,
      cutOutsBefore,
      asymptoteC: leg.fit?.asymptoteC ?? null,
      asymptoteUK: leg.fit ? 2 * leg.fit.asymptoteErrorK : null,
    },
  };
}

function clickInBand(leg: RunLeg, facts: RunFacts, rating: Rating) {
  return marksWithin(facts, spanOf(leg), ['click']).find(({ timeS }) => {
    const tempC = temperatureAt(facts, timeS);
    return tempC !== null && liesInBand(tempC, totalU(facts, leg.to) + facts.noiseK, rating);
  });
}

/** A knee tells of a thermostat that opened only where the exhaust slowed down at it. */
function kneeInBand({ knee, to, hasGap }: RunLeg, facts: RunFacts, rating: Rating) {
  if (!knee || hasGap || knee.slopeAfterKPerS >= knee.slopeBeforeKPerS) return null;
  return liesInBand(knee.tempC, totalU(facts, to), rating) ? knee : null;
}

function liesInBand(tempC: number, uK: number, rating: Rating): boolean {
  const { lowC, highC } = bandOf('cut-out', rating);
  return tempC + uK >= lowC && tempC - uK <= highC;
}

/** Whether the thermostat had opened: true, false where somebody listened for clicks and heard none, else unknown. */
function isAfterTrip(seen: {
  earlier: boolean;
  click: unknown;
  knee: unknown;
  facts: RunFacts;
}): boolean | null {
  if (seen.earlier || seen.click || seen.knee) return true;
  return seen.facts.input.marks.some(({ kind }) => kind === 'click') ? false : null;
}

function howEnded(leg: RunLeg, facts: RunFacts): string {
  if (leg.to.turnedBy === 'end') {
    const level = leg.fit !== null && leg.fit.asymptoteC - leg.to.tempC < LEVEL_K;
    return level ? 'levels-off' : 'record-ends';
  }
  const off = marksWithin(facts, spanOf(leg), ['heat-off', 'stopped', 'door']);
  return leg.to.turnedBy === 'person' || off.length > 0 ? 'by-hand' : 'by-itself';
}
