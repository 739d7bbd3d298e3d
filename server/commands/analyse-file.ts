import { readFileSync } from 'node:fs';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { toContract, type Contract } from '#shared/analysis/to-contract.ts';
import { isRoomName } from '#shared/reading/layout/column-roles.ts';
import type { LogReading, ReadProblem, ReadQuestion } from '#shared/reading/log-reading.ts';
import { problem } from '#shared/reading/problem-words.ts';
import { readLog } from '#shared/reading/read-log.ts';
import { fromCelsius, toCelsius, type DisplayUnit } from '#shared/units.ts';
import type { AnalyseFlags } from './analyse-flags.ts';

/** A file that gave no analysis, as contract 1 prints it. */
export type FileError = {
  file: string;
  error: ReadProblem & { about?: string; options?: string[] };
};

/** One file's line of output. `path` is where it is, `file` what the caller called it. */
export function analyseFile(
  path: string,
  file: string,
  flags: AnalyseFlags,
  marks: Mark[],
): Contract | FileError {
  const bytes = bytesOf(path);
  if (!bytes) return { file, error: problem('unreadable-file', { value: file }) };
  const outcome = readLog(bytes, {
    answers: flags.answers,
    ...(flags.channel === null ? {} : { channel: flags.channel }),
  });
  if (outcome.kind === 'refused') return { file, error: outcome.problem };
  if (outcome.kind === 'question') return { file, error: needsAnswer(outcome.question) };
  return judge(outcome.reading, file, flags, marks);
}

function bytesOf(path: string): Uint8Array | null {
  try {
    return readFileSync(path);
  } catch (error) {
    // a name that is not there is the caller's to mend; anything else is told the same way
    if (error instanceof Error && 'code' in error) return null;
    throw error;
  }
}

function needsAnswer({ about, options, message }: ReadQuestion): FileError['error'] {
  return {
    code: 'needs-answer',
    about,
    options: options.map(({ answer }) => answer),
    message,
    row: null,
    column: null,
    value: null,
    hint: `Add --assume ${about}=${options[0]?.answer ?? 'ANSWER'}, or another of the options.`,
  };
}

function judge(reading: LogReading, file: string, flags: AnalyseFlags, marks: Mark[]): Contract {
  const { unit, swingK, probe } = flags;
  const analysis = flags.turnsOnly
    ? findTurnsOnly(reading.series, swingK, probe)
    : analyseRun(reading.series, {
        rating: flags.rating,
        probe,
        marks,
        load: flags.load,
        roomC: flags.roomC ?? roomOf(reading),
        minCycles: flags.minCycles,
        swingK,
      });
  return toContract({
    file,
    unit,
    read: reading,
    analysis,
    ...(flags.withSeries ? { series: seriesIn(reading, unit) } : {}),
  });
}

/** A room hardly changes: a longer record is looked at in evenly spread places. */
const ROOM_LOOKED_AT = 20_000;

/** Median of a column of the room's temperature, °C; null where there is none. */
function roomOf({ channels }: LogReading): number | null {
  const room = channels.find(({ name }) => isRoomName(name));
  const stride = Math.max(1, Math.floor((room?.temps.length ?? 0) / ROOM_LOOKED_AT));
  const temps = room?.temps.filter((temp, i) => i % stride === 0 && !Number.isNaN(temp)).sort();
  const median = temps?.[temps.length >> 1];
  return room === undefined || median === undefined ? null : toCelsius(median, room.unit);
}

/** Every reading kept; as recorded, bit for bit, where the output's unit is the file's. */
function seriesIn(reading: LogReading, unit: DisplayUnit): { t: number[]; temp: number[] } {
  const { series, temps, channelUnit } = reading;
  const t = Array.from(series.timesS);
  if (unit === channelUnit) return { t, temp: Array.from(temps) };
  return { t, temp: Array.from(series.tempsC, (tempC) => fromCelsius(tempC, unit)) };
}
