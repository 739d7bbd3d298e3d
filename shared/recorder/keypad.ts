import type { DisplayUnit } from '../units.ts';
import { plausibleSpan, type Expected } from './expect-reading.ts';

/**
 * The keypad takes a reading in two or three taps. It never guesses where two readings are plausible, and whatever it
 * keeps ends in the figures that were typed.
 */

/** How readings are typed in a run. */
export type KeypadSetup = { unit: DisplayUnit; hasTenths: boolean };

/** What has been typed of one reading. */
export type Typing = {
  /** Figures in the order of the taps. */
  digits: string;
  /** When the first finger went down, s of the run; null before that. */
  atS: number | null;
  /** `last`: hundreds are left out; `all`: every figure; `hundreds`: asked for after the others; `sure`: one more tap. */
  asks: 'last' | 'all' | 'hundreds' | 'sure';
  /** Where it asks to be sure: what would be kept. */
  doubted: number | null;
};

export type KeypadAnswer =
  | { does: 'go-on'; typing: Typing }
  /** `atS` is that of the first tap. */
  | { does: 'keep'; temp: number; atS: number };

/** Beyond this gap nothing is guessed: all figures are typed. */
export const GUESS_FOR_S = 45;
/** A guess further off than this is asked about: 25 °F. */
const SURE_WITHIN = { F: 25, C: 25 / 1.8 } as const;
/** Without a reading to go by, what an exhaust may be: common practice for a dryer and its limits. */
const FIRST_SPAN = { F: { low: 20, high: 300 }, C: { low: -7, high: 150 } } as const;

/** Nothing typed yet. */
export function emptyTyping(expected: Expected | null): Typing {
  const mayGuess = expected !== null && expected.gapS <= GUESS_FOR_S;
  return { digits: '', atS: null, asks: mayGuess ? 'last' : 'all', doubted: null };
}

/**
 * One figure typed.
 *
 * @param digit '0' to '9'
 * @param downAtS when the finger went down, s of the run
 * @param expected what the reading should be about at this moment; null before the first reading
 */
export function typeDigit(
  typing: Typing,
  digit: string,
  downAtS: number,
  expected: Expected | null,
  setup: KeypadSetup,
): KeypadAnswer {
  if (!/^[0-9]$/.test(digit)) throw new RangeError(`not a figure: ${digit}`);
  if (typing.asks === 'sure') return answerDoubt(typing, digit, downAtS, expected, setup);
  const atS = typing.atS ?? downAtS;
  if (typing.asks === 'hundreds') {
    return keepWhole({ ...typing, digits: digit + typing.digits }, atS, expected, setup);
  }
  const digits = typing.digits + digit;
  const grown: Typing = { ...typing, digits, atS };
  if (digits.length < figuresOf(typing.asks, setup)) return { does: 'go-on', typing: grown };
  return typing.asks === 'all'
    ? keepWhole(grown, atS, expected, setup)
    : keepLast(grown, atS, expected, setup);
}

/** The same figure again keeps what was doubted; another one begins a new reading. */
function answerDoubt(
  typing: Typing,
  digit: string,
  downAtS: number,
  expected: Expected | null,
  setup: KeypadSetup,
): KeypadAnswer {
  if (typing.doubted !== null && digit === typing.digits.at(-1)) {
    return { does: 'keep', temp: typing.doubted, atS: typing.atS ?? downAtS };
  }
  return typeDigit(emptyTyping(expected), digit, downAtS, expected, setup);
}

function keepWhole(
  typing: Typing,
  atS: number,
  expected: Expected | null,
  setup: KeypadSetup,
): KeypadAnswer {
  const temp = valueOf(typing.digits, setup);
  const { low, high } = expected
    ? widened(plausibleSpan(expected, setup.unit), expected.temp, SURE_WITHIN[setup.unit])
    : FIRST_SPAN[setup.unit];
  if (temp >= low && temp <= high) return { does: 'keep', temp, atS };
  return { does: 'go-on', typing: { ...typing, asks: 'sure', doubted: temp } };
}

