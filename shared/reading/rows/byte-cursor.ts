export const LF = 10;
export const CR = 13;
export const TAB = 9;
export const SPACE = 32;
export const QUOTE = 34;
export const PLUS = 43;
export const COMMA = 44;
export const MINUS = 45;
export const POINT = 46;
export const SLASH = 47;
export const COLON = 58;
const ZERO = 48;

const POWERS = Float64Array.from({ length: 23 }, (_, i) => Number(`1e${i}`));
/** 15 digits are below 2^53, so the digits as an integer are exact, and one division rounds right. */
const MOST_DIGITS = 15;
/** Microseconds have six decimals; finer ones are the careful reader's. */
const FRACTION_DIGITS = 6;

/**
 * A place in the bytes of a file, and the numbers that stand there. What is not of the plain kind makes
 * `good` false; the place is then of no use.
 */
export class ByteCursor {
  /** Place of the next byte. */
  at = 0;
  good = true;
  /** Digits after the mark of the number that was read last. */
  decimals = 0;
  readonly bytes: Uint8Array;
  readonly end: number;
  private readonly mark: number;
  private readonly bySpaces: boolean;

  /** @param mark the code of the decimal mark; @param bySpaces tabs and spaces part cells */
  constructor(bytes: Uint8Array, mark: number, bySpaces: boolean) {
    this.bytes = bytes;
    this.end = bytes.length;
    this.mark = mark - ZERO;
    this.bySpaces = bySpaces;
  }

  skipSpaces(): void {
    const { bytes, end } = this;
    let at = this.at;
    while (at < end && (bytes[at] === SPACE || (this.bySpaces && bytes[at] === TAB))) at++;
    this.at = at;
  }

  /** A plain number: sign, digits, the decimal mark, digits. */
  readNumber(): number {
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
    if (digits > 0 && byte === mark) {
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
    this.decimals = decimals;
    const value = decimals > 0 ? whole / POWERS[decimals]! : whole;
    return first === MINUS ? -value : value;
  }

  readInteger(most: number): number {
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

  readTwo(): number {
    const from = this.at;
    const value = this.readInteger(2);
    if (this.at !== from + 2) this.good = false;
    return value;
  }

  /** Passes one byte that must be `code`. */
  expect(code: number): void {
    if (this.bytes[this.at++] !== code) this.good = false;
  }

  /** Digits of a fraction of a second, as microseconds. */
  readMicroseconds(): number {
    const from = this.at;
    const value = this.readInteger(FRACTION_DIGITS);
    return value * POWERS[Math.max(0, FRACTION_DIGITS - (this.at - from))]!;
  }
}
