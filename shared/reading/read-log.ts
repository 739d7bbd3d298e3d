import { plain } from './cells/parse-number.ts';
import { orderAnswer, orderWords } from './clock/date-order.ts';
import { TICKS_PER_S, type DateOrder } from './clock/parse-stamp.ts';
import { finishReading, inCelsius, type FinishedChannel } from './finish-reading.ts';
import { detectLayout } from './layout/detect-layout.ts';
import type { Layout } from './layout/layout.ts';
import { sampleLines, type SampleLines } from './layout/sample-lines.ts';
import type {
  Answers,
  LogColumn,
  LogReading,
  ReadOptions,
  ReadOutcome,
  ReadProblem,
  ReadWarning,
  SkippedRow,
} from './log-reading.ts';
import { previewRows } from './preview-rows.ts';
import { problem, SKIP_WORDS, warning } from './problem-words.ts';
import type { QuestionDraft } from './question-draft.ts';
import { resultHash } from './result-hash.ts';
import { judgeLastLine } from './rows/judge-last-line.ts';
import { readRows, type RowFacts } from './rows/read-rows.ts';
import { MOST_LISTED, type RowList, type RowStore } from './rows/row-store.ts';
import { decodeText, type LogText } from './text/decode-text.ts';
import { foreignKind } from './text/foreign-file.ts';
import { lineEnd, pastLineEnd, textDecoderFor } from './text/split-lines.ts';
import { keepRows } from './tidy/arrange-rows.ts';
import { findGaps } from './tidy/find-gaps.ts';
import { orderTimes } from './tidy/order-times.ts';

const MIN_READINGS = 3;
const MOST_COLUMNS = 1000;
const LONGEST_LINE = 100_000;
const WALL_CLOCKS = new Set(['stamp', 'date-time', 'unix', 'serial']);

type Decode = (bytes: Uint8Array, from: number, to: number) => string;
type File = { text: LogText; decode: Decode; sample: SampleLines; options: ReadOptions };

/**
 * Reads a log: bytes to series, or a question, or a refusal; never a silent guess. Preview and import are
 * this one call.
 *
 * @param bytes the whole file, untouched
 * @param options answers and corrections of a person
 */
export function readLog(bytes: Uint8Array, options: ReadOptions = {}): ReadOutcome {
  const answers = options.answers ?? {};
  const text = decodeText(bytes, answers.encoding);
  const decode = textDecoderFor(text.encoding);
  const early = refuseEarly(bytes, text);
  if (early) return { kind: 'refused', problem: early };
  const sample = sampleLines(text.bytes, decode);
  const long = refuseLongLines(sample);
  if (long) return { kind: 'refused', problem: long };
  const file: File = { text, decode, sample, options };
  const plan = detectLayout(sample, answers);
  if (plan.kind === 'problem') return { kind: 'refused', problem: plan.problem };
  if (plan.kind === 'question') return askWith(file, plan.question, plan.columns);
  return readInOrder(file, plan.layout, plan.orders, plan.warnings);
}

function refuseEarly(bytes: Uint8Array, text: LogText): ReadProblem | null {
  if (bytes.length === 0) return problem('empty-file');
  const foreign = foreignKind(bytes);
  const isUtf16 = text.encoding.startsWith('utf-16');
  if (foreign && !(foreign === 'binary' && isUtf16)) return problem(`${foreign}-file`);
  if (text.bytes.every((byte) => byte <= 32)) return problem('empty-file');
  if (text.mixedAt === null) return null;
  const row = rowOfByte(text.bytes, text.mixedAt);
  return problem('mixed-encoding', { row, say: text.mixedAt });
}

function rowOfByte(bytes: Uint8Array, at: number): number {
  let row = 1;
  let from = 0;
  for (;;) {
    const end = lineEnd(bytes, from);
    if (end >= at) return row;
    from = pastLineEnd(bytes, end);
    row++;
  }
}

function refuseLongLines({ head }: SampleLines): ReadProblem | null {
  for (const { row, text } of head) {
    if (text.length > LONGEST_LINE) return problem('line-too-long', { row, say: LONGEST_LINE });
    if (text.split(/[,;\t|]/, MOST_COLUMNS + 1).length > MOST_COLUMNS) {
      return problem('too-many-columns', { row, say: MOST_COLUMNS });
    }
  }
  return null;
}

