import type { AnalysisInput } from './analysis.ts';
import { binRecord } from './bin-record.ts';
import { classifyTurns } from './classify-turns.ts';
import { correctSeries } from './correct-series.ts';
import { despike } from './despike.ts';
import { estimateNoise } from './estimate-noise.ts';
import { findCycles } from './find-cycles.ts';
import { findGaps, usualSpacing } from './find-gaps.ts';
import { findLegs } from './find-legs.ts';
import { findPoints } from './find-points.ts';
import { findRoom, isColdStart } from './find-room.ts';
import { findTurningPoints } from './find-turning-points.ts';
import { isProbeTooSlow } from './is-probe-too-slow.ts';
import type { RunFacts } from './run-facts.ts';
import { assertSeries, type Series } from './series.ts';

/** Deviations of the smoothed record that a swing must reach to stand out from noise. */
const LEAST_SWING_DEVIATIONS = 5;

/** A record cleaned, with its extremes located; what `findTurnsOnly` needs too. */
export function prepareRecord(raw: Series, askedSwingK: number) {
  assertSeries(raw);
  const { noiseK, roundingK } = estimateNoise(raw);
  const { series, spikes } = despike(raw, noiseK);
  const spacingS = usualSpacing(series.timesS);
  const view = binRecord(series, spacingS, noiseK, askedSwingK);
  const swingK = Math.max(askedSwingK, LEAST_SWING_DEVIATIONS * view.smoothNoiseK);
  const extremes = findTurningPoints(series, view, { noiseK, roundingK }, swingK);
  const gaps = findGaps(series.timesS, spacingS);
  return { series, spikes, spacingS, noiseK, roundingK, view, swingK, extremes, gaps };
}

/**
 * Everything that findings rest on, from the readings alone.
 *
 * @throws {RangeError} the series is not one (see assertSeries)
 */
export function gatherFacts(raw: Series, input: AnalysisInput): RunFacts {
  const { view, ...record } = prepareRecord(correctSeries(raw, input.probe), input.swingK);
  const { series, gaps, spacingS, noiseK } = record;
  const { rating } = input;
  const extremes = classifyTurns(record.extremes, input.marks, rating, spacingS);
  const legs = findLegs(view, extremes, gaps, rating, noiseK);
  const coldStart = isColdStart(extremes, 0, rating);
  const probeTooSlow = isProbeTooSlow(input.probe, legs);
  return {
    input,
    ...record,
    binned: view,
    durationS: raw.timesS.length > 0 ? raw.timesS[raw.timesS.length - 1]! - raw.timesS[0]! : 0,
    extremes,
    legs,
    coldStart,
    roomC: findRoom(series, input.roomC, coldStart),
    cycles: findCycles(extremes),
    ...findPoints(extremes, input, !probeTooSlow),
    probeTooSlow,
  };
}
