import type { DisplayUnit } from '../../units.ts';
import { plausibleValue, type LiveValue } from './live-value.ts';

/** What a person said of the lines of a serial probe; null: not asked yet. */
export type SerialAnswers = {
  /** Where a line names no unit. */
  unit: DisplayUnit | null;
  /** What a comma between figures is. */
  comma: 'decimal' | 'apart' | null;
  /** Which number of a line with several: the `at`-th (from 0) of `of`. */
  place: { at: number; of: number } | null;
};

export const NOTHING_SAID: SerialAnswers = { unit: null, comma: null, place: null };

/** What must be known before a line can be read; the options are shown as they stand in the line. */
export type SerialQuestion =
  | { about: 'unit'; line: string; number: string }
  | { about: 'comma'; line: string; number: string }
  | { about: 'place'; line: string; numbers: string[] };

/** What a line is: a value, a question, or nothing that can be read. */
export type SerialLine =
  | { is: 'value'; value: LiveValue }
  | { is: 'question'; question: SerialQuestion }
  /** No number, another count of numbers than was said, or a unit that is no °C or °F. */
  | { is: 'unread' };

/**
 * A number that stands by itself: not the figure in `T1` or `0x1F`, but `154.2F`, `T=154,2` and `+1.5e2` are. Full
 * stops or commas that follow each other (1.2.3) make no number.
 */
const NUMBER = /(?<![\p{L}\d_]|\d[.,])[+\-−]?\d+(?:[.,]\d+)?(?:e[+-]?\d{1,2})?(?![\d_]|[.,]\d)/giu;
/** What follows a number that is no temperature; a letter right behind a figure is a unit of something else as well. */
const OTHER_QUANTITY =
  /^(?:[\p{L}%]|\s*(?:%|[hkM]?Pa|m?bar|[mµu]?[VA]|k?ohm|[kM]?Hz|m?s|min|rpm|ppm|lx)(?![\p{L}\d]))/u;
/** Right after a number: degrees are optional; a broken degree sign is what another encoding leaves. */
const UNIT_AFTER =
  /^\s*(?:[°º\uFFFD]|deg(?:rees)?\b|Â°)?\s*(celsius|fahrenheit|kelvin|[CFK])(?![\p{L}\d])/iu;
/** Anywhere else, only where it cannot be anything but a unit. */
const UNIT_IN_LABEL = /[°º](C|F)(?![\p{L}])|[([](?:deg\s*)?(C|F)[)\]]/giu;

/**
 * Reads one line of a serial probe. Nothing is guessed: a line with two numbers, a comma that may part or point, and a
 * number without a unit are asked about until a person has said it.
 *
 * @param line without its end
 * @returns the value in the unit that stands in the line, else in the one that was said
 */
export function readSerialLine(line: string, answers: SerialAnswers): SerialLine {
  const comma = commaOf(line, answers);
  if (typeof comma === 'object') return { is: 'question', question: comma };
  const numbers = numbersIn(comma === 'apart' ? line.replaceAll(',', ' , ') : line);
  const chosen = chooseNumber(numbers, answers);
  if (chosen === 'ask') {
    const texts = numbers.map(({ text }) => text);
    return { is: 'question', question: { about: 'place', line, numbers: texts } };
  }
  if (chosen === null) return { is: 'unread' };
  return readNumber(line, chosen, answers);
}

type FoundNumber = { text: string; after: string };

function numbersIn(line: string): FoundNumber[] {
  return [...line.matchAll(NUMBER)].map((match) => ({
    text: match[0],
    after: line.slice(match.index + match[0].length),
  }));
}

/** Apart where a full stop is the decimal mark, or where no number has one comma in it; else as it was said. */
function commaOf(line: string, { comma }: SerialAnswers): 'decimal' | 'apart' | SerialQuestion {
  if (/\d\.\d/.test(line)) return 'apart';
  const number = numbersIn(line).find(({ text }) => text.includes(','))?.text;
  return number === undefined ? 'apart' : (comma ?? { about: 'comma', line, number });
}

function chooseNumber(
  numbers: FoundNumber[],
  { place }: SerialAnswers,
): FoundNumber | 'ask' | null {
  if (numbers.length <= 1) return place === null || place.of === 1 ? (numbers[0] ?? null) : null;
  if (place === null) return 'ask';
  return place.of === numbers.length ? (numbers[place.at] ?? null) : null;
}

function readNumber(
  line: string,
  { text, after }: FoundNumber,
  answers: SerialAnswers,
): SerialLine {
  const own = unitAfter(after);
  if (own === 'K' || (own === null && OTHER_QUANTITY.test(after))) return { is: 'unread' };
  const written = own ?? unitInLabel(line);
  const unit = written ?? answers.unit;
  if (unit === null) return { is: 'question', question: { about: 'unit', line, number: text } };
  const temp = Number(text.replace(',', '.').replace('−', '-'));
  return { is: 'value', value: plausibleValue(temp, unit) };
}

function unitAfter(after: string): DisplayUnit | 'K' | null {
  const letter = UNIT_AFTER.exec(after)?.[1]?.[0]?.toUpperCase();
  return letter === 'C' || letter === 'F' || letter === 'K' ? letter : null;
}

/** Named in the label, and by one name only. */
function unitInLabel(line: string): DisplayUnit | null {
  const named = new Set(
    [...line.matchAll(UNIT_IN_LABEL)].map((match) => (match[1] ?? match[2] ?? '').toUpperCase()),
  );
  const [unit] = named;
  return named.size === 1 && (unit === 'C' || unit === 'F') ? unit : null;
}
