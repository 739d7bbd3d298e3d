import type { Finding } from '../analysis.ts';
import { bandOf } from '../judge-point.ts';
import type { RunFacts } from '../run-facts.ts';
import { firstCrossing, marksWithin, spanOf, totalU } from './trace.ts';

/** Share of the way from the reset band down to the room that must be gone before the return is given up. */
const GONE_SHARE = 0.4;
/** How far under the machine's own resets a fall must go, K (8 °F). */
const BELOW_OWN_K = 8 / 1.8;
/** Where the room is not known, a usual one, °C (72 °F). */
const USUAL_ROOM_C = 40 / 1.8;

/**
 * After heating, the exhaust falls through the reset band and goes on towards the room with no reset, and nobody
 * turned it off: something opened for good, or the timer ended the heat.
 *
 * Assumes that a machine which comes back does so before the exhaust is 8 °F under its own earlier resets; where it has
 * none, before it has gone 0.4 of the way from the band to the room.
 *
 * Evidence: fallFromC, lastC, belowResetAtS, cutOutsBefore, roomC.
 */
export function findHeatLost(facts: RunFacts): Finding | null {
  const { rating } = facts.input;
  const leg = facts.legs.at(-1);
  if (!rating || !leg || leg.kind !== 'cooling') return null;
  const { from, to } = leg;
  if (from.turnedBy === 'person' || from.turnedBy === 'start') return null;
  const before = facts.legs.at(-2)?.from.timeS ?? 0;
  const off = marksWithin(facts, { fromS: before, toS: to.timeS }, ['heat-off', 'stopped']);
  if (off.length > 0) return null;

  const { lowC } = bandOf('reset', rating);
  const roomC = facts.roomC ?? USUAL_ROOM_C;
  const givenUpC =
    facts.resets.length > 0
      ? facts.resets.reduce((lowestC, { tempC }) => Math.min(lowestC, tempC - BELOW_OWN_K), lowC)
      : lowC - GONE_SHARE * Math.max(0, lowC - roomC);
  if (to.tempC + totalU(facts, to) >= givenUpC) return null;
  return {
    code: 'heat-lost',
    fromS: from.timeS,
    toS: to.timeS,
    evidence: {
      fallFromC: from.tempC,
      lastC: to.tempC,
      belowResetAtS: firstCrossing(facts, spanOf(leg), lowC, 'down'),
      cutOutsBefore: facts.cutOuts.length,
      roomC: facts.roomC,
    },
  };
}
