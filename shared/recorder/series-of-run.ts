import type { Mark, Series } from '../analysis/series.ts';
import type { DisplayUnit } from '../units.ts';
import { celsiusOf } from './celsius-of.ts';
import type { HandReading, HandRun } from './replay-run.ts';

/** A run taken by hand as the engine takes it. */
export type RunToJudge = {
  /** From the first reading, °C. */
  series: Series;
  /** The same readings as typed or measured, in `unit`. */
  temps: Float64Array;
  /** The run's; the probe's, where one that speaks another took every reading. */
  unit: DisplayUnit;
  /** From the first reading; what was marked before it stands at 0. */
  marks: Mark[];
  /** Seconds of the run at the first reading. */
  firstAtS: number;
  /** When the first reading was taken, by the phone's clock, ms since 1970: the run's begin, and what its probe's calibration is held against. */
  startedAtMs: number;
};

/** @returns null where fewer than three readings stand: too few to judge */
export function seriesOfRun({ readings, marks, start }: HandRun): RunToJudge | null {
  const rising = readings.filter(({ atS }, i) => i === 0 || atS > readings[i - 1]!.atS);
  const [first] = rising;
  if (!first || rising.length < 3) return null;
  const unit = isOfOneProbe(rising) ? rising[0]!.measured.unit : start.unit;
  return {
    series: {
      timesS: Float64Array.from(rising, ({ atS }) => atS - first.atS),
      tempsC: Float64Array.from(rising, (reading) => celsiusOf(reading, start.unit)),
    },
    temps: Float64Array.from(rising, ({ temp, measured }) =>
      measured?.unit === unit ? measured.temp : temp,
    ),
    unit,
    marks: marks.map(({ atS, kind, text }) => ({
      timeS: Math.max(0, atS - first.atS),
      kind,
      ...(text !== null && { text }),
    })),
    firstAtS: first.atS,
    startedAtMs: Math.round(start.wallMs + first.atS * 1000),
  };
}

type MeasuredReading = HandReading & { measured: NonNullable<HandReading['measured']> };

function isOfOneProbe(
  readings: HandReading[],
): readings is [MeasuredReading, ...MeasuredReading[]] {
  const [first] = readings;
  return readings.every(({ measured }) => measured && measured.unit === first?.measured?.unit);
}
