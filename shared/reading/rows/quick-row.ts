import { daysOf, fullYear, TICKS_PER_DAY, TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import { DATE, numberTicks, SKIP, TIME, type RowPlan } from './row-plan.ts';

const LF = 10;
const CR = 13;
const SPACE = 32;
const QUOTE = 34;
const PLUS = 43;
const COMMA = 44;
const MINUS = 45;
const POINT = 46;
const ZERO = 48;
const COLON = 58;

const POWERS = Float64Array.from({ length: 23 }, (_, i) => Number(`1e${i}`));
/** 15 digits are below 2^53, so the digits as an integer are exact, and one division rounds right. */
const MOST_DIGITS = 15;

/**
 * Reads the common row straight from the bytes: plain numbers and numeric stamps, no text made. What it
 * does not know it refuses, and the careful reader takes that row; what it reads, both read alike.
 */
export class QuickRow {
  /** Place of the next byte. */
  at = 0;
  ticks = 0;
  offsetTicks = 0;
  /** One a temperature column; NaN where its cell is empty. */
  readonly temps: Float64Array;
  anyEmpty = false;

  private readonly bytes: Uint8Array;
  private readonly end: number;
  private readonly actions: Int32Array;
  private readonly clock: Clock;
  private readonly delimiter: number;
  private readonly bySpaces: boolean;
  private readonly mark: number;
  private readonly suffix: Uint8Array;
  private good = true;
  private dayKey = -1;
  private dayTicks = 0;

  constructor(bytes: Uint8Array, plan: RowPlan, suffix: Uint8Array) {
    const { layout } = plan;
    this.bytes = bytes;
    this.end = bytes.length;
    this.actions = plan.actions;
    this.clock = layout.clock;
    this.delimiter = layout.delimiter.charCodeAt(0);
    this.bySpaces = layout.delimiter === ' ';
    this.mark = layout.decimal.charCodeAt(0);
    this.suffix = suffix;
    this.temps = new Float64Array(layout.tempColumns.length);
  }

  /** Reads the row at `from`; false where it is not of the common kind. `at` is then of no use. */
  read(from: number): boolean {
    const { bytes, end, actions } = this;
    const width = actions.length;
    this.at = from;
    this.good = true;
    this.ticks = 0;
    this.offsetTicks = 0;
    this.anyEmpty = false;
    let cells = 0;
    while (cells < width) {
      this.skipSpaces();
      this.readCell(actions[cells]!);
      if (!this.good) return false;
      cells++;
      this.skipSpaces();
      const byte = this.at < end ? bytes[this.at]! : LF;
      if (byte === LF || byte === CR) break;
      if (this.bySpaces) {
        if (bytes[this.at - 1] !== SPACE && bytes[this.at - 1] !== 9) return false;
        continue;
      }
      if (byte !== this.delimiter) return false;
      this.at++;
    }
    return cells === width && this.atLineEnd();
  }

  private atLineEnd(): boolean {
    if (this.at >= this.end) return true;
    const byte = this.bytes[this.at]!;
    return byte === LF || byte === CR;
  }

  private skipSpaces(): void {
    const { bytes, end } = this;
    let at = this.at;
    while (at < end && (bytes[at] === SPACE || (this.bySpaces && bytes[at] === 9))) at++;
    this.at = at;
  }

  private readCell(action: number): void {
    if (action === SKIP) {
      this.skipCell();
      return;
    }
    const quoted = this.bytes[this.at] === QUOTE;
    if (quoted) this.at++;
    if (action >= 0) this.readTemp(action);
    else if (action === TIME) this.readTime();
    else if (action === DATE) this.ticks += this.readDate();
    if (!quoted) return;
    if (this.bytes[this.at] === QUOTE) this.at++;
    else this.good = false;
  }

  /** Anything but quotes, control characters and bytes over 127, which the careful reader looks at. */
  private skipCell(): void {
    const { bytes, end, delimiter } = this;
    let at = this.at;
    for (; at < end; at++) {
      const byte = bytes[at]!;
      if (byte === delimiter || byte === LF || byte === CR) break;
      if (byte < SPACE || byte === QUOTE || byte > 126) {
        this.good = false;
        break;
      }
    }
    this.at = at;
  }

  private readTemp(place: number): void {
    const { bytes, suffix } = this;
    const byte = this.at < this.end ? bytes[this.at]! : LF;
    if (byte === this.delimiter || byte === LF || byte === CR) {
      this.temps[place] = NaN;
      this.anyEmpty = true;
      return;
    }
    this.temps[place] = this.readNumber();
    for (let i = 0; i < suffix.length; i++) {
      if (bytes[this.at++] !== suffix[i]) this.good = false;
    }
  }

  /** A plain number: sign, digits, the decimal mark, digits. */
  private readNumber(): number {
    const { bytes, end, mark } = this;
    let at = this.at;
    const first = bytes[at];
    if (first === MINUS || first === PLUS) at++;
    let digits = 0;
    let decimals = 0;
    let whole = 0;
    let byte = at < end ? bytes[at]! - ZERO : -1;
    while (byte >= 0 && byte <= 9) {
      whole = whole * 10 + byte;
      digits++;
      at++;
      byte = at < end ? bytes[at]! - ZERO : -1;
    }
    if (digits > 0 && byte === mark - ZERO) {
      at++;
      byte = at < end ? bytes[at]! - ZERO : -1;
      while (byte >= 0 && byte <= 9) {
        whole = whole * 10 + byte;
        decimals++;
        at++;
        byte = at < end ? bytes[at]! - ZERO : -1;
      }
      // "70." and "70,250" with a comma that may group belong to the careful reader
      if (decimals === 0) this.good = false;
    }
    if (digits === 0 || digits + decimals > MOST_DIGITS) this.good = false;
    this.at = at;
    const value = decimals > 0 ? whole / POWERS[decimals]! : whole;
    return first === MINUS ? -value : value;
  }

  private readTime(): void {
    const { clock } = this;
    if (clock.kind === 'stamp') {
      this.ticks += this.readDate();
      this.readBetween();
      this.readClock();
    } else if (clock.kind === 'date-time') this.readClock();
    else if (clock.kind === 'time-of-day' || clock.kind === 'minutes') this.readElapsed(clock);
    else this.ticks = numberTicks(clock, this.readNumber());
  }

  private readInteger(most: number): number {
    const { bytes, end } = this;
    const from = this.at;
    let at = from;
    let value = 0;
    let byte = at < end ? bytes[at]! - ZERO : -1;
    while (byte >= 0 && byte <= 9) {
      value = value * 10 + byte;
      at++;
      byte = at < end ? bytes[at]! - ZERO : -1;
    }
    if (at === from || at - from > most) this.good = false;
    this.at = at;
    return value;
  }

  /** A numeric date as microseconds of its midnight; the day before is remembered. */
  private readDate(): number {
    const { bytes } = this;
    const from = this.at;
    const first = this.readInteger(4);
    const firstDigits = this.at - from;
    const separator = bytes[this.at++];
    if (separator !== MINUS && separator !== 47 && separator !== POINT) this.good = false;
    const second = this.readInteger(2);
    if (bytes[this.at++] !== separator) this.good = false;
    const thirdFrom = this.at;
    const third = this.readInteger(4);
    const thirdDigits = this.at - thirdFrom;
    const yearFirst = firstDigits === 4 && thirdDigits <= 2;
    if (!yearFirst && (firstDigits > 2 || thirdDigits % 2 === 1)) this.good = false;
    const key = (first * 100 + second) * 10_000 + third;
    if (key === this.dayKey || !this.good) return this.dayTicks;
    const days = yearFirst
      ? daysOf(first, second, third)
      : this.daysOfParts(first, second, fullYear(String(third).padStart(thirdDigits, '0')));
    if (Number.isNaN(days)) this.good = false;
    if (!this.good) return 0;
    this.dayKey = key;
    this.dayTicks = days * TICKS_PER_DAY;
    return this.dayTicks;
  }

  private daysOfParts(first: number, second: number, year: number): number {
    const { clock } = this;
    if (clock.kind !== 'stamp' && clock.kind !== 'date-time') return NaN;
    if (clock.order === 'dmy') return daysOf(year, second, first);
    return clock.order === 'mdy' ? daysOf(year, first, second) : NaN;
  }

  /** T, or spaces, between date and time. */
  private readBetween(): void {
    const byte = this.bytes[this.at];
    if (byte === 84) this.at++;
    else if (byte === SPACE && !this.bySpaces) this.skipSpaces();
    else this.good = false;
  }

  /** h:mm[:ss[.fff]] of a day with a zone or none. */
  private readClock(): void {
    const { bytes } = this;
    const hours = this.readInteger(2);
    if (bytes[this.at++] !== COLON) this.good = false;
    const minutes = this.readTwo();
    let seconds = 0;
    let fraction = 0;
    if (bytes[this.at] === COLON) {
      this.at++;
      seconds = this.readTwo();
      fraction = this.readFraction();
    }
    if (hours > 24 || minutes > 59 || seconds > 60 || (hours === 24 && minutes + seconds > 0)) {
      this.good = false;
    }
    this.readZone();
    this.ticks +=
      (hours * 3600 + minutes * 60 + seconds) * TICKS_PER_S + fraction - this.offsetTicks;
  }

  private readTwo(): number {
    const from = this.at;
    const value = this.readInteger(2);
    if (this.at !== from + 2) this.good = false;
    return value;
  }

  private readFraction(): number {
    const byte = this.bytes[this.at];
    if (byte !== POINT && !(byte === COMMA && this.delimiter !== COMMA)) return 0;
    this.at++;
    const from = this.at;
    const value = this.readInteger(6);
    return value * POWERS[Math.max(0, 6 - (this.at - from))]!;
  }

  private readZone(): void {
    const { bytes } = this;
    if (bytes[this.at] === 90) {
      this.at++;
      return;
    }
    const from = this.at;
    if (!this.bySpaces) this.skipSpaces();
    const sign = bytes[this.at];
    if (sign !== PLUS && sign !== MINUS) {
      this.at = from;
      return;
    }
    this.at++;
    const hours = this.readTwo();
    if (bytes[this.at] === COLON) this.at++;
    const minutes = this.readTwo();
    const offset = (hours * 60 + minutes) * 60 * TICKS_PER_S;
    this.offsetTicks = sign === MINUS ? -offset : offset;
  }

  /** m:ss, h:mm or h:mm:ss since a start or since midnight. */
  private readElapsed(clock: Clock): void {
    const { bytes } = this;
    const first = this.readInteger(4);
    if (bytes[this.at++] !== COLON) this.good = false;
    const second = this.readTwo();
    if (second > 59) this.good = false;
    if (bytes[this.at] === COLON) {
      this.at++;
      const third = this.readTwo();
      if (third > 60) this.good = false;
      this.ticks = (first * 3600 + second * 60 + third) * TICKS_PER_S + this.readFraction();
      return;
    }
    const minutesFirst = clock.kind === 'minutes' && !clock.hoursFirst;
    const seconds = minutesFirst ? first * 60 + second : first * 3600 + second * 60;
    this.ticks = seconds * TICKS_PER_S + this.readFraction();
  }
}
