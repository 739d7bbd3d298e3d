import type { Series } from '../analysis/series.ts';
import type { Signal } from './signals/signal.ts';
import type { TemperatureUnit } from '../units.ts';

/** What a question can be about; also the names that `--assume ABOUT=ANSWER` takes. */
export const QUESTION_SUBJECTS = [
  'unit',
  'date-order',
  'decimal',
  'channel',
  'clock',
  'interval',
  'scale',
  'runs',
  'encoding',
] as const;
export type QuestionSubject = (typeof QUESTION_SUBJECTS)[number];

export type Answers = Partial<Record<QuestionSubject, string>>;

/** How a file is to be read, where a person has corrected or answered something. */
export type ReadOptions = {
  answers?: Answers;
  /** Name of the column whose temperatures are the run. */
  channel?: string;
  /** Told now and then with the share of the bytes done, 0 to 1. */
  onProgress?: (done: number) => void;
};

export type ColumnRole = 'time' | 'date' | 'temperature' | 'humidity' | 'comment' | 'other';

/** One column as it was understood. */
export type LogColumn = {
  /** 0-based place in the file. */
  index: number;
  /** As in the file; a made name ("Column 2") where it has none. */
  name: string;
  role: ColumnRole;
  /** Temperature columns only. */
  unit: TemperatureUnit | null;
  /** Where the unit was found, in words: "header", "unit row", "cells", "preamble", "answered". */
  unitFrom: string | null;
  /** Voltages or resistances that become °C; absent where it holds temperatures. */
  signal?: Signal;
};

/** A further temperature column, on the times of the series; NaN where it has no reading. */
export type LogChannel = { name: string; unit: TemperatureUnit; temps: Float64Array };

export type SkippedRow = { row: number; why: string };

export type ReadWarning = { code: string; row: number | null; message: string };

/** The first rows as understood, for a person to check. */
export type PreviewRow = {
  row: number;
  cells: string[];
  timeS: number | null;
  temp: number | null;
};

/** A file that was read: the series and everything that was understood, set aside or put right. */
export type LogReading = {
  series: Series;
  /** The run's temperatures as recorded, in `channelUnit`; same length as the series. */
  temps: Float64Array;
  timeColumn: string;
  channel: string;
  channelUnit: TemperatureUnit;
  channels: LogChannel[];
  columns: LogColumn[];
  encoding: 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';
  delimiter: string;
  decimal: '.' | ',';
  /** How the clock was read, in words: "elapsed m:ss", "day first", "seconds", "ISO 8601". */
  clock: string;
  /** The first stamp as the file's own wall clock ("2026-03-04 10:15:00"); null for elapsed clocks. */
  startedAt: string | null;
  /** Rows of readings in the file, kept or not. */
  rows: number;
  skippedRows: SkippedRow[];
  /** How many rows were set aside in all; skippedRows lists the first 1,000. */
  skippedCount: number;
  warnings: ReadWarning[];
  preview: PreviewRow[];
  /** FNV-1a of times and temperatures: preview and import of the same bytes have the same one. */
  resultHash: string;
};

export type ReadQuestion = {
  about: QuestionSubject;
  /** The proposal first. */
  options: { answer: string; label: string; preview: PreviewRow[] }[];
  message: string;
};

/** Why a file was refused, where, and what to do. */
export type ReadProblem = {
  code: string;
  message: string;
  row: number | null;
  column: string | null;
  value: string | null;
  hint: string;
};

/** The three honest outcomes. */
export type ReadOutcome =
  | { kind: 'read'; reading: LogReading }
  | { kind: 'question'; question: ReadQuestion; columns: LogColumn[] }
  | { kind: 'refused'; problem: ReadProblem };

/** The upload's limit; the command has none. */
export const MAX_UPLOAD_BYTES = 100 * 1024 * 1024;
