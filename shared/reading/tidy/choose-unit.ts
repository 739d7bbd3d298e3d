import type { TemperatureUnit } from '../../units.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';

export type UnitRange = { lowest: number; highest: number; median: number };

const LABELS: Record<TemperatureUnit, string> = {
  F: '°F, Fahrenheit',
  C: '°C, Celsius',
  K: 'K, kelvin',
};
/** Under 250 K (−23 °C) no dryer stands. */
const COLDEST_K = 250;
/** An exhaust over 112 °C would be past every link in its stream; one over 75 °C is rare. */
const HOTTEST_C = 112;
const USUAL_C = 75;

/** The question that is asked where no unit stands in the file, the likeliest first. */
export function askUnit({ lowest, highest, median }: UnitRange): QuestionDraft {
  const likely = likelyUnit(lowest, highest, median);
  const units: TemperatureUnit[] = lowest >= COLDEST_K ? ['F', 'C', 'K'] : ['F', 'C'];
  units.sort((a, b) => Number(b === likely) - Number(a === likely));
  return {
    about: 'unit',
    message: `No unit stands with the temperatures, which run from ${lowest} to ${highest}. What are they?`,
    options: units.map((unit) => ({ answer: unit, label: LABELS[unit] })),
  };
}

function likelyUnit(lowest: number, highest: number, median: number): TemperatureUnit {
  if (lowest >= COLDEST_K && highest < COLDEST_K + 200) return 'K';
  if (highest > HOTTEST_C) return 'F';
  return median > USUAL_C || lowest >= 60 ? 'F' : 'C';
}

export function rangeOf(temps: Float64Array): UnitRange {
  const stride = Math.max(1, Math.floor(temps.length / 20_000));
  let lowest = Infinity;
  let highest = -Infinity;
  const seen: number[] = [];
  for (let i = 0; i < temps.length; i++) {
    const temp = temps[i]!;
    if (temp < lowest) lowest = temp;
    if (temp > highest) highest = temp;
    if (i % stride === 0) seen.push(temp);
  }
  const sorted = Float64Array.from(seen).sort();
  return { lowest, highest, median: sorted[sorted.length >> 1] ?? 0 };
}
