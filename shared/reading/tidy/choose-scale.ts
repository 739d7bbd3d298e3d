import { fromCelsius, toCelsius, type TemperatureUnit } from '../../units.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';

/** What can be read: −60 to 1000 °F, the span that any probe in an exhaust can be asked for. */
const COLDEST_F = -60;
const HOTTEST_F = 1000;

const SCALES = [
  { answer: 'tenths', divisor: 10 },
  { answer: 'hundredths', divisor: 100 },
  { answer: 'thousandths', divisor: 1000 },
  { answer: 'as-is', divisor: 1 },
];

export const SCALE_ANSWERS = SCALES.map(({ answer }) => answer);

export function scaleDivisor(answer: string | undefined): number | null {
  return SCALES.find((scale) => scale.answer === answer)?.divisor ?? null;
}

export function isPlausible(temp: number, unit: TemperatureUnit): boolean {
  const tempF = fromCelsius(toCelsius(temp, unit), 'F');
  return tempF >= COLDEST_F && tempF <= HOTTEST_F;
}

/**
 * Asked where readings lie beyond reason and are whole numbers, as raw parts of a degree are; null where
 * no scale makes sense of them.
 */
export function askScale(
  temps: Float64Array,
  lowest: number,
  highest: number,
  unit: TemperatureUnit,
): QuestionDraft | null {
  const likely = SCALES.filter(
    ({ divisor }) =>
      divisor > 1 && isPlausible(highest / divisor, unit) && isPlausible(lowest / divisor, unit),
  );
  if (likely.length === 0 || !temps.every(Number.isInteger)) return null;
  return {
    about: 'scale',
    message: `The readings run from ${lowest} to ${highest}, which no exhaust does. Are they parts of a degree?`,
    options: likely.map(({ answer, divisor }) => ({
      answer,
      label: `${answer} of a degree: ${lowest / divisor} to ${highest / divisor}`,
    })),
  };
}
