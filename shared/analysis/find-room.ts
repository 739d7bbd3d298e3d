import type { Rating } from './rating.ts';
import type { Extreme } from './run-facts.ts';
import type { Series } from './series.ts';
import { bandOf } from './judge-point.ts';
import { median } from './statistics/quantile.ts';

const FIRST_READINGS = 5;
const FIRST_S = 10;

/**
 * Whether an extreme is a valley from which a cold machine starts to heat: at the record's start or left by a person,
 * and well below where the machine itself turns (half a swing below its resets; with none, under the reset band and
 * its allowance; with no rating either, a start is taken for cold).
 */
export function isColdStart(extremes: Extreme[], i: number, rating: Rating | null): boolean {
  const valley = extremes[i];
  const peak = extremes[i + 1];
  if (!valley || !peak || valley.kind !== 'valley' || valley.turnedBy === 'machine') return false;
  const resets = extremes.filter((e) => e.kind === 'valley' && e.turnedBy === 'machine');
  if (resets.length > 0) {
    const usualC = median(resets.map(({ tempC }) => tempC));
    return valley.tempC < usualC - 0.5 * Math.abs(peak.tempC - usualC);
  }
  return rating === null || valley.tempC < bandOf('reset', rating).lowEndC;
}

/** Temperature of the room, °C: as given, else the first readings of a cold start, else null. */
export function findRoom(
  { timesS, tempsC }: Series,
  givenC: number | null,
  coldStart: boolean,
): number | null {
  if (givenC !== null || !coldStart) return givenC;
  let count = 1;
  while (count < timesS.length && (count < FIRST_READINGS || timesS[count]! <= FIRST_S)) count++;
  const first = tempsC.subarray(0, Math.min(count, FIRST_READINGS));
  return Math.min(first[0]!, median(first));
}
