import type { FindingCode } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';
import { fromCelsius } from '#shared/units.ts';
import type { FoundTurn } from './match-turns.ts';

/**
 * The thing to beat: a moving average of 5 s, peaks and valleys by prominence, and plain thresholds on them. It is what
 * a general-purpose peak finder with a page of rules would say.
 */
export function findPeaksPlainly({ timesS, tempsC }: Series): FoundTurn[] {
  const smoothC = movingAverage(timesS, tempsC, 2.5);
  const found: FoundTurn[] = [];
  let low = 0;
  let high = 0;
  let direction = 0;
  smoothC.forEach((tempC, i) => {
    if (tempC > smoothC[high]!) high = i;
    if (tempC < smoothC[low]!) low = i;
    if (direction >= 0 && smoothC[high]! - tempC >= 4 / 1.8) {
      if (direction === 1)
        found.push({ kind: 'cut-out', timeS: timesS[high]!, tempC: smoothC[high]! });
      direction = -1;
      low = i;
    } else if (direction <= 0 && tempC - smoothC[low]! >= 4 / 1.8) {
      if (direction === -1 && found.length > 0)
        found.push({ kind: 'reset', timeS: timesS[low]!, tempC: smoothC[low]! });
      direction = 1;
      high = i;
    }
  });
  return found;
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

/** A headline by plain thresholds on the peaks, °F, for the default rating. */
export function judgePlainly(series: Series, turns: FoundTurn[]): FindingCode {
  const tempsF = Array.from(series.tempsC, (tempC) => fromCelsius(tempC, 'F'));
  const of = (kind: FoundTurn['kind']) =>
    turns.filter((turn) => turn.kind === kind).map(({ tempC }) => fromCelsius(tempC, 'F'));
  const cutOuts = of('cut-out');
  const resets = of('reset');
  const highest = Math.max(...tempsF);
  if (highest > 177) return 'runaway';
  if (highest - (tempsF[0] ?? 0) < 15) return 'no-heat';
  if (cutOuts.length === 0)
    return highest < 150 && series.timesS.length > 500 ? 'below-cut-out' : 'too-short';
  if ((tempsF.at(-1) ?? 0) < 100) return 'heat-lost';
  const meanOf = (values: number[]) =>
    values.reduce((sum, value) => sum + value, 0) / values.length;
  const spread = Math.max(...cutOuts) - Math.min(...cutOuts);
  if (cutOuts.length > 8 && meanOf(cutOuts) < 145) return 'limit-cycling';
  if (spread > 12) return 'scattered';
  if (meanOf(cutOuts) > 165) return 'opens-high';
  if (meanOf(cutOuts) < 150) return 'opens-low';
  if (resets.length > 0 && meanOf(resets) > 135) return 'closes-high';
  if (resets.length > 0 && meanOf(resets) < 120) return 'closes-low';
  return cutOuts.length >= 2 && resets.length >= 1 ? 'in-band' : 'too-short';
}
