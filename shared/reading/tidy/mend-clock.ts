import { TICKS_PER_DAY, TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import type { Answers, ReadWarning } from '../log-reading.ts';
import { warning } from '../words/warning-words.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { medianStepTicks } from './arrange-rows.ts';

const HOUR = 3600 * TICKS_PER_S;
/** What summer time moves clocks by: an hour, on Lord Howe Island half of one (IANA time zone database). */
const SUMMER_TIME = [HOUR, HOUR / 2];
/** Clocks go forward between these times of day: a time without a date has no more to go by. */
const EARLIEST_ADVANCE = 0.9 * HOUR;
const LATEST_ADVANCE = 4 * HOUR;
/** Readings further apart than a third of this say nothing of an hour. */
const LONGEST_SLACK = HOUR / 6;
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
  const step = medianStepTicks(store);
  const warnings: ReadWarning[] = [];
  const isTwelveHour = answers.clock === '12-hour';
  let addedTicks = 0;
  let before = ticks[0] ?? 0;
  for (let i = 1; i < count; i++) {
    const written = ticks[i]!;
    const fall = before - written;
    const set = settingTicks(before, -fall, step, before >= EARLIEST_ADVANCE);
    before = written;
    if (set !== 0) {
      addedTicks -= set;
      warnings.push(clockChange(rows[i]!, set));
    } else if (fall > 11.5 * HOUR && fall <= 12 * HOUR && answers.clock !== 'h:mm:ss') {
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
      follows: ['h:mm'],
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
    const set = hasWallClock ? settingTicks(before, change, step, isChangeDay(before)) : 0;
    if (Math.abs(change) > SET_ANEW) {
      addedTicks += step - change;
      warnings.push(warning('clock-reset', { row: rows[i]! }));
    } else if (set !== 0) {
      addedTicks -= set;
      warnings.push(clockChange(rows[i]!, set));
    }
    before = written;
    ticks[i] = written + addedTicks;
  }
  return warnings;
}

/** By how much a wall clock was set back or forward, on the hour, between two readings, µs; 0 where it was not. */
function settingTicks(before: number, change: number, step: number, mayAdvance: boolean): number {
  const slack = Math.max(3 * step, TICKS_PER_S);
  const toHour = HOUR - (before % HOUR);
  if (toHour > slack || slack > LONGEST_SLACK) return 0;
  for (const by of SUMMER_TIME) {
    if (change < 0 && change + by >= 0 && change + by <= slack) return -by;
    const isEarly = before % TICKS_PER_DAY < LATEST_ADVANCE;
    if (mayAdvance && isEarly && change - by > 0 && change - by <= slack) return by;
  }
  return 0;
}

function clockChange(row: number, ticks: number): ReadWarning {
  const by = Math.abs(ticks) === HOUR ? 'an hour' : 'half an hour';
  return warning('clock-change', { row, say: `${ticks < 0 ? 'back' : 'forward'} by ${by}` });
}

/** Clocks go forward on a Sunday, early in the day; any other pause of an hour is a pause. */
function isChangeDay(ticks: number): boolean {
  const day = Math.floor(ticks / TICKS_PER_DAY);
  return (((day + 4) % 7) + 7) % 7 === 0;
}
