import { TICKS_PER_DAY, TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import type { Answers, ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { permuteRows, reverseRows } from './arrange-rows.ts';
import { mendClock } from './mend-clock.ts';
import { partRuns } from './part-runs.ts';
import { partEqualStamps } from './part-equal-stamps.ts';

export type OrderResult =
  { kind: 'ordered'; warnings: ReadWarning[] } | { kind: 'question'; question: QuestionDraft };

/**
 * Makes the times of a store strictly rising, in place: turns round what runs backwards, follows the
 * clock past midnight and changes of its setting, parts runs, puts stragglers in their place, drops
 * repeated blocks and spreads rows within a coarse stamp. Each is said in a warning.
 */
export function orderTimes(store: RowStore, clock: Clock, answers: Answers): OrderResult {
  const warnings: ReadWarning[] = [];
  if (isRising(store)) return { kind: 'ordered', warnings };
  if (runsBackwards(store, clock)) {
    reverseRows(store);
    warnings.push(warning('reversed'));
  }
  const mended = mendClock(store, clock, answers);
  if (mended.kind === 'question') return mended;
  warnings.push(...mended.warnings);
  const parted = partRuns(store, clock, answers);
  if (parted.kind === 'question') return parted;
  warnings.push(...parted.warnings);
  const moved = sortRows(store);
  if (moved > 0) warnings.push(warning('reordered', { say: moved }));
  warnings.push(...partEqualStamps(store));
  return { kind: 'ordered', warnings };
}

/** No step back, none of nought, and none that a change of the clock's setting makes. */
function isRising({ ticks, count }: RowStore): boolean {
  const hour = 3600 * TICKS_PER_S;
  const most = 300 * TICKS_PER_DAY;
  for (let i = 1; i < count; i++) {
    const step = ticks[i]! - ticks[i - 1]!;
    if (!(step > 0 && step < most)) return false;
    if (step > hour / 2 && step < 2 * hour) return false;
  }
  return true;
}

function runsBackwards({ ticks, count }: RowStore, clock: Clock): boolean {
  if (clock.kind === 'rows') return false;
  let back = 0;
  let forth = 0;
  for (let i = 1; i < count; i++) {
    const step = ticks[i]! - ticks[i - 1]!;
    if (step < 0) back++;
    if (step > 0) forth++;
  }
  return back > 2 && back > forth * 4;
}

/** Stable sort by time; answers how many rows stood after a later one. */
function sortRows(store: RowStore): number {
  const { ticks, count } = store;
  let moved = 0;
  let latest = -Infinity;
  for (let i = 0; i < count; i++) {
    if (ticks[i]! < latest) moved++;
    else latest = ticks[i]!;
  }
  if (moved === 0) return 0;
  const order = new Uint32Array(count);
  for (let i = 0; i < count; i++) order[i] = i;
  order.sort((a, b) => ticks[a]! - ticks[b]! || a - b);
  permuteRows(store, order);
  return moved;
}
