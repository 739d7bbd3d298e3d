import { FINDING_CODES, type FindingCode } from '#shared/analysis/analysis.ts';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';
import { fromCelsius } from '#shared/units.ts';
import type { Plan } from './plans.ts';

/** Headlines that are right for a run. More than one where the truth lies so near a limit that either may be said. */
export type TrueCodes = { allowed: FindingCode[]; sound: boolean; faulty: boolean };

/** °F by which a true mean must clear a limit before only one answer is right: the probe's U of 2.3 and a little. */
const CLEAR_F = 2.9;

/**
 * What the noise-free turns say by the definitions, with the probe's accuracy as the engine is told it. The rating is
 * the default: 155 ± 5 and 130 ± 5 °F, 10 allowed beyond each.
 */
export function trueCodes(plan: Plan, turns: TrueTurn[]): TrueCodes {
  if (plan.cause) {
    const faulty = plan.cause !== 'too-short';
    return { allowed: [plan.cause], sound: false, faulty };
  }
  const tempsF = (kind: TrueTurn['kind']) =>
    turns.filter((turn) => turn.kind === kind).map(({ tempC }) => fromCelsius(tempC, 'F'));
  const allCutOuts = tempsF('cut-out');
  const cutOuts = allCutOuts.length < 2 ? allCutOuts : allCutOuts.slice(1);
  const resets = tempsF('reset');
  // Up there with one cut-out to go by, a record that ends is a runaway by the definition.
  if (plan.faults.oneLate && (allCutOuts.length < 2 || resets.length < 1)) {
    return { allowed: ['too-short', 'runaway'], sound: false, faulty: false };
  }
  if (allCutOuts.length < 2 || resets.length < 1)
    return { allowed: ['too-short'], sound: false, faulty: false };

  const signs = [trend(cutOuts), spread(cutOuts), ...sides(cutOuts, resets)];
  const certain = signs.filter(({ how }) => how === 'certain').map(({ code }) => code);
  const possible = signs.filter(({ how }) => how === 'possible').map(({ code }) => code);
  const first = FINDING_CODES.find((code) => certain.includes(code));
  const unnamed = first ? [first] : unnamedCodes(cutOuts, resets);
  const sound = !first && possible.length === 0 && unnamed.length === 1 && unnamed[0] === 'in-band';
  const earlier = possible.filter(
    (code) => !first || FINDING_CODES.indexOf(code) < FINDING_CODES.indexOf(first),
  );
  return { allowed: [...earlier, ...unnamed], sound, faulty: first !== undefined };
}

type Sign = { code: FindingCode; how: 'certain' | 'possible' | 'no' };

function sides(cutOuts: number[], resets: number[]): Sign[] {
  return [
    { code: 'opens-high', how: beyond(mean(cutOuts) - 170) },
    { code: 'opens-low', how: beyond(150 - mean(cutOuts)) },
    { code: 'closes-high', how: beyond(mean(resets) - 135) },
    { code: 'closes-low', how: beyond(115 - mean(resets)) },
  ];
}

function beyond(byF: number): Sign['how'] {
  if (byF > CLEAR_F) return 'certain';
  return byF > 1.5 ? 'possible' : 'no';
}

function trend(cutOuts: number[]): Sign {
  const n = cutOuts.length;
  if (n < 4) return { code: 'drifting', how: 'no' };
  const { slope, sd } = line(cutOuts);
  const totalF = Math.abs(slope * (n - 1));
  const errors = Math.abs(slope) / Math.max(1e-6, sd / Math.sqrt((n * (n * n - 1)) / 12));
  if (totalF > 6.5 && errors > 6) return { code: 'drifting', how: 'certain' };
  return { code: 'drifting', how: totalF > 4 && errors > 2.5 ? 'possible' : 'no' };
}

function spread(cutOuts: number[]): Sign {
  if (cutOuts.length < 4) return { code: 'scattered', how: 'no' };
  const { sd } = line(cutOuts);
  return { code: 'scattered', how: sd > 4.8 ? 'certain' : sd > 3.2 ? 'possible' : 'no' };
}

/** In band, too close or mixed, by how far the points are from the edges. */
function unnamedCodes(cutOuts: number[], resets: number[]): FindingCode[] {
  const outside = Math.max(
    ...cutOuts.map((tempF) => Math.max(tempF - 170, 150 - tempF)),
    ...resets.map((tempF) => Math.max(tempF - 135, 115 - tempF)),
  );
  if (outside > CLEAR_F) return ['mixed'];
  if (outside > 1.5) return ['mixed', 'too-close', 'in-band'];
  const means = Math.max(Math.abs(mean(cutOuts) - 155), Math.abs(mean(resets) - 130));
  if (means < 4.2) return ['in-band'];
  return means > 5.8 ? ['too-close'] : ['in-band', 'too-close'];
}

function line(values: number[]): { slope: number; sd: number } {
  const n = values.length;
  const middle = (n - 1) / 2;
  const level = mean(values);
  const sxx = (n * (n * n - 1)) / 12;
  const slope = values.reduce((sum, value, i) => sum + (i - middle) * (value - level), 0) / sxx;
  const squares = values.reduce(
    (sum, value, i) => sum + (value - level - slope * (i - middle)) ** 2,
    0,
  );
  return { slope, sd: Math.sqrt(squares / Math.max(1, n - 2)) };
}

function mean(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
