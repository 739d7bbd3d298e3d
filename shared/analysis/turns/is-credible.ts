import type { LocatedTurn } from './locate-turns.ts';

/** A located turn lies within this share of its smaller swing from the reading. */
const CREDIBLE_SHARE = 0.5;
/** A fit this sure of a turn, as a share of the greater swing beside it, is believed wherever the readings lie. */
const SURE_SHARE = 0.1;
/** Noise makes swings of this many deviations. */
export const NOISE_SWING = 8;

/**
 * A fit that ends far from the readings of a swing that is no noise, or says that it knows nothing of it, is no better
 * than the reading; nor is one further off than the greater swing beside it, however sure of itself. Else a swing that
 * noise could make is left to the fit, which shows how little of it is real.
 *
 * @param readC the reading that stands out most there, °C
 * @param swing the smaller swing beside it, K
 * @param greaterK the greater one, K
 * @param noiseK standard deviation of a reading, K
 */
export function isCredible(
  { tempC, uK }: LocatedTurn,
  readC: number,
  swing: number,
  greaterK: number,
  noiseK: number,
) {
  if (Math.abs(tempC - readC) > greaterK + NOISE_SWING * noiseK) return false;
  if (uK < SURE_SHARE * greaterK || swing < NOISE_SWING * noiseK) return true;
  return Math.abs(tempC - readC) < CREDIBLE_SHARE * swing && uK < swing;
}
