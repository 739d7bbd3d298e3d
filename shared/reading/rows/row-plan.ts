import { TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock, Layout } from '../layout/layout.ts';

/** What to do with a column: the place of a temperature column among its kind, or one of these. */
export const SKIP = -1;
export const TIME = -2;
export const DATE = -3;

/** A layout as the row readers want it: one action a column. */
export type RowPlan = {
  layout: Layout;
  actions: Int32Array;
  /** Column of the time, of the date; -1 where there is none. */
  timeColumn: number;
  dateColumn: number;
};

export function planRow(layout: Layout): RowPlan {
  const { clock, columns, tempColumns } = layout;
  const actions = new Int32Array(columns.length).fill(SKIP);
  tempColumns.forEach((column, place) => (actions[column] = place));
  const timeColumn = clock.kind === 'rows' ? -1 : clock.column;
  const dateColumn = clock.kind === 'date-time' ? clock.dateColumn : -1;
  if (timeColumn >= 0) actions[timeColumn] = TIME;
  if (dateColumn >= 0) actions[dateColumn] = DATE;
  return { layout, actions, timeColumn, dateColumn };
}

/** Microseconds of a plain number on a clock of numbers. */
export function numberTicks(clock: Clock, value: number): number {
  if (clock.kind === 'serial') {
    // a spreadsheet's day has no more than milliseconds in it
    const ms = Math.round(value * 86_400_000);
    return ms * (TICKS_PER_S / 1000) + clock.firstDayTicks;
  }
  if (clock.kind !== 'elapsed' && clock.kind !== 'unix') return NaN;
  const ticks = value * clock.ticksPerUnit;
  const whole = Math.round(ticks);
  // 0.1 s is 100,000 µs; the product may miss it by its last bit
  return Math.abs(ticks - whole) < 1e-4 ? whole : ticks;
}