/** Reads under every date order that the sample allows; asks only where they give different times. */
function readInOrder(
  file: File,
  layout: Layout,
  orders: DateOrder[],
  warnings: ReadWarning[],
): ReadOutcome {
  const first = readWhole(file, layout, warnings);
  if (orders.length < 2) return first.outcome;
  const readings = [{ order: orders[0]!, read: first }];
  for (const order of orders.slice(1)) {
    readings.push({ order, read: readWhole(file, withOrder(layout, order), warnings) });
  }
  const fewest = Math.min(...readings.map(({ read }) => read.unread));
  const possible = readings.filter(({ read }) => read.unread === fewest);
  const best = possible[0]!;
  if (possible.length === 1) return best.read.outcome;
  if (possible.every(({ read }) => sameTimes(read.outcome, best.read.outcome))) {
    return withWarning(best.read.outcome, warning('date-order-not-needed'));
  }
  possible.sort((a, b) => durationOf(a.read.outcome) - durationOf(b.read.outcome));
  const labels = { dmy: 'day first', mdy: 'month first', ymd: 'year first' };
  return askWith(
    file,
    {
      about: 'date-order',
      message:
        'The dates can be read in more than one way, and the times of the run differ. Which is it?',
      options: possible.map(({ order }) => ({ answer: orderAnswer(order), label: labels[order] })),
    },
    layout.columns,
  );
}

function withOrder(layout: Layout, order: DateOrder): Layout {
  const { clock } = layout;
  if (clock.kind !== 'stamp' && clock.kind !== 'date-time') return layout;
  return { ...layout, clock: { ...clock, order }, clockWords: orderWords(order, []) };
}

function sameTimes(a: ReadOutcome, b: ReadOutcome): boolean {
  if (a.kind !== 'read' || b.kind !== 'read') return a.kind === b.kind;
  return a.reading.resultHash === b.reading.resultHash;
}

function durationOf(outcome: ReadOutcome): number {
  return outcome.kind === 'read' ? (outcome.reading.series.timesS.at(-1) ?? 0) : Infinity;
}

function withWarning(outcome: ReadOutcome, more: ReadWarning): ReadOutcome {
  if (outcome.kind === 'read') outcome.reading.warnings.push(more);
  return outcome;
}

type WholeRead = { outcome: ReadOutcome; unread: number };

function readWhole(file: File, layout: Layout, early: ReadWarning[]): WholeRead {
  const { text, decode, options } = file;
  const rows = readRows({ text, layout, decode, onProgress: options.onProgress });
  if (rows.kind === 'problem') return refused(rows.problem, 0);
  const { store, facts } = rows;
  const unread = store.unread.count;
  const bad = refuseRows(store, layout) ?? refuseMixedUnits(facts, layout);
  if (bad) return refused(bad, unread);
  const warnings = [...textWarnings(text), ...early, ...endWarnings(file, layout, store)];
  const ordered = orderTimes(store, layout.clock, options.answers ?? {});
  if (ordered.kind === 'question') {
    return { outcome: askWith(file, ordered.question, layout.columns), unread };
  }
  const readRowCount = store.count + store.unread.count + store.passedOver.count;
  const columns = layout.tempColumns.map((index) => layout.columns[index]!);
  const finished = finishReading(store, columns, layout.header !== null, options);
  if (finished.kind === 'problem') return refused(finished.problem, unread);
  if (finished.kind === 'question') {
    return { outcome: askWith(file, finished.question, layout.columns), unread };
  }
  if (store.count < MIN_READINGS) {
    return refused(problem('too-few-readings', { say: store.count }), unread);
  }
  warnings.push(...ordered.warnings, ...finished.channel.warnings);
  const reading = buildReading(file, layout, rows.store, facts, finished.channel, warnings);
  return { outcome: { kind: 'read', reading: { ...reading, rows: readRowCount } }, unread };
}

function refused(wrong: ReadProblem, unread: number): WholeRead {
  return { outcome: { kind: 'refused', problem: wrong }, unread };
}

function refuseRows(store: RowStore, layout: Layout): ReadProblem | null {
  const first = store.unread.rows[0];
  if (store.count === 0 && !first) return problem('no-readings');
  if (first && store.unread.count > store.count) {
    return problem('mostly-unreadable', { row: first.row, say: first.why });
  }
  const total = store.count;
  return total < MIN_READINGS
    ? problem('too-few-readings', { say: total, row: layout.firstRow })
    : null;
}

/** Some cells say another unit, and some none: which one those have is not known. */
function refuseMixedUnits({ convertedRow, bareRow }: RowFacts, layout: Layout): ReadProblem | null {
  if (convertedRow === null || bareRow === null) return null;
  const column = layout.columns.find(({ unitFrom }) => unitFrom === 'cells');
  return column ? problem('mixed-units', { row: convertedRow, column: column.name }) : null;
}

function textWarnings({ guessedUtf16, nulTail }: LogText): ReadWarning[] {
  const warnings: ReadWarning[] = [];
  if (guessedUtf16) warnings.push(warning('utf-16-guessed'));
  if (nulTail > 0) warnings.push(warning('nul-tail', { say: nulTail }));
  return warnings;
}

/** What the end of the file shows: a line cut off loses its reading. */
function endWarnings({ text, decode }: File, layout: Layout, store: RowStore): ReadWarning[] {
  const judged = judgeLastLine(text, layout, decode);
  const lastUnread = store.unread.rows.at(-1)?.row ?? 0;
  const lastRow = Math.max(store.rows[store.count - 1] ?? 0, lastUnread);
  if (judged === 'whole') return [];
  if (judged === 'unsure') return [warning('no-last-line-end', { row: lastRow })];
  if (store.rows[store.count - 1] === lastRow) {
    store.unread.add(lastRow, SKIP_WORDS.cutOff());
    const last = store.count - 1;
    keepRows(store, (place) => place !== last);
  }
  return [warning('truncated-line', { row: lastRow })];
}

