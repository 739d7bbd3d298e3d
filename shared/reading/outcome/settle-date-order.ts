import { orderAnswer, orderWords } from '../clock/date-order.ts';
import type { DateOrder } from '../clock/parse-stamp.ts';
import type { Layout } from '../layout/layout.ts';
import type { ReadOutcome, ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import { askWith } from './ask-with.ts';
import type { LogFile } from './log-file.ts';
import { readWhole } from './read-whole.ts';

/** Reads under every date order that the sample allows; asks only where they give different times. */
export function readInOrder(
  file: LogFile,
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
