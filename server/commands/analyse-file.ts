import { readFileSync } from 'node:fs';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { toContract, type Contract } from '#shared/analysis/to-contract.ts';
import type { LogReading, ReadProblem, ReadQuestion } from '#shared/reading/log-reading.ts';
import { problem } from '#shared/reading/words/problem-words.ts';
import { roomOf } from '#shared/reading/room-of.ts';
import { readLog } from '#shared/reading/read-log.ts';
import { fromCelsius, type DisplayUnit } from '#shared/units.ts';
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
        roomC: flags.roomC ?? roomOf(reading, 0, reading.series.timesS.at(-1) ?? 0),
        minCycles: flags.minCycles,
        swingK,
        reference: null,
      });
  return toContract({
    file,
    unit,
    read: reading,
    analysis,
    ...(flags.withSeries ? { series: seriesIn(reading, unit) } : {}),
  });
}

/** Every reading kept; as recorded, bit for bit, where the output's unit is the file's. */
function seriesIn(reading: LogReading, unit: DisplayUnit): { t: number[]; temp: number[] } {
  const { series, temps, channelUnit } = reading;
  const t = Array.from(series.timesS);
  if (unit === channelUnit) return { t, temp: Array.from(temps) };
  return { t, temp: Array.from(series.tempsC, (tempC) => fromCelsius(tempC, unit)) };
}
