import type { Series } from './series.ts';
import { median } from './statistics/quantile.ts';

/** Enough for 1 % of the estimate; a longer record is looked at in evenly spread places. */
const LOOKED_AT = 20_000;
/** Median of the least of the three deviations below, for white noise of standard deviation 1 (simulated, 400,000 draws). */
const MEDIAN_OVER_SD = 0.2767;

export type Noise = {
  /** Standard deviation of a reading about the true temperature, rounding included, K. */
  noiseK: number;
  /** Step of the scale that the readings were rounded to, K; 0 where none is seen. */
  roundingK: number;
};

/**
 * Noise of the readings: how far each lies off the line between its neighbours, off the line carried on from the two
 * before it and off that from the two after, whichever is least. Beside a turn one of the three still holds, which
 * matters by hand, where every third reading is beside one.
 *
 * Rounding to a coarse step hides noise (most deviations are then exactly 0), so the estimate is
 * never under step/√12 (JCGM 100:2008, F.2.2.1).
 *
 * @returns zeros for fewer than five readings
 */
export function estimateNoise({ timesS, tempsC }: Series): Noise {
  const n = timesS.length;
  if (n < 5) return { noiseK: 0, roundingK: 0 };
  const stride = Math.max(1, Math.floor((n - 4) / LOOKED_AT));
  const offs = new Float64Array(Math.floor((n - 5) / stride) + 1);
  const steps = new Float64Array(offs.length);
  for (let k = 0; k < offs.length; k++) {
    const i = 2 + k * stride;
    offs[k] = Math.min(
      offLine(timesS, tempsC, i, i - 1, i + 1),
      offLine(timesS, tempsC, i, i - 1, i - 2),
      offLine(timesS, tempsC, i, i + 1, i + 2),
    );
    steps[k] = Math.abs(tempsC[i]! - tempsC[i - 1]!);
  }
  const roundingK = findRounding(steps);
  const noiseK = Math.max(median(offs) / MEDIAN_OVER_SD, roundingK / Math.sqrt(12));
  return { noiseK, roundingK };
}

/** How far reading i lies off the line through readings a and b, over the noise that the three put in. */
function offLine(
  timesS: Float64Array,
  tempsC: Float64Array,
  i: number,
  a: number,
  b: number,
): number {
  const share = (timesS[i]! - timesS[a]!) / (timesS[b]! - timesS[a]!);
  const off = tempsC[i]! - (1 - share) * tempsC[a]! - share * tempsC[b]!;
  return Math.abs(off) / Math.sqrt(1 + share * share + (1 - share) * (1 - share));
}

/** The greatest step of which (nearly) all differences are whole multiples, or 0. */
function findRounding(steps: Float64Array): number {
  let least = Infinity;
  for (const step of steps) if (step > 1e-4 && step < least) least = step;
  if (!Number.isFinite(least)) return 0;
  let whole = 0;
  for (const step of steps) {
    const multiples = step / least;
    if (Math.abs(multiples - Math.round(multiples)) < 0.02) whole++;
  }
  return whole >= 0.98 * steps.length ? least : 0;
}
