import type { Mark, Series } from '../analysis/series.ts';
import { toCelsius } from '../units.ts';
import type { HandRun } from './replay-run.ts';

/** A run taken by hand as the engine takes it. */
export type RunToJudge = {
  /** From the first reading, °C. */
  series: Series;
  /** The same readings as typed, in the run's unit. */
  temps: Float64Array;
  /** From the first reading; what was marked before it stands at 0. */
  marks: Mark[];
  /** Seconds of the run at the first reading. */
  firstAtS: number;
};

/** @returns null where fewer than three readings stand: too few to judge */
export function seriesOfRun({ readings, marks, start }: HandRun): RunToJudge | null {
  const rising = readings.filter(({ atS }, i) => i === 0 || atS > readings[i - 1]!.atS);
  const [first] = rising;
  if (!first || rising.length < 3) return null;
  const temps = Float64Array.from(rising, ({ temp }) => temp);
  return {
    series: {
      timesS: Float64Array.from(rising, ({ atS }) => atS - first.atS),
      tempsC: temps.map((temp) => toCelsius(temp, start.unit)),
    },
    temps,
    marks: marks.map(({ atS, kind, text }) => ({
      timeS: Math.max(0, atS - first.atS),
      kind,
      ...(text !== null && { text }),
    })),
    firstAtS: first.atS,
  };
}
