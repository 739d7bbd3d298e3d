import { decimalsOf, parseNumber, plain } from '../cells/parse-number.ts';
import {
  parseClock,
  parseDate,
  parseStamp,
  TICKS_PER_DAY,
  TICKS_PER_S,
  fractionTicks,
} from '../clock/parse-stamp.ts';
import type { Layout } from '../layout/layout.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { fromCelsius, toCelsius, type TemperatureUnit } from '../../units.ts';
import { numberTicks, type RowPlan } from './row-plan.ts';

/** One row, read with care. `ticks` is NaN where the row's time could not be read, and `why` says so. */
export type SlowRow = {
  ticks: number;
  offsetTicks: number;
  temps: number[];
  /** Per temperature column why it has no reading; null where it has one. */
  whyNot: (string | null)[];
  why: string | null;
  /** A temperature column whose number is too large for any reading. */
  tooLargeColumn: number | null;
  /** A reading was converted from another unit than its column's. */
  converted: boolean;
  /** A cell without a unit in a column whose cells say theirs. */
  bareTemps: boolean;
  /** Decimals of each reading; -1 where there is none. */
  decimals: number[];
};

/** Reads one row's cells by the layout, in every writing that the cell parsers know. */
export function readSlowRow(cells: string[], plan: RowPlan, rowOrder: number): SlowRow {
  const { layout } = plan;
  const row: SlowRow = {
    ticks: NaN,
    offsetTicks: 0,
    temps: [],
    whyNot: [],
    why: null,
    tooLargeColumn: null,
    converted: false,
    bareTemps: false,
    decimals: [],
  };
  readTime(cells, plan, rowOrder, row);
  for (const column of layout.tempColumns) readTemp(cells[column] ?? '', layout, column, row);
  return row;
}

function readTime(cells: string[], plan: RowPlan, rowOrder: number, row: SlowRow): void {
  const { clock } = plan.layout;
  if (clock.kind === 'rows') {
    row.ticks = rowOrder * clock.intervalTicks;
    return;
  }
  const text = plain(cells[clock.column] ?? '');
  if (text === '') {
    row.why = SKIP_WORDS.noTime();
    return;
  }
  if (clock.kind === 'stamp' || clock.kind === 'date-time') readStamp(cells, plan, text, row);
  else row.ticks = clockTicksOf(text, plan.layout);
  if (Number.isNaN(row.ticks)) row.why = SKIP_WORDS.notATime(text);
}

function readStamp(cells: string[], { layout, dateColumn }: RowPlan, text: string, row: SlowRow) {
  const { clock } = layout;
  if (clock.kind === 'stamp') {
    const stamp = parseStamp(text, clock.order);
    if (!stamp) return;
    row.ticks = stamp.wallTicks - stamp.offsetTicks;
    row.offsetTicks = stamp.offsetTicks;
  } else if (clock.kind === 'date-time') {
    const day = plain(cells[dateColumn] ?? '');
    const date = parseDate(day, clock.order);
    const time = parseClock(text);
    if (!date || !time || date.length !== day.length) return;
    row.ticks = date.days * TICKS_PER_DAY + time.ticks - time.offsetTicks;
    row.offsetTicks = time.offsetTicks;
  }
}

const MINUTES = /^(\d{1,4}):(\d{2})(?:[.,](\d{1,9}))?(?:\s*([ap])\.?\s?m\.?)?$/i;
const HOURS = /^(\d{1,4}):(\d{2}):(\d{2})(?:[.,:](\d{1,9}))?$/;

function clockTicksOf(text: string, { clock, decimal }: Layout): number {
  if (clock.kind === 'time-of-day' || clock.kind === 'minutes') {
    if (clock.kind === 'time-of-day' && !clock.minutesToo && MINUTES.test(text)) return NaN;
    return timeTicks(text, clock.kind === 'minutes' && !clock.hoursFirst);
  }
  const number = parseNumber(text, decimal);
  return number.kind === 'number' ? numberTicks(clock, number.value) : NaN;
}

/** Elapsed times may pass 24 hours or 60 minutes; a time of day with AM or PM may not. */
function timeTicks(text: string, minutesFirst: boolean): number {
  const minutes = MINUTES.exec(text);
  if (minutes && !minutes[4]) {
    const [a, b] = [Number(minutes[1]), Number(minutes[2])];
    if (b > 59) return NaN;
    const seconds = minutesFirst ? a * 60 + b : a * 3600 + b * 60;
    return seconds * TICKS_PER_S + fractionTicks(minutes[3]);
  }
  const hours = HOURS.exec(text);
  if (hours) {
    const [h, m, s] = [Number(hours[1]), Number(hours[2]), Number(hours[3])];
    if (m > 59 || s > 60) return NaN;
    return (h * 3600 + m * 60 + s) * TICKS_PER_S + fractionTicks(hours[4]);
  }
  const time = parseClock(text);
  return time ? time.ticks - time.offsetTicks : NaN;
}

function readTemp(cell: string, layout: Layout, column: number, row: SlowRow): void {
  const number = parseNumber(cell, layout.decimal);
  let temp = NaN;
  let why: string | null = null;
  if (number.kind === 'number') {
    const unit = layout.columns[column]!.unit;
    if (number.unit && unit && number.unit !== unit) row.converted = true;
    if (!number.unit) row.bareTemps = true;
    temp = number.unit ? inUnit(number.value, number.unit, unit) : number.value;
  } else if (number.kind === 'too-large') {
    row.tooLargeColumn ??= column;
  } else {
    const text = cell.trim();
    why = number.kind === 'text' ? SKIP_WORDS.notANumber(text) : noReading(text);
  }
  row.temps.push(temp);
  row.decimals.push(Number.isNaN(temp) ? -1 : decimalsOf(cell, layout.decimal));
  row.whyNot.push(why);
}

function noReading(text: string): string {
  return text === '' ? SKIP_WORDS.noReading('') : SKIP_WORDS.notANumber(text);
}

function inUnit(temp: number, from: TemperatureUnit, to: TemperatureUnit | null): number {
  return to === null || from === to ? temp : fromCelsius(toCelsius(temp, from), to);
}
