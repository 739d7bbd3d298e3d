import type { Analysis, Call, FindingCode, Outcome } from '#shared/analysis/analysis.ts';
import { correctSeries } from '#shared/analysis/correct-series.ts';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Series } from '#shared/analysis/series.ts';
import type { LogReading } from '#shared/reading/log-reading.ts';
import type { TemperatureUnit } from '#shared/units.ts';
import { judgingOfSpan, type Judging } from '#shared/judging/judging.ts';
import { packSamples } from './pack-samples.ts';
import { roomOf } from '#shared/reading/room-of.ts';
import { sparkPoints } from './spark-points.ts';

/** A part of a record that becomes a run, s from the record's first reading. */
export type Span = { fromS: number; toS: number; label: string };

/** A result as it is stored: its JSON text, and what lists ask for. */
export type Judged = {
  version: string;
  outcome: Outcome;
  headline: FindingCode;
  calls: Call[];
  resultJson: string;
};

export type ImportedRun = Span & {
  samples: number;
  durationS: number;
  spark: [number, number][];
  /** Times, the run's temperatures, further channels; each packed in chunks. */
  packed: Uint8Array[][];
  judged: Judged;
};

/** How the file was read: kept with each run, told on its page. */
export type ReadingNotes = Pick<
  LogReading,
  'skippedRows' | 'skippedCount' | 'warnings' | 'clock' | 'startedAt' | 'encoding'
>;

export type ImportedLog = {
  resultHash: string;
  channel: string;
  channelUnit: TemperatureUnit;
  channels: { name: string; unit: TemperatureUnit }[];
  notes: ReadingNotes;
  runs: ImportedRun[];
};

/** At most this many calls are kept for lists; a run of a week has thousands. */
const LISTED_CALLS = 120;
const LEAST_READINGS = 3;

/**
 * Each span of a log as a run of its own: its times from 0, its readings as recorded, judged by itself.
 *
 * @throws {EmptySpanError} a span holds fewer than three readings
 */
export function importLog(reading: LogReading, spans: Span[], judging: Judging): ImportedLog {
  const { skippedRows, skippedCount, warnings, clock, startedAt, encoding } = reading;
  return {
    resultHash: reading.resultHash,
    channel: reading.channel,
    channelUnit: reading.channelUnit,
    channels: reading.channels.map(({ name, unit }) => ({ name, unit })),
    notes: { skippedRows, skippedCount, warnings, clock, startedAt, encoding },
    runs: spans.map((span) => importSpan(reading, span, judging)),
  };
}

export class EmptySpanError extends Error {
  constructor(span: Span) {
    super(`“${span.label}” holds fewer than ${LEAST_READINGS} readings. Widen it.`);
  }
}

function importSpan(reading: LogReading, span: Span, judging: Judging): ImportedRun {
  const { timesS, tempsC } = reading.series;
  const from = firstAtOrAfter(timesS, span.fromS);
  const to = firstAfter(timesS, span.toS);
  if (to - from < LEAST_READINGS) throw new EmptySpanError(span);

  const startS = timesS[from]!;
  const endS = timesS[to - 1]!;
  const series = {
    timesS: timesS.subarray(from, to).map((timeS) => timeS - startS),
    tempsC: tempsC.subarray(from, to),
  };
  const roomC = judging.roomC ?? roomOf(reading, startS, endS);
  const recorded = [reading.temps, ...reading.channels.map(({ temps }) => temps)];
  return {
    label: span.label,
    fromS: startS,
    toS: endS,
    samples: to - from,
    durationS: endS - startS,
    spark: sparkPoints(series.timesS, correctSeries(series, judging.probe).tempsC),
    packed: [series.timesS, ...recorded.map((temps) => temps.subarray(from, to))].map(packSamples),
    judged: judgeSeries(series, { ...judging, roomC }, startS, endS),
  };
}

/** Analyses a series whose first reading is at `fromS` of the record that the marks belong to. */
export function judgeSeries(series: Series, judging: Judging, fromS: number, toS: number): Judged {
  const analysis = analyseRun(series, judgingOfSpan(judging, fromS, toS));
  const { version, outcome } = analysis;
  const headline = analysis.findings[0]?.code;
  if (!headline) throw new RangeError('an analysis has at least one finding');
  return {
    version,
    outcome,
    headline,
    calls: callsInOrder(analysis),
    resultJson: JSON.stringify(analysis),
  };
}

function callsInOrder({ cutOuts, resets }: Analysis): Call[] {
  return [...cutOuts, ...resets]
    .sort((a, b) => a.timeS - b.timeS)
    .flatMap(({ call }) => (call ? [call] : []))
    .slice(0, LISTED_CALLS);
}

function firstAtOrAfter(timesS: Float64Array, timeS: number): number {
  const at = timesS.findIndex((each) => each >= timeS);
  return at < 0 ? timesS.length : at;
}

function firstAfter(timesS: Float64Array, timeS: number): number {
  const at = timesS.findIndex((each) => each > timeS);
  return at < 0 ? timesS.length : at;
}
