import { findPreambleUnit, findUnit, CELL_UNIT, cellUnit } from '../cells/find-unit.ts';
import { parseNumber, plain, type Decimal } from '../cells/parse-number.ts';
import { chooseClock, type ClockChoice } from '../clock/choose-clock.ts';
import type { DateOrder } from '../clock/parse-stamp.ts';
import type { Answers, LogColumn, ReadProblem, ReadWarning } from '../log-reading.ts';
import { problem } from '../words/problem-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import { cellSpan } from './cell-span.ts';
import { chooseDecimal } from './choose-decimal.ts';
import { chooseDelimiter } from './choose-delimiter.ts';
import { findSignal } from '../signals/find-signal.ts';
import type { Signal } from '../signals/signal.ts';
import { columnNames, exhaustRank, roleOfName } from './column-roles.ts';
import { findTable, type SampleColumn, type Table } from './find-table.ts';
import type { Clock, Layout } from './layout.ts';
import { usualDecimals } from './usual-decimals.ts';
import type { SampleLines } from './sample-lines.ts';

export type LayoutResult =
  | { kind: 'layout'; layout: Layout; orders: DateOrder[]; warnings: ReadWarning[] }
  | { kind: 'question'; question: QuestionDraft; columns: LogColumn[] }
  | { kind: 'problem'; problem: ReadProblem };

/** Fewer are no series. */
export const MIN_READINGS = 3;

/** From sampled lines to the plan by which every row is read. */
export function detectLayout(sample: SampleLines, answers: Answers): LayoutResult {
  const lines = [...sample.head, ...sample.rest].map(({ text }) => text);
  const choice = chooseDelimiter(lines);
  const headLines = sample.head.map(({ text }) => text);
  const table = choice && findTable(choice, headLines, headLines.length);
  if (!table) return { kind: 'problem', problem: problem('no-readings') };
  const names = columnNames(table.header, tableWidth(table));
  const titles = names.map((name, i) => `${name} ${table.unitRow?.[i] ?? ''}`.trim());
  const decimal = chooseDecimal(table.columns, table.delimiter, answers);
  const ask = (question: QuestionDraft) => askOrRefuse(question, sample, table, names);
  if (typeof decimal !== 'string') return ask(decimal);
  const { columns, preamble } = table;
  const clock = chooseClock({ columns, names, titles, preamble, decimal, answers });
  if (clock.kind === 'question') return ask(clock.question);
  if (clock.kind === 'problem') return { kind: 'problem', problem: problem(clock.code) };
  return planRows(sample, table, { names, titles, decimal, clock }, answers);
}

/** Nobody is asked about a file that has too few rows whatever the answer. */
function askOrRefuse(
  question: QuestionDraft,
  { isWhole }: SampleLines,
  { columns }: Table,
  names: string[],
): LayoutResult {
  const say = columns[0]!.cells.length;
  if (isWhole && say < MIN_READINGS) {
    return { kind: 'problem', problem: problem('too-few-readings', { say }) };
  }
  return { kind: 'question', question, columns: plainColumns(names) };
}

type Understood = { names: string[]; titles: string[]; decimal: Decimal; clock: ClockChoice };

function planRows(
  sample: SampleLines,
  table: Table,
  known: Understood,
  answers: Answers,
): LayoutResult {
  const { names, decimal, clock } = known;
  const miscount = headerMiscount(sample, table);
  if (miscount) return { kind: 'problem', problem: miscount };
  const columns = describeColumns(table, known, answers);
  const tempColumns = columns
    .filter(({ role }) => role === 'temperature')
    .map(({ index }) => index);
  if (tempColumns.length === 0) return { kind: 'problem', problem: problem('no-temperature') };
  const first = sample.head[table.firstLine]!;
  const layout: Layout = {
    delimiter: table.delimiter,
    decimal,
    columns,
    clock: clock.clock,
    clockWords: clock.words,
    tempColumns,
    cellSuffix: suffixOf(
      table.columns[tempColumns[0]!]!,
      tempColumns.map((i) => columns[i]!.unit),
    ),
    usualDecimals: tempColumns.map((i) => usualDecimals(table.columns[i]!, decimal)),
    ...cellSpan(table, names.length),
    header: table.header,
    firstRow: first.row,
    firstByte: first.from,
    preamble: table.preamble,
  };
  return { kind: 'layout', layout, orders: clock.orders, warnings: clock.warnings };
}

/** A header's empty last cells are no columns. */
function tableWidth({ header, width }: Table): number {
  const named = header?.findLastIndex((cell) => cell !== '') ?? -1;
  return Math.max(width, named + 1);
}

/** A header of fewer or more columns than the rows have cells, where it is not plain which is which. */
function headerMiscount(sample: SampleLines, table: Table): ReadProblem | null {
  const { header, width, columns, delimiter } = table;
  if (!header || delimiter === ' ') return null;
  const named = header.findLastIndex((cell) => cell !== '') + 1;
  const spare = columns.slice(named).every(({ kind }) => kind === 'empty');
  const comments = header.slice(width, named).every((name) => roleOfName(name) === 'comment');
  const isWhole = header.slice(0, named).every((name) => name !== '');
  if (named === width || (named < width && spare) || (named > width && comments && isWhole)) {
    return null;
  }
  const row = sample.head[table.firstLine]!.row;
  return problem('column-count', {
    row,
    say: `${width} cells where the header has ${named} columns`,
  });
}

