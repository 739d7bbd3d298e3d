import { parseNumber } from '../cells/parse-number.ts';
import type { SampleColumn } from '../layout/find-table.ts';
import type { Clock } from '../layout/layout.ts';
import type { ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import type { ClockInput, ClockResult } from './choose-clock.ts';
import { TICKS_PER_DAY, TICKS_PER_S } from './parse-stamp.ts';

/** Answers about a column of plain numbers, and what one of them is worth. */
const UNIT_TICKS: Record<string, number> = {
  seconds: TICKS_PER_S,
  minutes: 60 * TICKS_PER_S,
  hours: 3600 * TICKS_PER_S,
  milliseconds: TICKS_PER_S / 1000,
};

/** Sizes that a count of time since 1970 has in this century, and what one is worth. */
const UNIX_SIZES = [
  { from: 9e8, to: 5e9, ticks: TICKS_PER_S, words: 'Unix seconds' },
  { from: 9e11, to: 5e12, ticks: TICKS_PER_S / 1e3, words: 'Unix milliseconds' },
  { from: 9e14, to: 5e15, ticks: 1, words: 'Unix microseconds' },
  { from: 9e17, to: 5e18, ticks: 1e-3, words: 'Unix nanoseconds' },
];

/** Day 0 of spreadsheet dates: 1899-12-30 makes day 60 and later right in spite of their 1900-02-29. */
const SERIAL_1900_TICKS = -25_569 * TICKS_PER_DAY;
const SERIAL_1904_TICKS = -24_107 * TICKS_PER_DAY;

/** A column of plain numbers as a clock: since 1970, spreadsheet days, or elapsed in some unit. */
export function elapsedClock(input: ClockInput, column: SampleColumn): ClockResult {
  const values = numbersOf(input, column);
  const first = values[0] ?? 0;
  const stepsDown = median(steps(values));
  const unix = UNIX_SIZES.find(({ from, to }) => first >= from && first < to);
  if (unix)
    return numberClock(
      { kind: 'unix', column: column.index, ticksPerUnit: unix.ticks },
      unix.words,
    );
  const title = input.titles[column.index]!;
  const named = unitOfTitle(title);
  if (!named && first > 20_000 && first < 80_000 && Math.abs(stepsDown) < 0.05) {
    return serialClock(input, column);
  }
  const unit = input.answers.clock ?? named;
  if (unit !== undefined && UNIT_TICKS[unit] !== undefined) return inUnit(column, unit, []);
  return unnamedUnit(column, Math.abs(stepsDown));
}

function numberClock(clock: Clock, words: string): ClockResult {
  return { kind: 'clock', clock, words, orders: [], warnings: [] };
}

function serialClock({ answers, preamble, titles }: ClockInput, column: SampleColumn): ClockResult {
  const is1904 = answers.clock === '1904' || [...preamble, ...titles].some((t) => /1904/.test(t));
  const firstDayTicks = is1904 ? SERIAL_1904_TICKS : SERIAL_1900_TICKS;
  const clock: Clock = { kind: 'serial', column: column.index, firstDayTicks };
  return numberClock(clock, `spreadsheet days since ${is1904 ? 1904 : 1900}`);
}

function inUnit(column: SampleColumn, unit: string, warnings: ReadWarning[]): ClockResult {
  const clock: Clock = { kind: 'elapsed', column: column.index, ticksPerUnit: UNIT_TICKS[unit]! };
  return { kind: 'clock', clock, words: unit, orders: [], warnings };
}

/**
 * No unit stands: seconds, unless the step is none that a logger would use in seconds. A step under
 * 0.05 that is a whole number of seconds in minutes, or one over 99, may be another unit.
 */
function unnamedUnit(column: SampleColumn, step: number): ClockResult {
  const perMinute = step * 60;
  const likeMinutes =
    step > 0 &&
    step < 1 &&
    Math.abs(perMinute - Math.round(perMinute)) < 0.02 * perMinute &&
    !isTidy(step);
  if (!likeMinutes && step <= 99) {
    return inUnit(column, 'seconds', [warning('clock-assumed', { say: 'seconds' })]);
  }
  const units = likeMinutes
    ? ['minutes', 'seconds', 'hours']
    : ['milliseconds', 'seconds', 'minutes'];
  return {
    kind: 'question',
    question: {
      about: 'clock',
      message: `The times have no unit, and rise by ${Number(step.toPrecision(4))} a row. What are they?`,
      options: units.map((unit) => ({ answer: unit, label: unit })),
    },
  };
}

/** 0.1, 0.2, 0.25, 0.5: steps that loggers use in seconds. */
function isTidy(step: number): boolean {
  const tenths = step * 20;
  return Math.abs(tenths - Math.round(tenths)) < 1e-6;
}

function unitOfTitle(title: string): string | undefined {
  const text = title.toLowerCase().replace(/[_]/g, ' ');
  const unit =
    /(?<![a-z])(ms|msec|millis|milliseconds?|s|sec|secs|seconds?|sek|sekunden|secondes?|min|mins|minutes?|minuten|h|hr|hrs|hours?|stunden)(?![a-z])/.exec(
      text,
    )?.[1];
  if (unit === undefined) return undefined;
  if (/^(ms|mil)/.test(unit)) return 'milliseconds';
  if (/^s(?!t)/.test(unit)) return 'seconds';
  return unit.startsWith('m') ? 'minutes' : 'hours';
}

/** No clock at all: one reading every so often, where the preamble or a person says how often. */
export function rowsClock(input: ClockInput, counter: SampleColumn | undefined): ClockResult {
  const intervalTicks = intervalTicksOf(input);
  if (intervalTicks === null) {
    const seconds = ['1', '5', '10', '2', '30', '60'];
    return {
      kind: 'question',
      question: {
        about: 'interval',
        message: 'The rows have no times. How many seconds lie between two readings?',
        options: seconds.map((s) => ({
          answer: s,
          label: s === '1' ? '1 second' : `${s} seconds`,
        })),
      },
    };
  }
  const clock: Clock = counter
    ? { kind: 'elapsed', column: counter.index, ticksPerUnit: intervalTicks }
    : { kind: 'rows', intervalTicks };
  const words = `one reading every ${intervalTicks / TICKS_PER_S} s`;
  const say = `${intervalTicks / TICKS_PER_S} s`;
  return { kind: 'clock', clock, words, orders: [], warnings: [warning('interval-used', { say })] };
}

const INTERVAL_WORD = /interval|sampl|logg\w*\s*(?:rate|period|every)|period|rate\b|every|takt/i;
const INTERVAL_CLOCK = /(\d+):(\d{2})(?::(\d{2}))?/;
const INTERVAL_NUMBER =
  /(\d+(?:[.,]\d+)?)[\s,;]*(ms|s|sec|secs|seconds?|min|minutes?|h|hours?)?(?![a-z\d])/i;

/** The time between readings that was answered or stands above the table; null where neither. */
function intervalTicksOf({ answers, preamble }: ClockInput): number | null {
  const answered = Number(answers.interval);
  if (answered > 0) return Math.round(answered * TICKS_PER_S);
  for (const line of preamble) {
    if (!INTERVAL_WORD.test(line)) continue;
    const clock = INTERVAL_CLOCK.exec(line);
    if (clock) {
      const [first, second, third] = [Number(clock[1]), Number(clock[2]), clock[3]];
      const seconds = third ? first * 3600 + second * 60 + Number(third) : first * 60 + second;
      return seconds * TICKS_PER_S;
    }
    const number = INTERVAL_NUMBER.exec(line);
    const unit = number?.[2] ?? /[([]\s*(ms|s|sec|min|h)\s*[)\]]/i.exec(line)?.[1];
    const value = Number(number?.[1]?.replace(',', '.'));
    if (unit && value > 0) return value * UNIT_TICKS[unitOfTitle(unit) ?? 'seconds']!;
  }
  return null;
}

function numbersOf({ decimal }: ClockInput, { cells, headCells }: SampleColumn): number[] {
  const values: number[] = [];
  for (const cell of cells.slice(0, headCells)) {
    const number = parseNumber(cell, decimal);
    if (number.kind === 'number') values.push(number.value);
  }
  return values;
}

function steps(values: number[]): number[] {
  return values.slice(1).map((value, i) => value - values[i]!);
}

function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[sorted.length >> 1] ?? 0;
}
