import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';

/** Rise that motor and friction give by themselves, K (15 °F, common practice). */
const LEAST_RISE_K = 15 / 1.8;
/** How long heat is waited for, s. */
const LEAST_S = 300;
/** Above this a start is not near any room, °C (104 °F). */
const WARMEST_ROOM_C = 40;
/** A start this near a known room is a start from it, K (15 °F). */
const NEAR_ROOM_K = 15 / 1.8;
/** Readings averaged at the start and for the highest, so that one is not noise. */
const READINGS = 3;

/**
 * Under 15 °F of rise in five minutes or more, from a start near the room.
 *
 * Assumes that heat was asked for; the finding's first check says so.
 *
 * Evidence: riseK, durationS, roomC.
 */
export function findNoHeat(facts: RunFacts): Finding | null {
  const { series, durationS, roomC } = facts;
  const n = series.tempsC.length;
  if (!facts.input.rating || durationS < LEAST_S || n <= READINGS || facts.cutOuts.length > 0)
    return null;
  const startC = meanOf(series.tempsC, 0);
  const nearRoom =
    roomC === null ? startC < WARMEST_ROOM_C : Math.abs(startC - roomC) < NEAR_ROOM_K;
  let highestC = startC;
  for (let i = 1; i + READINGS <= n; i++) highestC = Math.max(highestC, meanOf(series.tempsC, i));
  if (!nearRoom || highestC - startC >= LEAST_RISE_K) return null;
  return {
    code: 'no-heat',
    fromS: 0,
    toS: durationS,
    evidence: { riseK: highestC - startC, durationS, roomC },
  };
}

function meanOf(tempsC: Float64Array, from: number): number {
  let sum = 0;
  for (let i = from; i < from + READINGS; i++) sum += tempsC[i]!;
  return sum / READINGS;
}
