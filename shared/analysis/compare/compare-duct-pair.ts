import type { Analysis, FindingCode } from '../analysis.ts';
import { compareRuns, type FigureDifference, type RunDifferences } from './run-figures.ts';

/** What a run with the duct off and one with it on say together. */
export type DuctPair = {
  verdict: 'house-duct' | 'same-both-ways' | 'cannot-tell';
  /** Which signs the duct brings, for `house-duct`. */
  signs: DuctSign[];
  /** Why it cannot be told; null where it can. */
  why: 'few-cycles' | 'near-the-limit' | 'other-way' | 'odd-without-duct' | null;
  /** For `same-both-ways`: the finding that both share; null where neither has a fault. */
  sharedFault: FindingCode | null;
  /** On less off. */
  differences: RunDifferences;
  /** First cut-out, s from the start, of the duct-off and the duct-on run; null where a run has none from cold. */
  firstCutOutS: { off: number; on: number } | null;
};

export type DuctSign = 'limit-bursts' | 'runs-hot' | 'more-overshoot' | 'short-heats';

/** Peaks or overshoots that differ by less than this are alike for a person with a thermometer, K (5 °F). */
const ALIKE_K = 5 / 1.8;
/** On-times within this share of each other are alike. */
const ALIKE_SHARE = 0.25;
/** A difference counts at this p-value: several are looked at. */
const LEAST_P = 0.01;

/** Codes that say that the exhaust got too hot or its heat was cut short. */
const HOT: FindingCode[] = ['runaway', 'opens-high'];
const UNNAMED: FindingCode[] = ['in-band', 'too-close', 'too-short', 'mixed'];

/**
 * Normal with the duct off, hot or short-cycling with it on: consistent with a restricted house vent. The same both
 * ways: with the machine's own. Else it cannot be told.
 *
 * Assumes one machine, heat setting and load, and nothing changed between the runs but the duct. Statistics: Welch's t
 * for a difference (p < 0.01, and beyond what a person would call alike); two one-sided tests at 2.5 % for alike (the
 * 95 % interval within the limits: D. J. Schuirmann, J. Pharmacokinet. Biopharm. 15 (1987), 657–680).
 *
 * @param off analysis of the run with the duct off
 * @param on analysis of the run with the duct on
 * @param probesErrorK standard error (k = 1) between two probes, K; 0 for the same one
 */
export function compareDuctPair(off: Analysis, on: Analysis, probesErrorK: number): DuctPair {
  const differences = compareRuns(off, on, probesErrorK);
  const signs = signsOf(off, on, differences);
  const pair = { signs, differences, firstCutOutS: firstCutOuts(off, on), sharedFault: null };
  const shared = sharedFault(off, on);
  if (shared)
    return { ...pair, verdict: 'same-both-ways', why: null, signs: [], sharedFault: shared };
  if (!isNormal(off))
    return { ...pair, verdict: 'cannot-tell', why: 'odd-without-duct', signs: [] };
  if (signs.length > 0) return { ...pair, verdict: 'house-duct', why: null };
  if (!differences.cutOuts || !differences.onTimes)
    return { ...pair, verdict: 'cannot-tell', why: 'few-cycles' };
  if (isAlike(differences)) return { ...pair, verdict: 'same-both-ways', why: null };
  const otherWay = isLess(differences.cutOuts, ALIKE_K) || isLongerOn(differences.onTimes);
  return { ...pair, verdict: 'cannot-tell', why: otherWay ? 'other-way' : 'near-the-limit' };
}

function signsOf(off: Analysis, on: Analysis, differences: RunDifferences): DuctSign[] {
  const { cutOuts, overshoots, onTimes } = differences;
  const signs: DuctSign[] = [];
  // Where a limit cuts, peaks and overshoots are not the thermostat's.
  if (has(on, ['limit-cycling']) && !has(off, ['limit-cycling']))
    return isShorterOn(onTimes) ? ['limit-bursts', 'short-heats'] : ['limit-bursts'];
  const hot = has(on, HOT) && !has(off, HOT);
  if (hot || isMore(cutOuts, ALIKE_K)) signs.push('runs-hot');
  if (isMore(overshoots, ALIKE_K)) signs.push('more-overshoot');
  if (isShorterOn(onTimes)) signs.push('short-heats');
  return signs;
}

function has({ findings }: Analysis, codes: FindingCode[]): boolean {
  return findings.some(({ code }) => codes.includes(code));
}

/** No fault with a name: a run that proves nothing either way may still be set beside another. */
function isNormal({ findings, cutOuts }: Analysis): boolean {
  return cutOuts.length > 0 && findings.every(({ code }) => UNNAMED.includes(code));
}

/** The first fault with a name that both runs show; a fault in one alone is not shared. */
function sharedFault(off: Analysis, on: Analysis): FindingCode | null {
  const named = off.findings.map(({ code }) => code).filter((code) => !UNNAMED.includes(code));
  return named.find((code) => has(on, [code])) ?? null;
}

function isMore(figure: FigureDifference | null, byK: number): boolean {
  return figure !== null && figure.pValue < LEAST_P && figure.difference > byK;
}

function isLess(figure: FigureDifference | null, byK: number): boolean {
  return figure !== null && figure.pValue < LEAST_P && figure.difference < -byK;
}

function isShorterOn(onTimes: FigureDifference | null): boolean {
  return onTimes !== null && isLess(onTimes, ALIKE_SHARE * onTimes.first.mean);
}

function isLongerOn(onTimes: FigureDifference): boolean {
  return isMore(onTimes, ALIKE_SHARE * onTimes.first.mean);
}

function isAlike({ cutOuts, onTimes }: RunDifferences): boolean {
  if (!cutOuts || !onTimes) return false;
  return liesWithin(cutOuts, ALIKE_K) && liesWithin(onTimes, ALIKE_SHARE * onTimes.first.mean);
}

function liesWithin({ difference, within }: FigureDifference, limit: number): boolean {
  return Math.abs(difference) + within < limit;
}

/** From cold the first cut-out is shown but not judged; only then does its time say how quick the heat came. */
function firstCutOuts(off: Analysis, on: Analysis): DuctPair['firstCutOutS'] {
  const [first, second] = [off.cutOuts[0], on.cutOuts[0]];
  if (!first || !second || first.judged || second.judged) return null;
  return { off: first.timeS, on: second.timeS };
}