function buildReading(
  file: File,
  layout: Layout,
  store: RowStore,
  facts: RowFacts,
  channel: FinishedChannel,
  early: ReadWarning[],
): LogReading {
  const { place, unit, temps } = channel;
  const own = layout.columns[layout.tempColumns[place]!]!;
  const timesS = timesOf(store);
  const series = { timesS, tempsC: inCelsius(temps, unit) };
  const rows = store.rows.slice(0, store.count);
  const lists = [store.unread, store.passedOver, store.noReading[place]!, channel.sentinels];
  const skippedRows = mergeRows(lists);
  const answered = (file.options.answers?.unit ?? null) !== null;
  const columns = layout.columns.map((column) =>
    column.index === own.index && answered ? { ...column, unit, unitFrom: 'answered' } : column,
  );
  const warnings = [...early, ...rowWarnings(store, facts, place, own), ...findGaps(timesS, rows)];
  if (isConstant(temps)) warnings.push(warning('no-change', { say: own.name }));
  return {
    series,
    temps,
    timeColumn: timeColumnName(layout),
    channel: own.name,
    channelUnit: unit,
    channels: channel.others,
    columns,
    encoding: file.text.encoding,
    delimiter: layout.delimiter,
    decimal: layout.decimal,
    clock: layout.clockWords,
    startedAt: startedAt(store, layout, facts),
    rows: store.count,
    skippedRows,
    skippedCount: lists.reduce((sum, { count }) => sum + count, 0),
    warnings,
    preview: previewRows(file, layout, own.index, { timesS, temps, rows }),
    resultHash: resultHash(timesS, temps),
  };
}

function timesOf({ ticks, count }: RowStore): Float64Array {
  const timesS = new Float64Array(count);
  const startTicks = ticks[0] ?? 0;
  for (let i = 0; i < count; i++) timesS[i] = (ticks[i]! - startTicks) / TICKS_PER_S;
  return timesS;
}

function rowWarnings(
  store: RowStore,
  facts: RowFacts,
  place: number,
  own: LogColumn,
): ReadWarning[] {
  const warnings: ReadWarning[] = [];
  const open = store.noReading[place]!;
  if (open.count > 0)
    warnings.push(warning('open-sensor', { row: open.rows[0]!.row, say: open.count }));
  const { unread } = store;
  if (unread.count > 0) {
    warnings.push(warning('rows-set-aside', { row: unread.rows[0]!.row, say: unread.count }));
  }
  const again = facts.headersAgain;
  if (again.length > 0)
    warnings.push(warning('header-repeated', { row: again[0]!, say: again.length }));
  if (facts.convertedRow !== null) {
    warnings.push(warning('units-converted', { row: facts.convertedRow, value: own.unit ?? '' }));
  }
  return warnings;
}

function isConstant(temps: Float64Array): boolean {
  return temps.every((temp) => temp === temps[0]);
}

function mergeRows(lists: RowList[]): SkippedRow[] {
  const all = lists.flatMap(({ rows }) => rows);
  return all.sort((a, b) => a.row - b.row).slice(0, MOST_LISTED);
}

function timeColumnName({ clock, columns }: Layout): string {
  if (clock.kind === 'rows') return 'row';
  const name = columns[clock.column]!.name;
  return clock.kind === 'date-time' ? `${columns[clock.dateColumn]!.name}, ${name}` : name;
}

function startedAt(store: RowStore, { clock }: Layout, { offsetTicks }: RowFacts): string | null {
  if (!WALL_CLOCKS.has(clock.kind)) return null;
  const ms = Math.floor(((store.ticks[0] ?? 0) + offsetTicks) / 1000);
  const date = new Date(ms);
  return Number.isNaN(date.getTime()) ? null : date.toISOString().slice(0, 19).replace('T', ' ');
}

/** A question with the first rows as each answer would have them. */
function askWith(file: File, draft: QuestionDraft, columns: LogColumn[]): ReadOutcome {
  const options = draft.options.map(({ answer, label }) => {
    const answers: Answers = { ...file.options.answers, [draft.about]: answer };
    const plan = detectLayout(file.sample, answers);
    const channel = draft.about === 'channel' ? answer : file.options.channel;
    const preview =
      plan.kind === 'layout'
        ? previewRows(file, plan.layout, channelColumn(plan.layout, channel))
        : [];
    return { answer, label, preview };
  });
  return { kind: 'question', question: { ...draft, options }, columns };
}

function channelColumn({ columns, tempColumns }: Layout, channel: string | undefined): number {
  const named = columns.find(({ name }) => channel !== undefined && plain(name) === plain(channel));
  return named?.index ?? tempColumns[0]!;
}
