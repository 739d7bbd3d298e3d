import { firstAtOrAfter } from './first-at-or-after.ts';
import { fitNearGuess } from './fit-near-guess.ts';
import { fitResponse } from './fit-response.ts';
import type { LegFit } from './run-facts.ts';

const MOST_VALUES = 400;
/** Values a leg keeps among thousands: its errors grow by a hundredth or so, and its cost no longer shows. */
const FEW_VALUES = 24;
const LEAST_READINGS = 5;

/** Where a leg lies, and a τ to try first. */
export type LegSpan = { fromS: number; toS: number; guessTauS: number | null };

/**
 * fitResponse over part of a record, given by time; thins it out to at most 400 values.
 *
 * @param quickly one leg among thousands: to at most 24 values, by a few steps from the guess where those settle
 * @returns null where fitResponse does, and under five readings
 */
export function fitLeg(
  timesS: Float64Array,
  tempsC: Float64Array,
  { fromS, toS, guessTauS }: LegSpan,
  quickly = false,
): LegFit | null {
  const from = firstAtOrAfter(timesS, fromS);
  const to = firstAtOrAfter(timesS, toS + 1e-9);
  if (to - from < LEAST_READINGS) return null;
  const each = Math.ceil((to - from) / (quickly ? FEW_VALUES : MOST_VALUES));
  const times = meansOf(timesS, from, to, each);
  const temps = meansOf(tempsC, from, to, each);
  const near = quickly && guessTauS !== null ? fitNearGuess(times, temps, guessTauS) : null;
  const fit = near ?? fitResponse(times, temps, times[0], { startC: null, guessTauS });
  if (!fit) return null;
  const { asymptoteC, asymptoteErrorK, tauS, tauErrorS, startC, covarianceKS } = fit;
  const part = { asymptoteC, asymptoteErrorK, tauS, tauErrorS, startC, covarianceKS };
  const residualSdK = fit.residualSdK * Math.sqrt(each);
  return { ...part, fromS: times[0]!, toS: times[times.length - 1]!, residualSdK };
}

/** Means of `each` values at a time. */
function meansOf(values: Float64Array, from: number, to: number, each: number): Float64Array {
  const means = new Float64Array(Math.ceil((to - from) / each));
  for (let k = 0; k < means.length; k++) {
    const first = from + k * each;
    const last = Math.min(to, first + each);
    let sum = 0;
    for (let i = first; i < last; i++) sum += values[i]!;
    means[k] = sum / (last - first);
  }
  return means;
}
