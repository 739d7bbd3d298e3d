import type { SkippedRow } from '../log-reading.ts';

/** How many rows are listed by number; the others are only counted. */
export const MOST_LISTED = 1000;

/** Rows by number with a reason each, the first thousand of them; all are counted. */
export class RowList {
  count = 0;
  readonly rows: SkippedRow[] = [];

  /** Takes back what was told of a row. */
  forget(row: number): void {
    const place = this.rows.findIndex((listed) => listed.row === row);
    if (place < 0) return;
    this.rows.splice(place, 1);
    this.count--;
  }

  add(row: number, why: string): void {
    this.count++;
    if (this.rows.length < MOST_LISTED) this.rows.push({ row, why });
  }
}

/**
 * The readings as they come off the file: growing typed arrays, so that a million rows make no
 * million objects.
 */
export class RowStore {
  count = 0;
  /** Microseconds, on the clock of the file. */
  ticks: Float64Array;
  /** 1-based row of the file. */
  rows: Int32Array;
  /** One array a temperature column; NaN where a row has no reading. */
  temps: Float64Array[];
  /** Cells without a reading, by temperature column. */
  readonly noReading: RowList[];
  /** Rows that could not be read at all. */
  readonly unread = new RowList();
  /** Rows that were set aside as they should be: a header again, statistics, an empty row. */
  readonly passedOver = new RowList();

  constructor(channels: number, capacity: number) {
    const room = Math.max(64, capacity);
    this.ticks = new Float64Array(room);
    this.rows = new Int32Array(room);
    this.temps = Array.from({ length: channels }, () => new Float64Array(room));
    this.noReading = Array.from({ length: channels }, () => new RowList());
  }

  /** Makes room for one more row. */
  reserve(): void {
    if (this.count < this.ticks.length) return;
    const room = Math.ceil(this.ticks.length * 1.5);
    this.ticks = grown(this.ticks, new Float64Array(room));
    this.rows = grown(this.rows, new Int32Array(room));
    this.temps = this.temps.map((temps) => grown(temps, new Float64Array(room)));
  }
}

function grown<T extends Float64Array | Int32Array>(from: T, to: T): T {
  to.set(from);
  return to;
}
