import type { Point } from './analysis.ts';
import { correctSeries } from './correct-series.ts';
import { toPoint } from './find-points.ts';
import { prepareRecord } from './gather-facts.ts';
import type { Probe } from './rating.ts';
import type { Series } from './series.ts';

/** Peaks and valleys of a record, unjudged. */
export type TurnsOnly = {
  samples: number;
  durationS: number;
  spikes: number;
  gaps: { fromS: number; toS: number }[];
  noiseK: number;
  cutOuts: Point[];
  resets: Point[];
};

/**
 * Every peak (as cut-outs) and valley (as resets) whose two swings are complete, the first included; no calls.
 *
 * @throws {RangeError} the series is not one (see assertSeries)
 */
export function findTurnsOnly(series: Series, swingK: number, probe: Probe): TurnsOnly {
  const record = prepareRecord(correctSeries(series, probe), swingK);
  const points = record.extremes
    .filter(({ turnedBy }) => turnedBy === 'machine')
    .map((extreme) => toPoint(extreme, false, { rating: null, probe }, false));
  const { timesS } = series;
  return {
    samples: timesS.length,
    durationS: timesS.length > 0 ? timesS[timesS.length - 1]! - timesS[0]! : 0,
    spikes: record.spikes,
    gaps: record.gaps.map(({ fromS, toS }) => ({ fromS, toS })),
    noiseK: record.noiseK,
    cutOuts: points.filter(({ kind }) => kind === 'cut-out'),
    resets: points.filter(({ kind }) => kind === 'reset'),
  };
}
