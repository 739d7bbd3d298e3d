import type { AnalysisInput, FindingCode } from '#shared/analysis/analysis.ts';
import { bandOf } from '#shared/analysis/judge-point.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Series } from '#shared/analysis/series.ts';
import { middle } from './truth/true-points.ts';
import type { FoundTurn } from './match-turns.ts';

/** Half the width of the moving average, s, and the prominence asked for, K: the best of those tried on seeds 1 and 2. */
export const PLAIN_SETTINGS = { halfWidthS: 2.5, prominenceK: 4 / 1.8 };

/**
 * The thing to beat: a median of three against wild readings, a moving average, peaks and valleys by prominence. It is
 * what a general-purpose peak finder with a page of rules would do.
 */
export function findPeaksPlainly(
  { timesS, tempsC }: Series,
  { halfWidthS, prominenceK } = PLAIN_SETTINGS,
): FoundTurn[] {
  // Between readings that far apart a median or a mean would only flatten the turns.
  const isFine = (timesS[1] ?? 0) - (timesS[0] ?? 0) < halfWidthS;
  const smoothC = isFine ? movingAverage(timesS, medianOfThree(tempsC), halfWidthS) : tempsC;
  const found: FoundTurn[] = [];
  let low = 0;
  let high = 0;
  let direction = 0;
  smoothC.forEach((tempC, i) => {
    if (tempC > smoothC[high]!) high = i;
    if (tempC < smoothC[low]!) low = i;
    if (direction >= 0 && smoothC[high]! - tempC >= prominenceK) {
      if (direction === 1)
        found.push({ kind: 'cut-out', timeS: timesS[high]!, tempC: smoothC[high]! });
      direction = -1;
      low = i;
    } else if (direction <= 0 && tempC - smoothC[low]! >= prominenceK) {
      if (direction === -1 && found.length > 0)
        found.push({ kind: 'reset', timeS: timesS[low]!, tempC: smoothC[low]! });
      direction = 1;
      high = i;
    }
  });
  return found;
}

function medianOfThree(tempsC: Float64Array): Float64Array {
  return tempsC.map((tempC, i) => {
    const before = tempsC[i - 1] ?? tempC;
    const after = tempsC[i + 1] ?? tempC;
    return Math.max(Math.min(before, tempC), Math.min(Math.max(before, tempC), after));
  });
}

function movingAverage(timesS: Float64Array, tempsC: Float64Array, halfS: number): Float64Array {
  let from = 0;
  let to = 0;
  let sum = 0;
  return timesS.map((timeS) => {
    while (to < timesS.length && timesS[to]! <= timeS + halfS) sum += tempsC[to++]!;
    while (timesS[from]! < timeS - halfS) sum -= tempsC[from++]!;
    return sum / (to - from);
  });
}

const K_PER_F = 1 / 1.8;

/** A headline by plain thresholds on the peaks and the rating. */
export function judgePlainly(
  series: Series,
  turns: FoundTurn[],
  input: AnalysisInput,
): FindingCode {
  const rating = input.rating ?? DEFAULT_RATING;
  const opens = bandOf('cut-out', rating);
  const closes = bandOf('reset', rating);
  const of = (kind: FoundTurn['kind']) =>
    turns.filter((turn) => turn.kind === kind).map(({ tempC }) => tempC);
  const cutOuts = of('cut-out');
  const resets = of('reset');
  const seconds = series.timesS.at(-1) ?? 0;
  const smoothC = medianOfThree(series.tempsC);
  const highestC = smoothC.reduce((high, tempC) => Math.max(high, tempC), -Infinity);
  const lastC = smoothC.at(-1) ?? 0;
  if (highestC > opens.highEndC + 3 * K_PER_F && highestC > Math.max(...cutOuts.slice(0, -1)) + 3)
    return 'runaway';
  if (seconds > 300 && highestC - (smoothC[0] ?? 0) < 15 * K_PER_F) return 'no-heat';
  if (cutOuts.length > 0 && lastC < closes.lowEndC - 5 * K_PER_F) return 'heat-lost';
  if (cutOuts.length === 0)
    return highestC < opens.lowC && seconds > 600 ? 'below-cut-out' : 'too-short';
  return judgeTurns(cutOuts.length > 1 ? cutOuts.slice(1) : cutOuts, resets, rating);
}

function judgeTurns(
  cutOuts: number[],
  resets: number[],
  rating: typeof DEFAULT_RATING,
): FindingCode {
  const opens = bandOf('cut-out', rating);
  const closes = bandOf('reset', rating);
  const opensC = meanOf(cutOuts);
  const swingK = opensC - (resets.length > 0 ? middle(resets) : -Infinity);
  if (cutOuts.length > 3 && opensC < opens.lowC && swingK < 0.7 * (rating.opensC - rating.closesC))
    return 'limit-cycling';
  const change = cutOuts.length > 3 ? cutOuts.at(-1)! - cutOuts[0]! : 0;
  if (Math.abs(change) > rating.opensTolK) return 'drifting';
  if (Math.max(...cutOuts) - Math.min(...cutOuts) > 12 * K_PER_F) return 'scattered';
  if (opensC > opens.highEndC) return 'opens-high';
  if (opensC < opens.lowEndC) return 'opens-low';
  if (resets.length > 0 && meanOf(resets) > closes.highEndC) return 'closes-high';
  if (resets.length > 0 && meanOf(resets) < closes.lowEndC) return 'closes-low';
  if (cutOuts.length < 1 || resets.length < 1) return 'too-short';
  const inside = opensC < opens.highC && meanOf(resets) > closes.lowC;
  return inside ? 'in-band' : 'too-close';
}

function meanOf(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
