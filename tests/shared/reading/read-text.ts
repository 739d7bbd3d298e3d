import { readLog } from '#shared/reading/read-log.ts';
import type {
  LogReading,
  ReadOptions,
  ReadProblem,
  ReadQuestion,
} from '#shared/reading/log-reading.ts';

/** The outcome of a text, flat, so that a test can say all that it expects in one object. */
export function readText(text: string | Uint8Array, options: ReadOptions = {}) {
  const bytes = typeof text === 'string' ? new TextEncoder().encode(text) : text;
  return readLog(bytes, options);
}

/** The reading of a text that is to be read. */
export function readingOf(text: string | Uint8Array, options: ReadOptions = {}): LogReading {
  const outcome = readText(text, options);
  if (outcome.kind !== 'read') throw new Error(`not read: ${JSON.stringify(outcome)}`);
  return outcome.reading;
}

/** Times and readings of a text that is to be read, as plain lists. */
export function valuesOf(text: string | Uint8Array, options: ReadOptions = {}) {
  const { series, temps } = readingOf(text, options);
  return { t: Array.from(series.timesS), temp: Array.from(temps) };
}

/** The question that a text leads to. */
export function questionOf(text: string | Uint8Array, options: ReadOptions = {}): ReadQuestion {
  const outcome = readText(text, options);
  if (outcome.kind !== 'question') throw new Error(`no question: ${JSON.stringify(outcome)}`);
  return outcome.question;
}

/** Why a text is refused. */
export function problemOf(text: string | Uint8Array, options: ReadOptions = {}): ReadProblem {
  const outcome = readText(text, options);
  if (outcome.kind !== 'refused') throw new Error(`not refused: ${JSON.stringify(outcome)}`);
  return outcome.problem;
}

/** Codes of the warnings of a text that is to be read. */
export function warningsOf(text: string | Uint8Array, options: ReadOptions = {}): string[] {
  return readingOf(text, options).warnings.map(({ code }) => code);
}

export function inWindows1252(text: string): Uint8Array {
  return Uint8Array.from(text, (character) => character.charCodeAt(0));
}

export function inUtf16(text: string, order: 'le' | 'be', withMark: boolean): Uint8Array {
  const units = (withMark ? '\ufeff' : '') + text;
  const bytes = new Uint8Array(units.length * 2);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < units.length; i++) view.setUint16(2 * i, units.charCodeAt(i), order === 'le');
  return bytes;
}
