import type { Call } from './analysis.ts';
import { correctionErrorAt } from './correct-series.ts';
import type { Probe, Rating } from './rating.ts';
import { normalProbability, probabilityBetween } from './statistics/normal-probability.ts';

/**
 * Expanded uncertainty (k = 2) of a point with the probe's part: accuracy ±a rectangular, so a/√3, the
 * expanded uncertainty of its calibration, and that of the correction there (JCGM 100:2008, 4.3.7, 5.1.2, H.3.4).
 *
 * @param uK expanded uncertainty from noise, sampling, rounding and fit, K
 * @param tempC where on the scale the point lies, °C
 */
export function totalUncertainty(uK: number, probe: Probe, tempC: number): number {
  const { accuracyK, calibrationUK, correction } = probe;
  const correctionErrorK = correction ? correctionErrorAt(correction, tempC) : 0;
  const accuracyErrorK = accuracyK / Math.sqrt(3);
  return 2 * Math.hypot(uK / 2, accuracyErrorK, calibrationUK / 2, correctionErrorK);
}

/** What a point is judged by. */
export type PointToJudge = {
  kind: 'cut-out' | 'reset';
  tempC: number;
  /** Expanded uncertainty with the probe's part, K. */
  uTotalK: number;
  /** Temperature at the switch instant, °C, and its own expanded uncertainty with the probe's part, K. */
  switchTempC: number | null;
  switchUTotalK: number | null;
};

/**
 * The call of one judged point, guarded both ways with U = uTotal (JCGM 106:2012, 8.3.2 and 8.3.3).
 *
 * A reset is a cut-out seen upside down: its allowance lies below the band.
 */
export function callPoint(point: PointToJudge, rating: Rating): Call {
  const { tempC, uTotalK } = point;
  const { lowC, highC, lowEndC, highEndC } = bandOf(point.kind, rating);
  if (tempC - uTotalK >= lowC && tempC + uTotalK <= highC) return 'inside';
  if (tempC - uTotalK > highEndC || tempC + uTotalK < lowEndC) return 'outside';
  const withinEnds = tempC >= lowEndC && tempC <= highEndC;
  if (withinEnds && switchSettles(point, rating)) return 'inside';
  const aboveBand = tempC - uTotalK >= highC && tempC + uTotalK <= highEndC;
  const belowBand = tempC + uTotalK <= lowC && tempC - uTotalK >= lowEndC;
  const hasAllowance = point.kind === 'cut-out' ? aboveBand : belowBand;
  return hasAllowance ? 'within-allowance' : 'too-close';
}

/** Probability that the true value lies in the rated band, allowance left out. */
export function bandProbability(
  { kind, tempC, uTotalK }: Pick<PointToJudge, 'kind' | 'tempC' | 'uTotalK'>,
  rating: Rating,
): number {
  const { lowC, highC } = bandOf(kind, rating);
  return probabilityBetween(tempC, uTotalK / 2, lowC, highC);
}

/** The band of a kind of point, and where its allowance ends (the band's own edge on the side without one), °C. */
export function bandOf(kind: 'cut-out' | 'reset', rating: Rating) {
  if (kind === 'cut-out') {
    const lowC = rating.opensC - rating.opensTolK;
    const highC = rating.opensC + rating.opensTolK;
    return { lowC, highC, lowEndC: lowC, highEndC: highC + rating.overshootK };
  }
  const lowC = rating.closesC - rating.closesTolK;
  const highC = rating.closesC + rating.closesTolK;
  return { lowC, highC, lowEndC: lowC - rating.undershootK, highEndC: highC };
}

/** Whether the switch instant, known to better than half the tolerance, lies in the band with its uncertainty. */
function switchSettles(
  { kind, switchTempC, switchUTotalK }: PointToJudge,
  rating: Rating,
): boolean {
  if (switchTempC === null || switchUTotalK === null) return false;
  const { lowC, highC } = bandOf(kind, rating);
  if (switchUTotalK >= (highC - lowC) / 4) return false;
  return switchTempC - switchUTotalK >= lowC && switchTempC + switchUTotalK <= highC;
}

/** Probability that the true value lies above a limit: for one-sided decisions (JCGM 106:2012, 7.3). */
export function probabilityAbove(tempC: number, uTotalK: number, limitC: number): number {
  if (!(uTotalK > 0)) return tempC > limitC ? 1 : 0;
  return normalProbability((tempC - limitC) / (uTotalK / 2));
}
