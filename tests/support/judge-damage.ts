import { readLog } from '#shared/reading/read-log.ts';
import type { Answers, LogReading } from '#shared/reading/log-reading.ts';
import { toCelsius } from '#shared/units.ts';

/**
 * What became of a damaged log. `another value`: one reading is another plain number of the same form, the rest is
 * the same, and nothing tells the two files apart. `shorter`: the file ends earlier, at the end of a line or of its
 * last number, and every reading of it is right. `another time`: one time of a record without an even step is another,
 * still in order. `silent`: another series, and not a word.
 */
export const FATES = [
  'same',
  'told',
  'asked',
  'refused',
  'shorter',
  'another value',
  'another time',
  'silent',
] as const;
export type Fate = (typeof FATES)[number];

export type WholeLog = { bytes: Uint8Array; answers: Answers; reading: LogReading };

export type Judged = { fate: Fate; changeK: number; reading: LogReading | null };

/** Reads the damaged bytes as the whole ones were, and holds the two readings against each other. */
export function judgeDamage({ answers, reading: whole }: WholeLog, bytes: Uint8Array): Judged {
  const outcome = readLog(bytes, { answers });
  if (outcome.kind === 'question') return { fate: 'asked', changeK: 0, reading: null };
  if (outcome.kind === 'refused') return { fate: 'refused', changeK: 0, reading: null };
  const { reading } = outcome;
  const changeK = furthestK(whole, reading);
  return { fate: fateOf(whole, reading), changeK, reading };
}

function fateOf(whole: LogReading, reading: LogReading): Fate {
  const sameUnit = whole.channelUnit === reading.channelUnit;
  if (sameUnit && whole.resultHash === reading.resultHash) return 'same';
  if (tellsMore(whole, reading)) return 'told';
  if (sameUnit && isShorter(whole, reading)) return 'shorter';
  if (sameUnit && hasOneOtherValue(whole, reading)) return 'another value';
  return sameUnit && hasOneOtherTime(whole, reading) ? 'another time' : 'silent';
}

/** It has a warning or a row set aside that the whole log's reading does not have. */
function tellsMore(whole: LogReading, reading: LogReading): boolean {
  const known = new Set(wordsOf(whole));
  return wordsOf(reading).some((words) => !known.has(words));
}

function wordsOf({ warnings, skippedRows }: LogReading): string[] {
  return [
    ...warnings.map(({ code, message }) => `${code}: ${message}`),
    ...skippedRows.map(({ row, why }) => `${row}: ${why}`),
  ];
}

function isShorter(whole: LogReading, reading: LogReading): boolean {
  if (reading.temps.length >= whole.temps.length) return false;
  return reading.temps.every(
    (temp, i) =>
      Object.is(temp, whole.temps[i]) && reading.series.timesS[i] === whole.series.timesS[i],
  );
}

function hasOneOtherValue(whole: LogReading, reading: LogReading): boolean {
  if (reading.temps.length !== whole.temps.length) return false;
  if (reading.series.timesS.some((timeS, i) => timeS !== whole.series.timesS[i])) return false;
  return reading.temps.filter((temp, i) => !Object.is(temp, whole.temps[i])).length === 1;
}

/** Times count from the first reading, so that its own change moves all others alike. */
function hasOneOtherTime(whole: LogReading, reading: LogReading): boolean {
  if (reading.temps.some((temp, i) => !Object.is(temp, whole.temps[i]))) return false;
  const { timesS } = whole.series;
  if (timesS.length !== reading.temps.length || isEven(timesS)) return false;
  const shifts = Array.from(timesS, (timeS, i) => reading.series.timesS[i]! - timeS);
  const shiftS = [...shifts].sort((a, b) => a - b)[shifts.length >> 1]!;
  const differs = (timeS: number, i: number) => Math.abs(timeS - timesS[i]! - shiftS) > 1e-6;
  return reading.series.timesS.filter(differs).length <= 1;
}

function isEven(timesS: Float64Array): boolean {
  const steps = Array.from(timesS.subarray(1), (timeS, i) => timeS - timesS[i]!);
  const usual = [...steps].sort((a, b) => a - b)[steps.length >> 1]!;
  return steps.filter((step) => Math.abs(step - usual) < 0.05 * usual).length > steps.length / 2;
}

/** Kept readings of a damaged log that the whole one does not have at that time: told, and yet wrong. */
export function countStrangers(whole: LogReading, reading: LogReading): number {
  const shiftS = startS(reading) - startS(whole);
  const byTime = new Map(
    Array.from(whole.temps, (temp, i) => [micro(whole.series.timesS[i]!), temp]),
  );
  return Array.from(reading.temps).filter((temp, i) => {
    return byTime.get(micro(reading.series.timesS[i]! + shiftS)) !== temp;
  }).length;
}

function micro(timeS: number): number {
  return Math.round(timeS * 1e6);
}

function startS({ startedAt }: LogReading): number {
  return startedAt === null ? 0 : Date.parse(`${startedAt.replace(' ', 'T')}Z`) / 1000;
}

/** The largest change of a reading at the same time, K; Infinity where times differ. */
function furthestK(whole: LogReading, reading: LogReading): number {
  if (reading.temps.length !== whole.temps.length) return Infinity;
  let most = 0;
  for (let i = 0; i < reading.temps.length; i++) {
    if (reading.series.timesS[i] !== whole.series.timesS[i]) return Infinity;
    const change =
      toCelsius(reading.temps[i]!, reading.channelUnit) -
      toCelsius(whole.temps[i]!, whole.channelUnit);
    most = Math.max(most, Math.abs(change));
  }
  return most;
}
