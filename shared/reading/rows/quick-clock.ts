import { daysOf, fullYear, TICKS_PER_DAY, TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Clock } from '../layout/layout.ts';
import { COLON, COMMA, MINUS, PLUS, POINT, SLASH, SPACE, type ByteCursor } from './byte-cursor.ts';
import { numberTicks } from './row-plan.ts';

const LETTER_T = 84;
const LETTER_Z = 90;
const MINUTE = 60 * TICKS_PER_S;

/** Numeric stamps and elapsed times straight from the bytes, in microseconds. */
export class QuickClock {
  /** What the zone of the stamp that was read last adds, µs. */
  offsetTicks = 0;
  private readonly cursor: ByteCursor;
  private readonly clock: Clock;
  private readonly bySpaces: boolean;
  private readonly commaParts: boolean;
  private dayKey = -1;
  private dayTicks = 0;

  constructor(cursor: ByteCursor, clock: Clock, delimiter: string) {
    this.cursor = cursor;
    this.clock = clock;
    this.bySpaces = delimiter === ' ';
    this.commaParts = delimiter === ',';
  }

  /** The time that stands at the cursor; of a date and time in two columns, the time of day. */
  readTime(): number {
    const { clock } = this;
    if (clock.kind === 'stamp') {
      const day = this.readDate();
      this.readBetween();
      return day + this.readTimeOfDay();
    }
    if (clock.kind === 'date-time') return this.readTimeOfDay();
    if (clock.kind === 'time-of-day' || clock.kind === 'minutes') return this.readElapsed();
    return numberTicks(clock, this.cursor.readNumber());
  }

  /** A numeric date as the µs of its midnight; the day before is remembered. */
  readDate(): number {
    const { cursor } = this;
    const { bytes } = cursor;
    const from = cursor.at;
    const first = cursor.readInteger(4);
    const firstDigits = cursor.at - from;
    const separator = bytes[cursor.at++];
    if (separator !== MINUS && separator !== SLASH && separator !== POINT) cursor.good = false;
    const second = cursor.readInteger(2);
    if (bytes[cursor.at++] !== separator) cursor.good = false;
    const thirdFrom = cursor.at;
    const third = cursor.readInteger(4);
    const thirdDigits = cursor.at - thirdFrom;
    const yearFirst = firstDigits === 4 && thirdDigits <= 2;
    if (!yearFirst && (firstDigits > 2 || thirdDigits % 2 === 1)) cursor.good = false;
    const key = (first * 100 + second) * 10_000 + third;
    if (key === this.dayKey || !cursor.good) return this.dayTicks;
    const days = yearFirst
      ? daysOf(first, second, third)
      : this.daysOfParts(first, second, fullYear(String(third).padStart(thirdDigits, '0')));
    if (Number.isNaN(days)) cursor.good = false;
    if (!cursor.good) return 0;
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
    const { cursor } = this;
    const byte = cursor.bytes[cursor.at];
    if (byte === LETTER_T) cursor.at++;
    else if (byte === SPACE && !this.bySpaces) cursor.skipSpaces();
    else cursor.good = false;
  }

  /** h:mm[:ss[.fff]] of a day with a zone or none. */
  private readTimeOfDay(): number {
    const { cursor } = this;
    const hours = cursor.readInteger(2);
    cursor.expect(COLON);
    const minutes = cursor.readTwo();
    let seconds = 0;
    let fraction = 0;
    if (cursor.bytes[cursor.at] === COLON) {
      cursor.at++;
      seconds = cursor.readTwo();
      fraction = this.readFraction();
    }
    if (hours > 24 || minutes > 59 || seconds > 60 || (hours === 24 && minutes + seconds > 0)) {
      cursor.good = false;
    }
    this.readZone();
    return (hours * 3600 + minutes * 60 + seconds) * TICKS_PER_S + fraction - this.offsetTicks;
  }

  private readFraction(): number {
    const { cursor } = this;
    const byte = cursor.bytes[cursor.at];
    if (byte !== POINT && !(byte === COMMA && !this.commaParts)) return 0;
    cursor.at++;
    return cursor.readMicroseconds();
  }

  private readZone(): void {
    const { cursor } = this;
    const { bytes } = cursor;
    this.offsetTicks = 0;
    if (bytes[cursor.at] === LETTER_Z) {
      cursor.at++;
      return;
    }
    const from = cursor.at;
    if (!this.bySpaces) cursor.skipSpaces();
    const sign = bytes[cursor.at];
    if (sign !== PLUS && sign !== MINUS) {
      cursor.at = from;
      return;
    }
    cursor.at++;
    const hours = cursor.readTwo();
    if (bytes[cursor.at] === COLON) cursor.at++;
    const offset = (hours * 60 + cursor.readTwo()) * MINUTE;
    this.offsetTicks = sign === MINUS ? -offset : offset;
  }

  /** m:ss, h:mm or h:mm:ss since a start or since midnight. */
  private readElapsed(): number {
    const { cursor, clock } = this;
    const first = cursor.readInteger(4);
    cursor.expect(COLON);
    const second = cursor.readTwo();
    if (second > 59) cursor.good = false;
    if (cursor.bytes[cursor.at] === COLON) {
      cursor.at++;
      const third = cursor.readTwo();
      if (third > 60) cursor.good = false;
      return (first * 3600 + second * 60 + third) * TICKS_PER_S + this.readFraction();
    }
    if (clock.kind === 'time-of-day' && !clock.minutesToo) cursor.good = false;
    const minutesFirst = clock.kind === 'minutes' && !clock.hoursFirst;
    const seconds = minutesFirst ? first * 60 + second : first * 3600 + second * 60;
    return seconds * TICKS_PER_S + this.readFraction();
  }
}
