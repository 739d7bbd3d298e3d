import { TICKS_PER_DAY, TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import type { Answers, ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { medianStepTicks } from './arrange-rows.ts';

const HOUR = 3600 * TICKS_PER_S;
/** A step of more than this, either way, is a clock that was set, not a pause. */
const SET_ANEW = 300 * TICKS_PER_DAY;

export type MendResult =
  { kind: 'mended'; warnings: ReadWarning[] } | { kind: 'question'; question: QuestionDraft };

/** Lets time run on past midnight, past summer time, and past a clock that was set anew; in place. */
export function mendClock(store: RowStore, clock: Clock, answers: Answers): MendResult {
  if (clock.kind === 'time-of-day' || (clock.kind === 'minutes' && clock.hoursFirst)) {
    return passMidnight(store, answers);
  }
  if (clock.kind === 'stamp' || clock.kind === 'date-time' || clock.kind === 'unix') {
    return { kind: 'mended', warnings: passSettings(store, clock.kind !== 'unix') };
  }
  return { kind: 'mended', warnings: [] };
}

/** A time of day that falls by more than 12 hours has passed midnight. */
function passMidnight(store: RowStore, answers: Answers): MendResult {
  const { ticks, rows, count } = store;
  const warnings: ReadWarning[] = [];
  const isTwelveHour = answers.clock === '12-hour';
  let addedTicks = 0;
  let before = ticks[0] ?? 0;
  for (let i = 1; i < count; i++) {
    const written = ticks[i]!;
    const fall = before - written;
    before = written;
    if (fall > 11.5 * HOUR && fall <= 12 * HOUR) {
      if (!isTwelveHour) return askHalves(rows[i]!);
      addedTicks += 12 * HOUR;
    } else if (fall > 12 * HOUR) {
      addedTicks += TICKS_PER_DAY;
      warnings.push(warning('midnight', { row: rows[i]! }));
    } else if (fall < -12 * HOUR && addedTicks > 0) {
      // a straggler from before midnight
      ticks[i] = written + addedTicks - TICKS_PER_DAY;
      before = written - TICKS_PER_DAY;
      continue;
    }
    ticks[i] = written + addedTicks;
  }
  return { kind: 'mended', warnings };
}

function askHalves(row: number): MendResult {
  return {
    kind: 'question',
    question: {
      about: 'clock',
      message: `The time falls back by 12 hours in row ${row}. Is it a 12-hour clock without AM and PM?`,
      options: [
        { answer: '12-hour', label: '12-hour clock' },
        { answer: 'h:mm:ss', label: '24-hour clock' },
      ],
    },
  };
}

function passSettings(store: RowStore, hasWallClock: boolean): ReadWarning[] {
  const { ticks, rows, count } = store;
  const step = medianStepTicks(store);
  const warnings: ReadWarning[] = [];
  let addedTicks = 0;
  let before = ticks[0] ?? 0;
  for (let i = 1; i < count; i++) {
    const written = ticks[i]!;
    const change = written - before;
    const hour = hasWallClock ? hourChange(before, change, step) : 0;
    if (Math.abs(change) > SET_ANEW) {
      addedTicks += step - change;
      warnings.push(warning('clock-reset', { row: rows[i]! }));
    } else if (hour !== 0) {
      addedTicks -= hour * HOUR;
      const say = hour < 0 ? 'back by an hour' : 'forward by an hour';
      warnings.push(warning('clock-change', { row: rows[i]!, say }));
    }
    before = written;
    ticks[i] = written + addedTicks;
  }
  return warnings;
}

/** -1 or 1 where a wall clock was set back or forward by an hour, on the hour, between two readings. */
function hourChange(beforeTicks: number, change: number, step: number): number {
  const slack = Math.max(3 * step, TICKS_PER_S);
  const toHour = HOUR - (beforeTicks % HOUR);
  if (toHour > slack) return 0;
  if (change < 0 && change + HOUR >= 0 && change + HOUR <= slack) return -1;
  const early = beforeTicks % TICKS_PER_DAY < 4 * HOUR;
  return early && isChangeDay(beforeTicks) && change - HOUR > 0 && change - HOUR <= slack ? 1 : 0;
}

/** Clocks go forward on a Sunday, early in the day; any other pause of an hour is a pause. */
function isChangeDay(ticks: number): boolean {
  const day = Math.floor(ticks / TICKS_PER_DAY);
  return (((day + 4) % 7) + 7) % 7 === 0;
}
