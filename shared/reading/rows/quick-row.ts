import { ByteCursor, CR, LF, QUOTE, SPACE, TAB } from './byte-cursor.ts';
import { QuickClock } from './quick-clock.ts';
import { DATE, SKIP, TIME, type RowPlan } from './row-plan.ts';

const LAST_ASCII = 126;

/**
 * Reads the common row straight from the bytes: plain numbers and numeric stamps, no text made. What it
 * does not know it refuses, and the careful reader takes that row; what it reads, both read alike.
 */
export class QuickRow {
  ticks = 0;
  /** One a temperature column; NaN where its cell is empty. */
  readonly temps: Float64Array;
  /** Decimals of each reading. */
  readonly decimals: Int8Array;
  anyEmpty = false;
  /** A reading has other decimals than its column's. */
  anyOdd = false;

  private readonly cursor: ByteCursor;
  private readonly clock: QuickClock;
  private readonly actions: Int32Array;
  private readonly delimiter: number;
  private readonly bySpaces: boolean;
  private readonly suffix: Uint8Array;
  /** Rows may end with a delimiter. */
  private readonly mayTrail: boolean;
  private readonly usualDecimals: Int8Array;

  /** @param suffix what follows the number in each cell of a temperature column */
  constructor(bytes: Uint8Array, { layout, actions }: RowPlan, suffix: Uint8Array) {
    this.bySpaces = layout.delimiter === ' ';
    this.cursor = new ByteCursor(bytes, layout.decimal.charCodeAt(0), this.bySpaces);
    this.clock = new QuickClock(this.cursor, layout.clock, layout.delimiter);
    this.actions = actions;
    this.delimiter = layout.delimiter.charCodeAt(0);
    this.suffix = suffix;
    this.mayTrail = layout.mostCells > actions.length;
    this.temps = new Float64Array(layout.tempColumns.length);
    this.decimals = new Int8Array(layout.tempColumns.length);
    this.usualDecimals = Int8Array.from(layout.usualDecimals);
  }

  /** Where the row that was read ends: the place of its line end. */
  get at(): number {
    return this.cursor.at;
  }

  /** What the zone of the row's stamp adds, µs. */
  get offsetTicks(): number {
    return this.clock.offsetTicks;
  }

  /** Reads the row at `from`; false where it is not of the common kind. `at` is then of no use. */
  read(from: number): boolean {
    const { cursor, actions } = this;
    const { bytes, end } = cursor;
    const width = actions.length;
    cursor.at = from;
    cursor.good = true;
    this.ticks = 0;
    this.anyEmpty = false;
    this.anyOdd = false;
    let cells = 0;
    while (cells < width) {
      cursor.skipSpaces();
      this.readCell(actions[cells]!);
      if (!cursor.good) return false;
      cells++;
      cursor.skipSpaces();
      const byte = cursor.at < end ? bytes[cursor.at]! : LF;
      if (byte === LF || byte === CR) break;
      if (this.bySpaces) {
        const before = bytes[cursor.at - 1];
        if (before !== SPACE && before !== TAB) return false;
        continue;
      }
      if (byte !== this.delimiter || (cells === width && !this.mayTrail)) return false;
      cursor.at++;
    }
    return cells === width && this.atLineEnd();
  }

  private atLineEnd(): boolean {
    const { bytes, end, at } = this.cursor;
    if (at >= end) return true;
    return bytes[at] === LF || bytes[at] === CR;
  }

  private readCell(action: number): void {
    if (action === SKIP) {
      this.skipCell();
      return;
    }
    const { cursor } = this;
    const quoted = cursor.bytes[cursor.at] === QUOTE;
    if (quoted) cursor.at++;
    if (action >= 0) this.readTemp(action);
    else if (action === TIME) this.ticks += this.clock.readTime();
    else if (action === DATE) this.ticks += this.clock.readDate();
    if (!quoted) return;
    if (cursor.bytes[cursor.at] === QUOTE) cursor.at++;
    else cursor.good = false;
  }

  /** Anything but quotes, control characters and bytes over 127, which the careful reader looks at. */
  private skipCell(): void {
    const { cursor, delimiter } = this;
    const { bytes, end } = cursor;
    let at = cursor.at;
    for (; at < end; at++) {
      const byte = bytes[at]!;
      if (byte === delimiter || byte === LF || byte === CR) break;
      if (byte < SPACE || byte === QUOTE || byte > LAST_ASCII) {
        cursor.good = false;
        break;
      }
    }
    cursor.at = at;
  }

  private readTemp(place: number): void {
    const { cursor, suffix } = this;
    const { bytes } = cursor;
    const byte = cursor.at < cursor.end ? bytes[cursor.at]! : LF;
    if (byte === this.delimiter || byte === LF || byte === CR) {
      this.temps[place] = NaN;
      this.decimals[place] = -1;
      this.anyEmpty = true;
      return;
    }
    this.temps[place] = cursor.readNumber();
    this.decimals[place] = cursor.decimals;
    if (cursor.decimals !== this.usualDecimals[place]) this.anyOdd = true;
    for (let i = 0; i < suffix.length; i++) cursor.expect(suffix[i]!);
  }
}