function plainColumns(names: string[]): LogColumn[] {
  return names.map((name, index) => ({
    index,
    name,
    role: roleOfName(name) ?? 'other',
    unit: null,
    unitFrom: null,
  }));
}

function describeColumns(table: Table, understood: Understood, answers: Answers): LogColumn[] {
  const { names, titles, decimal, clock } = understood;
  const known = names.map((_, i) => titles[i]!.replace(/_/g, ' '));
  const guesses = table.columns.map((column) =>
    columnRole(column, titles[column.index]!, clock.clock, decimal),
  );
  const signals = usedSignals(table, known, guesses, answers.unit);
  const roles = guesses.map((guess, i) => (signals[i] ? 'temperature' : guess));
  const anyNamed = roles.includes('temperature');
  const preambleUnit = statedUnit(table.preamble);
  return names.map((name, index) => {
    const guess = roles[index] ?? 'other';
    const role = guess === 'maybe' ? (anyNamed ? 'other' : 'temperature') : guess;
    const column = table.columns[index];
    if (role !== 'temperature' || !column) return { index, name, role, unit: null, unitFrom: null };
    const signal = signals[index];
    if (signal) return { index, name, role, unit: 'C', unitFrom: `${signal.kind}`, signal };
    return { index, name, role, ...unitOf(known[index]!, name, table, column, preambleUnit) };
  });
}

/** Voltages and resistances are the run only where no column gives its temperature. */
function usedSignals(
  table: Table,
  titles: string[],
  roles: RoleGuess[],
  answer: string | undefined,
): (Signal | null)[] {
  const signals = table.columns.map(({ index, kind, cells }) =>
    kind === 'number' && roles[index] !== 'time' && roles[index] !== 'date'
      ? findSignal(titles[index]!, cells, table.preamble, answer)
      : null,
  );
  const hasTemperature = roles.some(
    (role, i) => role === 'temperature' && !signals[i] && exhaustRank(titles[i]!) >= 0,
  );
  return hasTemperature ? signals.map(() => null) : signals;
}

function statedUnit(preamble: string[]) {
  const stated = new Set(preamble.map(findPreambleUnit).filter((unit) => unit !== null));
  return stated.size === 1 ? [...stated][0]! : null;
}

function unitOf(
  title: string,
  name: string,
  { unitRow }: Table,
  column: SampleColumn,
  preambleUnit: LogColumn['unit'],
): Pick<LogColumn, 'unit' | 'unitFrom'> {
  const inHeader = findUnit(name) ?? findUnit(title);
  const inRow = findUnit(unitRow?.[column.index] ?? '');
  if (inRow) return { unit: inRow, unitFrom: 'unit row' };
  if (inHeader) return { unit: inHeader, unitFrom: 'header' };
  const cell = column.cells
    .map((text) => CELL_UNIT.exec(plain(text)))
    .find((match) => match !== null);
  if (cell) return { unit: cellUnit(cell), unitFrom: 'cells' };
  return { unit: preambleUnit, unitFrom: preambleUnit && 'preamble' };
}

type RoleGuess = LogColumn['role'] | 'maybe';

function columnRole(
  column: SampleColumn,
  title: string,
  clock: Clock,
  decimal: Decimal,
): RoleGuess {
  if (clock.kind === 'date-time' && clock.dateColumn === column.index) return 'date';
  if (clock.kind !== 'rows' && clock.column === column.index) return 'time';
  if (column.kind === 'text') return roleOfName(title) === 'comment' ? 'comment' : 'other';
  if (column.kind !== 'number') return 'other';
  const role = roleOfName(title);
  if (role !== null) return role === 'time' ? 'other' : role;
  return canBeTemperature(column, decimal) ? 'maybe' : 'other';
}

/** Not a count, a state or a setting: it takes several values, and mostly moves by little. */
function canBeTemperature({ cells }: SampleColumn, decimal: Decimal): boolean {
  const values = cells
    .map((cell) => parseNumber(cell, decimal))
    .flatMap((number) => (number.kind === 'number' ? [number.value] : []));
  if (values.length < cells.length * 0.2) return false;
  if (values.length < 8) return true;
  const distinct = new Set(values);
  if (distinct.size < 4 && values.length > 20) return false;
  return !(values.every(Number.isInteger) && isCounting(values));
}

function isCounting(values: number[]): boolean {
  let byOne = 0;
  for (let i = 1; i < values.length; i++) {
    if (values[i]! - values[i - 1]! === 1) byOne++;
  }
  return byOne > values.length * 0.9;
}

/** The unit that follows the number in cells, so that the quick way reads past it, and only past it. */
function suffixOf({ cells }: SampleColumn, units: LogColumn['unit'][]): string {
  const said = cells.find((cell) => CELL_UNIT.test(plain(cell)) && /\d/.test(cell)) ?? '';
  const match = CELL_UNIT.exec(plain(said));
  if (!match || units.some((unit) => unit !== cellUnit(match))) return '';
  return /\d(\s*[^\d\s.,][^\d]*)$/.exec(said)?.[1] ?? '';
}
