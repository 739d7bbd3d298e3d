import { readLog } from '#shared/reading/read-log.ts';
import type { Answers, LogReading } from '#shared/reading/log-reading.ts';
import { toCelsius } from '#shared/units.ts';

/**
 * What became of a damaged log. `another value`: one reading is another plain number of the same form, the rest is
 * the same, and nothing tells the two files apart. `shorter`: the file ends earlier, at the end of a line or of its
 * last number, and every reading of it is right. `silent`: another series, and not a word.
 */
export const FATES = [
  'same',
  'told',
  'asked',
  'refused',
  'shorter',
  'another value',
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
  return sameUnit && hasOneOtherValue(whole, reading) ? 'another value' : 'silent';
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
