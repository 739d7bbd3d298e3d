import { TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import type { Answers, ReadWarning } from '../log-reading.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { warning } from '../words/warning-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { keepRows, medianStepTicks } from './arrange-rows.ts';

type Span = { from: number; to: number };

export type PartResult =
  { kind: 'parted'; warnings: ReadWarning[] } | { kind: 'question'; question: QuestionDraft };

const MIN_JUMP_TICKS = 60 * TICKS_PER_S;
/** A clock that jumps back further than this many steps has started again; less is a straggler. */
const JUMP_STEPS = 20;
const MIN_ROWS = 3;
/** Sorting one run leaves it as smooth as it was; this much rougher, and it was two. */
const ROUGHER = 1.5;
/** More parts than this are stragglers after all. */
const MOST_RUNS = 50;

/**
 * Parts a record where its clock starts again. A part that repeats an earlier one row by row is dropped;
 * parts that follow one another in another order are left to be sorted; others are runs, and one is chosen.
 */
export function partRuns(store: RowStore, clock: Clock, answers: Answers): PartResult {
  const warnings: ReadWarning[] = [];
  let spans = findSpans(store);
  if (spans.length === 1 || spans.length > MOST_RUNS) return { kind: 'parted', warnings };
  const repeats = spans
    .slice(1)
    .filter((span, k) => repeatsAny(store, spans.slice(0, k + 1), span));
  if (repeats.length > 0) {
    const row = store.rows[repeats[0]!.from]!;
    const say = repeats.reduce((sum, { from, to }) => sum + to - from, 0);
    warnings.push(warning('duplicates-dropped', { row, say }));
    dropSpans(store, repeats, SKIP_WORDS.repeated());
    spans = findSpans(store);
  }
  const isAbsolute = clock.kind === 'stamp' || clock.kind === 'date-time' || clock.kind === 'unix';
  const isOneRun = isAbsolute && (!overlap(store, spans) || !isRougherSorted(store));
  if (spans.length === 1 || isOneRun) return { kind: 'parted', warnings };
  const chosen = spans[Number(answers.runs) - 1];
  if (!chosen) return { kind: 'question', question: askRun(store, spans) };
  dropSpans(
    store,
    spans.filter((span) => span !== chosen),
    SKIP_WORDS.otherRun(),
  );
  return { kind: 'parted', warnings };
}

function findSpans(store: RowStore): Span[] {
  const { ticks, count } = store;
  const jump = Math.max(MIN_JUMP_TICKS, JUMP_STEPS * medianStepTicks(store));
  const spans: Span[] = [];
  let from = 0;
  for (let i = 1; i <= count; i++) {
    if (i < count && ticks[i - 1]! - ticks[i]! <= jump) continue;
    spans.push({ from, to: i });
    from = i;
  }
  return spans;
}

/** Every row of `span` stands, with the same time and readings, in one of the earlier spans, in one block. */
function repeatsAny(store: RowStore, earlier: Span[], span: Span): boolean {
  if (span.to - span.from < MIN_ROWS) return false;
  return earlier.some(({ from, to }) => {
    for (let start = from; start + (span.to - span.from) <= to; start++) {
      if (store.ticks[start] !== store.ticks[span.from]) continue;
      if (sameBlock(store, start, span)) return true;
    }
    return false;
  });
}

function sameBlock({ ticks, temps }: RowStore, start: number, { from, to }: Span): boolean {
  for (let i = from; i < to; i++) {
    const j = start + i - from;
    if (ticks[i] !== ticks[j]) return false;
    if (!temps.every((column) => Object.is(column[i], column[j]))) return false;
  }
  return true;
}

function overlap({ ticks }: RowStore, spans: Span[]): boolean {
  const times = spans.map(({ from, to }) => ({ first: ticks[from]!, last: ticks[to - 1]! }));
  times.sort((a, b) => a.first - b.first);
  return times.some(({ first }, k) => k > 0 && first <= times[k - 1]!.last);
}

/** Two runs laid into each other jump to and fro; one run that was written in pieces does not. */
function isRougherSorted({ ticks, temps, count }: RowStore): boolean {
  const column = temps[0];
  if (!column) return false;
  const order = Array.from({ length: count }, (_, i) => i).filter((i) => !Number.isNaN(column[i]));
  const asWritten = roughness(column, order);
  order.sort((a, b) => ticks[a]! - ticks[b]! || a - b);
  return roughness(column, order) > ROUGHER * asWritten;
}

function roughness(column: Float64Array, order: number[]): number {
  let sum = 0;
  for (let i = 1; i < order.length; i++)
    sum += Math.abs(column[order[i]!]! - column[order[i - 1]!]!);
  return sum;
}

function dropSpans(store: RowStore, spans: Span[], why: string): void {
  const drop = new Uint8Array(store.count);
  for (const { from, to } of spans) {
    drop.fill(1, from, to);
    for (let i = from; i < to; i++) store.passedOver.add(store.rows[i]!, why);
  }
  keepRows(store, (place) => drop[place] === 0);
}

function askRun({ rows }: RowStore, spans: Span[]): QuestionDraft {
  const longest = [...spans.keys()].sort((a, b) => length(spans[b]!) - length(spans[a]!));
  return {
    about: 'runs',
    message: `The clock starts again ${spans.length - 1 === 1 ? 'once' : `${spans.length - 1} times`}: the file holds ${spans.length} runs. Which one is to be read?`,
    options: longest.map((k) => ({
      answer: String(k + 1),
      label: `run ${k + 1}: rows ${rows[spans[k]!.from]} to ${rows[spans[k]!.to - 1]}`,
    })),
  };
}

function length({ from, to }: Span): number {
  return to - from;
}
