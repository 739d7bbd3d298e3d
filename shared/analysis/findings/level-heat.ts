import type { Point } from '../analysis.ts';
import { fitResponse } from '../fit-response.ts';
import { bandOf } from '../judge-point.ts';
import type { Rating } from '../rating.ts';
import type { Extreme, RunFacts, RunLeg } from '../run-facts.ts';
import { ALIKE_PEAKS_K } from './slow-fall.ts';
import { firstCrossing, hidesTurn, isDisturbed, lasted, spanWithTail, totalU } from './trace.ts';

/** How long the exhaust must stay level before it is not just slow to turn, s. */
export const SETTLED_S = 120;
/** A rise that stops this far short of where it was heading has lost heat on the way, K (12 °F). */
const SHORT_OF_K = 12 / 1.8;
/** A valley this much over the machine's own resets is no reset of theirs, K (2 °F). */
const OVER_OWN_K = 2 / 1.8;
/** A last rise of this many on-times is no rise to a cut-out. */
const LONG_TIMES = 3;

/** Whether the last rise went level under the allowance though the thermostat must have opened. */
export function staysLevel(leg: RunLeg, facts: RunFacts, rating: Rating): boolean {
  return (
    levelsInBand(leg, facts, rating) ||
    risesAgain(leg, facts, rating) ||
    staysAtTop(leg, facts, rating)
  );
}

/**
 * The rise bends in the opens band and levels off under the allowance: opened, with part of the heat left on. What the
 * rise before the band was heading for tells a bend from a weak heater that levels off there by itself.
 */
function levelsInBand(leg: RunLeg, facts: RunFacts, rating: Rating): boolean {
  if (leg.to.turnedBy !== 'end' || hidesTurn(leg, facts)) return false;
  const { lowC, highEndC } = bandOf('cut-out', rating);
  const span = spanWithTail(leg, facts);
  const bandS = firstCrossing(facts, span, lowC, 'up');
  if (bandS === null || span.toS - bandS < SETTLED_S) return false;
  const tail = rangeWithin(facts, { fromS: bandS, toS: span.toS });
  if (!tail || tail.lowestC < bandOf('reset', rating).highC || tail.highestC > highEndC)
    return false;
  const headingC = headingBefore(facts, { fromS: span.fromS, toS: bandS });
  if (headingC === null || headingC < tail.highestC + SHORT_OF_K) return false;
  return true;
}

/** Lower bound of the asymptote that a rise was heading for, its first quarter left out, °C. */
function headingBefore(facts: RunFacts, { fromS, toS }: { fromS: number; toS: number }) {
  const { timesS, tempsC } = facts.binned;
  const first = timesS.findIndex((timeS) => timeS >= fromS + (toS - fromS) / 4);
  const past = timesS.findIndex((timeS) => timeS > toS);
  if (first < 0 || past < 0) return null;
  const fit = fitResponse(timesS.slice(first, past), tempsC.slice(first, past));
  return fit && fit.asymptoteC - 3 * fit.asymptoteErrorK;
}

function rangeWithin(facts: RunFacts, { fromS, toS }: { fromS: number; toS: number }) {
  const { timesS, smoothC } = facts.binned;
  const within = smoothC.filter((_, i) => timesS[i]! >= fromS && timesS[i]! <= toS);
  if (within.length === 0) return null;
  return {
    lowestC: within.reduce((low, tempC) => Math.min(low, tempC), Infinity),
    highestC: within.reduce((high, tempC) => Math.max(high, tempC), -Infinity),
  };
}

/** After a cut-out the exhaust turned up again well above any reset, and stays: heat that no reset brought back. */
function risesAgain(leg: RunLeg, facts: RunFacts, rating: Rating): boolean {
  const { from, to } = leg;
  if (from.turnedBy !== 'machine' || to.turnedBy !== 'end' || isDisturbed(leg, facts)) return false;
  if (to.tempC > bandOf('cut-out', rating).highEndC) return false;
  const lastedS = lasted(leg, facts);
  if (lastedS < SETTLED_S) return false;
  const { highC } = bandOf('reset', rating);
  const own = facts.resets.filter(({ timeS }) => timeS < from.timeS);
  const highestC = own.reduce((high, { tempC }) => Math.max(high, tempC), highC);
  if (from.tempC - totalU(facts, from) > highestC + ALIKE_PEAKS_K) return true;
  // Over its own resets by less, but for much longer than it ever heated.
  const isLong = lastedS > LONG_TIMES * longestOn(facts);
  const leastC = facts.cycles.length > 0 ? from.tempC : from.tempC - totalU(facts, from);
  return isLong && leastC > highC && own.every((reset) => standsOver(from, reset));
}

/** Whether a valley lies over a reset of the same probe by more than both are uncertain, and a little. */
function standsOver(valley: Extreme, reset: Point): boolean {
  return valley.tempC - reset.tempC > Math.hypot(valley.uK, reset.uK) + OVER_OWN_K;
}

/** With no cycle to go by, the first rise from cold, which is longer than any, s. */
function longestOn({ cycles, legs }: RunFacts): number {
  if (cycles.length > 0) return cycles.reduce((longestS, { onS }) => Math.max(longestS, onS), 0);
  const first = legs.find(({ fromCold }) => fromCold);
  return first ? first.to.timeS - first.from.timeS : Infinity;
}

/** The last rise reached the machine's own cut-outs and stayed there, under the allowance, with none. */
function staysAtTop(leg: RunLeg, facts: RunFacts, rating: Rating): boolean {
  const { to } = leg;
  if (to.turnedBy !== 'end' || hidesTurn(leg, facts)) return false;
  const own = facts.cutOuts.filter(({ timeS }) => timeS < leg.to.timeS);
  if (own.length === 0) return false;
  // The lower bound of the least of them: what stays there has opened the thermostat once before.
  const leastC = own.reduce((least, { tempC, uK }) => Math.min(least, tempC - uK), Infinity);
  const span = spanWithTail(leg, facts);
  const reachedS = firstCrossing(facts, span, leastC, 'up');
  if (reachedS === null || span.toS - reachedS < SETTLED_S) return false;
  if (to.tempC > bandOf('cut-out', rating).highEndC) return false;
  return true;
}
