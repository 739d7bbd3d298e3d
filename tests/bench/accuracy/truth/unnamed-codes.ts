import type { FindingCode } from '#shared/analysis/analysis.ts';
import { bandOf } from '#shared/analysis/judge-point.ts';
import type { Rating } from '#shared/analysis/rating.ts';
import { all, any, not, over, type How } from './how.ts';
import { beyond } from './thermostat-signs.ts';
import { mean, type TruePoint, type TruePoints } from './true-points.ts';

const MODEL_K = 0.2 / 1.8;

/** What may be said where no finding with a name holds: one where it is clear, more where the truth lies near a limit. */
export function unnamedCodes(points: TruePoints, rating: Rating): FindingCode[] {
  if (points.allCutOuts.length < 2 || points.resets.length < 1) return ['too-short'];
  const outside = any(
    outsideOf('cut-out', points.cutOuts, points, rating),
    outsideOf('reset', points.resets, points, rating),
  );
  if (outside === 'certain') return ['mixed'];
  const inBand = all(
    not(outside),
    liesIn('cut-out', points.cutOuts, points, rating),
    liesIn('reset', points.resets, points, rating),
  );
  const codes: FindingCode[] = [];
  if (outside === 'possible') codes.push('mixed');
  if (inBand !== 'certain') codes.push('too-close');
  if (inBand !== 'no') codes.push('in-band');
  return codes;
}

/** One point surely outside, or one that may be. */
function outsideOf(
  kind: 'cut-out' | 'reset',
  judged: TruePoint[],
  { pointUK, probeUK }: TruePoints,
  rating: Rating,
): How {
  const { lowEndC, highEndC } = bandOf(kind, rating);
  const isBeyond = beyond(probeUK, 1.3 * pointUK);
  return any(...judged.map(({ tempC }) => isBeyond(Math.max(tempC - highEndC, lowEndC - tempC))));
}

/** The mean in its band with 95 % as to the readings, or every point inside by itself or by its switch instant. */
function liesIn(
  kind: 'cut-out' | 'reset',
  judged: TruePoint[],
  points: TruePoints,
  rating: Rating,
): How {
  const { lowC, highC } = bandOf(kind, rating);
  const within = (tempC: number) => Math.min(tempC - lowC, highC - tempC);
  const meanUK = points.pointUK / Math.sqrt(judged.length);
  const byMean = over(
    within(mean(judged.map(({ tempC }) => tempC))) - 0.82 * meanUK,
    MODEL_K + meanUK,
  );
  return any(byMean, all(...judged.map((point) => isInside(kind, point, points, rating))));
}

function isInside(
  kind: 'cut-out' | 'reset',
  { tempC, switchTempC }: TruePoint,
  { pointUK, probeUK }: TruePoints,
  rating: Rating,
): How {
  const { lowC, highC, lowEndC, highEndC } = bandOf(kind, rating);
  const within = (valueC: number) => Math.min(valueC - lowC, highC - valueC);
  const byPoint = over(within(tempC) - Math.hypot(probeUK, pointUK), MODEL_K + pointUK);
  const switchUK = Math.hypot(probeUK, 2 * pointUK);
  const settles = all(
    over((highC - lowC) / 4 - switchUK, MODEL_K + pointUK),
    over(within(switchTempC) - switchUK, 2 * MODEL_K + 2 * pointUK),
    over(Math.min(tempC - lowEndC, highEndC - tempC), MODEL_K + pointUK),
  );
  // A record need not show the switches.
  return any(
    byPoint,
    settles === 'certain' && switchUK > 0.5 * ((highC - lowC) / 4) ? 'possible' : settles,
  );
}