function keepLast(
  typing: Typing,
  atS: number,
  expected: Expected | null,
  setup: KeypadSetup,
): KeypadAnswer {
  if (!expected) throw new RangeError('figures cannot be left out without a reading to go by');
  const { low, high } = plausibleSpan(expected, setup.unit);
  const candidates = candidatesOf(typing.digits, setup);
  const plausible = candidates.filter((temp) => temp >= low && temp <= high);
  const [nearest = NaN, next = NaN] = nearestFirst(expected.temp, candidates);
  const offBy = Math.abs(nearest - expected.temp);
  const within = SURE_WITHIN[setup.unit];
  if (plausible.length <= 1 && offBy <= within) return { does: 'keep', temp: nearest, atS };
  // Below zero a third figure would not settle it: the sign is typed under Other.
  const isEither = plausible.length > 1 || Math.abs(next - expected.temp) - offBy < within;
  return {
    does: 'go-on',
    typing: isEither
      ? { ...typing, asks: 'hundreds' }
      : { ...typing, asks: 'sure', doubted: nearest },
  };
}

/** Every value that ends in the figures typed: below zero, and from 0 up to 900. */
export function candidatesOf(digits: string, setup: KeypadSetup): number[] {
  const last = valueOf(digits, setup);
  const hundreds = Array.from({ length: 10 }, (_, i) => i * 100 + last);
  return last === 0 ? hundreds : [-last, ...hundreds];
}

function nearestFirst(temp: number, candidates: number[]): number[] {
  return [...candidates].sort((a, b) => Math.abs(a - temp) - Math.abs(b - temp));
}

function widened(span: { low: number; high: number }, middle: number, reach: number) {
  return { low: Math.min(span.low, middle - reach), high: Math.max(span.high, middle + reach) };
}

/** How many taps this way of typing takes: two or three, and one more for tenths. */
export function figuresOf(asks: Typing['asks'], { hasTenths }: KeypadSetup): number {
  return (asks === 'last' ? 2 : 3) + (hasTenths ? 1 : 0);
}

/** '1413' with tenths is 141.3. */
function valueOf(digits: string, { hasTenths }: KeypadSetup): number {
  return hasTenths ? Number(`${digits.slice(0, -1)}.${digits.slice(-1)}`) : Number(digits);
}

/** What the wheels show: figures typed, the hundreds that would be taken, and where the next tap goes. */
export type Wheel = { figure: string; look: 'typed' | 'guess' | 'next' | 'open' | 'point' };

/** @param expected as for typeDigit, at the moment that is shown */
export function wheelsOf(typing: Typing, expected: Expected | null, setup: KeypadSetup): Wheel[] {
  const whole = figuresOf('all', setup);
  const { digits, asks } = typing;
  const lacksHundreds = digits.length < whole && asks !== 'all';
  const hundreds = lacksHundreds ? hundredsShown(typing, expected, setup) : null;
  const typed = Array.from(digits, (figure): Wheel => ({ figure, look: 'typed' }));
  const wheels = hundreds ? [hundreds, ...typed] : typed;
  while (wheels.length < whole) {
    const isNext = asks !== 'hundreds' && wheels.length === (hundreds ? 1 : 0) + digits.length;
    wheels.push({ figure: '', look: isNext ? 'next' : 'open' });
  }
  if (setup.hasTenths) wheels.splice(-1, 0, { figure: '.', look: 'point' });
  return wheels;
}

function hundredsShown(
  { digits, asks, doubted }: Typing,
  expected: Expected | null,
  setup: KeypadSetup,
): Wheel {
  if (asks === 'hundreds') return { figure: '', look: 'next' };
  const guess = doubted ?? guessedValue(digits, expected, setup);
  if (guess === null) return { figure: '', look: 'open' };
  const figure = guess < 0 ? '−' : String(Math.floor(guess / 100));
  return { figure: figure === '0' ? '' : figure, look: 'guess' };
}

function guessedValue(digits: string, expected: Expected | null, setup: KeypadSetup) {
  if (!expected) return null;
  if (digits.length < figuresOf('last', setup)) return expected.temp < 0 ? null : expected.temp;
  return nearestFirst(expected.temp, candidatesOf(digits, setup))[0] ?? null;
}
