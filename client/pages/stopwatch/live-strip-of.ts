import type { MarkKind } from '#shared/analysis/series.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import { celsiusOf } from '#shared/recorder/celsius-of.ts';
import { traceGaps } from '#shared/recorder/probe-gap.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { LiveStrip } from '../../chart/draw-live.ts';
import type { HotSpan, PenMark } from '../../chart/strip.ts';
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
    marks: marksOf(run),
    wallAtS,
  };
}

/** What the person marked, and where the guard first said to cut the heat, in order of time. */
function marksOf({ marks, guard }: HandRun): PenMark[] {
  const told = marks.map(({ atS, kind, text }): PenMark => ({
    timeS: atS,
    word: kind === 'note' && text ? text : SHORT_WORDS[kind],
    isStop: false,
  }));
  const cut = guard.find(({ says }) => says === 'cut-heat');
  if (cut) told.push({ timeS: cut.atS, word: 'cut the heat', isStop: true });
  return told.sort((a, b) => a.timeS - b.timeS);
}

/** Shorter than on a finished strip: a minute is as wide as a finger. */
const SHORT_WORDS: Record<MarkKind, string> = {
  click: 'click',
  'heat-off': 'heat off',
  'heat-on': 'heat on',
  'flame-on': 'flame',
  stopped: 'stopped',
  door: 'door',
  'duct-off': 'duct off',
  note: 'note',
};

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
