import { specifiedFor } from '#shared/judging/specified-for.ts';
import { celsiusOf } from '#shared/recorder/celsius-of.ts';
import { traceGaps } from '#shared/recorder/probe-gap.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { LiveStrip } from '../../chart/draw-live.ts';
import type { HotSpan } from '../../chart/strip.ts';
import type { StopwatchMachine } from './sources.ts';

/**
 * The run as it stands on the paper right now.
 *
 * @param wallAtS when it reaches the high limit, where the guard is uneasy; null else
 */
export function liveStripOf(
  run: HandRun,
  wallAtS: number | null,
  machine: StopwatchMachine,
): LiveStrip {
  const { readings, start } = run;
  return {
    bands: specifiedFor(machine, start.setup.setting),
    points: [],
    hotSpans: hotSpans(run),
    gaps: traceGaps(run),
    timesS: Float64Array.from(readings, ({ atS }) => atS),
    tempsC: Float64Array.from(readings, (reading) => celsiusOf(reading, start.unit)),
    wallAtS,
  };
}

/** From where the guard began to be uneasy until it was quiet again, or the last reading. */
function hotSpans({ guard, readings }: HandRun): HotSpan[] {
  const spans: HotSpan[] = [];
  let fromS: number | null = null;
  for (const { atS, says } of guard) {
    if (says !== 'quiet') fromS ??= atS;
    else if (fromS !== null) {
      spans.push({ fromS, toS: atS, words: [], traceIsHot: false });
      fromS = null;
    }
  }
  const lastS = readings.at(-1)?.atS ?? 0;
  if (fromS !== null && lastS > fromS) {
    spans.push({ fromS, toS: lastS, words: [], traceIsHot: false });
  }
  return spans;
}
