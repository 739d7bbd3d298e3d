import { parseNumber, type Decimal } from '../cells/parse-number.ts';
import { isCounterName, roleOfName } from '../layout/column-roles.ts';
import type { SampleColumn } from '../layout/find-table.ts';
import type { Clock } from '../layout/layout.ts';
import type { Answers, ReadWarning } from '../log-reading.ts';
import type { ProblemCode } from '../words/problem-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import { dateOrders, orderWords } from './date-order.ts';
import { elapsedClock, rowsClock } from './elapsed-clock.ts';
import { minutesClock } from './minutes-clock.ts';
import type { DateOrder } from './parse-stamp.ts';

/** This share of odd times is damage, more of them is a way of writing. */
const FEW = 0.02;

export type ClockChoice = {
  kind: 'clock';
  clock: Clock;
  words: string;
  /** Date orders that the sampled rows allow; more than one is settled on the whole file. */
  orders: DateOrder[];
  warnings: ReadWarning[];
};
export type ClockResult =
  | ClockChoice
  | { kind: 'question'; question: QuestionDraft }
  | { kind: 'problem'; code: ProblemCode };

export type ClockInput = {
  columns: SampleColumn[];
  names: string[];
  /** What the header and a row of units say of each column, joined. */
  titles: string[];
  preamble: string[];
  decimal: Decimal;
  answers: Answers;
};

/** Which columns carry the time, and how it is written. */
export function chooseClock(input: ClockInput): ClockResult {
  const { columns, names } = input;
  const stamp = preferTimeName(
    columns.filter(({ kind }) => kind === 'stamp'),
    names,
  );
  if (stamp) return stampClock(input, stamp);
  const date = preferTimeName(
    columns.filter(({ kind }) => kind === 'date'),
    names,
  );
  const time = preferTimeName(
    columns.filter(({ kind }) => kind === 'time'),
    names,
  );
  if (date && time) return dateTimeClock(input, date, time);
  if (time) return timeClock(input, time);
  const number = risingNumber(input);
  if (number) return elapsedClock(input, number);
  const counter = columns.find((c) => isCounterName(names[c.index]!) && c.kind === 'number');
  return rowsClock(input, counter);
}

function preferTimeName(columns: SampleColumn[], names: string[]): SampleColumn | undefined {
  return columns.find(({ index }) => roleOfName(names[index]!) === 'time') ?? columns[0];
}

function stampClock(input: ClockInput, { index, cells }: SampleColumn): ClockResult {
  const orders = dateOrders(cells, input.answers['date-order']);
  const order = orders[0];
  if (!order) return { kind: 'problem', code: 'no-clock' };
  const clock: Clock = { kind: 'stamp', column: index, order };
  return { kind: 'clock', clock, words: orderWords(order, cells), orders, warnings: [] };
}

function dateTimeClock(input: ClockInput, date: SampleColumn, time: SampleColumn): ClockResult {
  const cells = date.cells.map((day, i) => `${day} ${time.cells[i] ?? ''}`);
  const orders = dateOrders(cells, input.answers['date-order']);
  const order = orders[0];
  if (!order) return { kind: 'problem', code: 'no-clock' };
  const clock: Clock = { kind: 'date-time', dateColumn: date.index, column: time.index, order };
  const words = `date and time in two columns, ${orderWords(order, cells)}`;
  return { kind: 'clock', clock, words, orders, warnings: [] };
}

function timeClock(input: ClockInput, time: SampleColumn): ClockResult {
  const filled = time.cells.filter((cell) => cell !== '');
  const threeFields = filled.filter((cell) => /:\d{2}:\d{2}/.test(cell)).length;
  if (threeFields * 2 <= filled.length) return minutesClock(input, time);
  // one time of two fields among those of three has lost a mark
  const minutesToo = filled.length - threeFields > Math.max(1, filled.length * FEW);
  const clock: Clock = { kind: 'time-of-day', column: time.index, minutesToo };
  return { kind: 'clock', clock, words: 'h:mm:ss', orders: [], warnings: [] };
}

/** A column of numbers that rise (or, newest first, fall) and is not merely a count. */
function risingNumber({ columns, names, decimal }: ClockInput): SampleColumn | undefined {
  const numbers = columns.filter(({ kind }) => kind === 'number');
  const named = numbers.find(({ index }) => roleOfName(names[index]!) === 'time');
  if (named) return named;
  return numbers.find((column) => {
    const role = roleOfName(names[column.index]!);
    return role === null && isMonotone(column, decimal);
  });
}

function isMonotone({ cells, headCells }: SampleColumn, decimal: Decimal): boolean {
  let up = 0;
  let down = 0;
  let before = NaN;
  for (const cell of cells.slice(0, headCells)) {
    const number = parseNumber(cell, decimal);
    if (number.kind !== 'number') continue;
    if (number.value > before) up++;
    if (number.value < before) down++;
    before = number.value;
  }
  const steps = Math.max(1, headCells - 1);
  return up > steps * 0.9 || down > steps * 0.9;
}
