import { MIN_READINGS } from '../layout/detect-layout.ts';
import type { Layout } from '../layout/layout.ts';
import type { ReadOutcome, ReadProblem, ReadWarning } from '../log-reading.ts';
import { judgeLastLine } from '../rows/judge-last-line.ts';
import { readRows, type RowFacts } from '../rows/read-rows.ts';
import type { RowStore } from '../rows/row-store.ts';
import type { LogText } from '../text/decode-text.ts';
import { keepRows } from '../tidy/arrange-rows.ts';
import { orderTimes } from '../tidy/order-times.ts';
import { problem } from '../words/problem-words.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { warning } from '../words/warning-words.ts';
import { askWith } from './ask-with.ts';
import { buildReading } from './build-reading.ts';
import { finishReading } from './finish-reading.ts';
import type { LogFile } from './log-file.ts';

/** The outcome by one layout, and how many rows it could not read. */
export type WholeRead = { outcome: ReadOutcome; unread: number };

/** Reads every row by one layout, puts the rows in order and finishes the run's own readings. */
export function readWhole(file: LogFile, layout: Layout, early: ReadWarning[]): WholeRead {
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
function endWarnings({ text, decode }: LogFile, layout: Layout, store: RowStore): ReadWarning[] {
  const judged = judgeLastLine(text, layout, decode);
  const lastUnread = store.unread.rows.at(-1)?.row ?? 0;
  const lastRow = Math.max(store.rows[store.count - 1] ?? 0, lastUnread);
  if (judged === 'whole') return [];
  if (judged === 'unsure') return [warning('no-last-line-end', { row: lastRow })];
  if (store.rows[store.count - 1] === lastRow) {
    store.unread.add(lastRow, SKIP_WORDS.cutOff());
    for (const list of store.noReading) list.forget(lastRow);
    const last = store.count - 1;
    keepRows(store, (place) => place !== last);
  }
  return [warning('truncated-line', { row: lastRow })];
}
