import type { Mark, MarkKind } from './series.ts';
import type { Rating } from './rating.ts';
import type { Extreme, TurnedBy } from './run-facts.ts';
import { median } from './statistics/quantile.ts';
import { bandOf } from './judge-point.ts';

const OFF_MARKS: MarkKind[] = ['heat-off', 'stopped', 'door'];
/** A mark is tapped a little after the fact, s. */
const TAPPED_LATE_S = 3;
/** A cut-out shows at the probe within this of its click; heat turned off later than that made the turn itself, s. */
const CLICK_TURNS_S = 20;
/** Up past the band's allowance the exhaust is level, and its highest moment may lie so long before the mark, s. */
const LEVEL_EARLY_S = 20;
/** A machine that starts again after its door was shut heats on; a peak later than this is its own, s. */
const DOOR_TURNS_S = 45;
/** A last peak this far off the only other cut-out is no cut-out of the same thermostat, K (4 °F). */
const OUT_OF_LINE_K = 4 / 1.8;
/** … and with more to go by so many of their standard deviations, but no less than this, K (1.5 °F). */
const DEVIATIONS = 4;
const LEAST_OUT_OF_LINE_K = 1.5 / 1.8;

/**
 * Tells for each extreme what turned it (see `TurnedBy`): the record's ends are known already; a person's marks,
 * a fall for good and valleys that no cut-out precedes are found here. All others are the machine's.
 *
 * @param extremes alternating, the record's ends first and last
 */
export function classifyTurns(
  extremes: Extreme[],
  marks: Mark[],
  rating: Rating | null,
  spacingS: number,
): Extreme[] {
  const lateS = Math.max(TAPPED_LATE_S, 0.5 * spacingS);
  const turned = extremes.map((extreme, i): Extreme => {
    if (extreme.turnedBy !== 'machine') return extreme;
    const isUpThere = rating !== null && extreme.tempC > bandOf('cut-out', rating).highEndC;
    const lateHereS = isUpThere ? Math.max(lateS, LEVEL_EARLY_S) : lateS;
    return { ...extreme, turnedBy: byPerson(extremes, i, marks, lateHereS) ? 'person' : 'machine' };
  });
  const lost = lostForGood(turned, rating);
  let cutOutSeen = false;
  return turned.map((extreme, i) => {
    let turnedBy: TurnedBy = extreme.turnedBy;
    if (i === lost) turnedBy = 'one-shot';
    // Where a person made the fall, what ended it brought back no heat that a thermostat had cut.
    const afterPerson = extreme.kind === 'valley' && turned[i - 1]?.turnedBy === 'person';
    if (turnedBy === 'machine' && afterPerson) turnedBy = 'person';
    if (turnedBy === 'machine' && extreme.kind === 'peak') cutOutSeen = true;
    if (turnedBy === 'machine' && extreme.kind === 'valley' && !cutOutSeen) {
      turnedBy = 'before-cut-out';
    }
    return { ...extreme, turnedBy };
  });
}

/**
 * A peak is a person's where heat was turned off, the machine stopped or the door opened while it was heating; a
 * valley where that happened in the fall before it, or where heat was turned on just there.
 */
function byPerson(extremes: Extreme[], i: number, marks: Mark[], lateS: number): boolean {
  const extreme = extremes[i]!;
  const fromS = extremes[i - 1]!.timeS + lateS;
  const toS = extreme.timeS + lateS;
  const during = marks.filter(({ timeS }) => timeS > fromS && timeS <= toS);
  const isOff = ({ kind, timeS }: Mark) =>
    OFF_MARKS.includes(kind) &&
    (kind !== 'door' || extreme.kind === 'valley' || extreme.timeS - timeS <= DOOR_TURNS_S);
  if (extreme.kind === 'valley')
    return during.some((mark) => isOff(mark) || mark.kind === 'heat-on');
  const lastOff = during.findLast(isOff);
  if (!lastOff) return false;
  const clicked = during.some(
    ({ kind, timeS }) =>
      kind === 'click' && timeS <= lastOff.timeS && lastOff.timeS - timeS <= CLICK_TURNS_S,
  );
  const backOn = during.some(({ kind, timeS }) => kind === 'heat-on' && timeS > lastOff.timeS);
  return !clicked && !backOn;
}

/**
 * The last peak where heat was lost for good: no return after it though the exhaust fell through the reset band and
 * on, and out of line with the cut-outs before it (with none: with the opens band and its allowance).
 */
function lostForGood(extremes: Extreme[], rating: Rating | null): number | null {
  const last = extremes.length - 2;
  const peak = extremes[last];
  const end = extremes[last + 1];
  if (!peak || !end || peak.kind !== 'peak' || peak.turnedBy !== 'machine') return null;
  const others = extremes.filter(
    ({ kind, turnedBy }, i) => kind === 'peak' && turnedBy === 'machine' && i !== last,
  );
  const valleys = extremes.filter(
    ({ kind, turnedBy }) => kind === 'valley' && turnedBy === 'machine',
  );
  if (!isOutOfLine(peak, others, rating)) return null;
  return fellForGood(peak, end, valleys, rating) ? last : null;
}

function isOutOfLine(peak: Extreme, others: Extreme[], rating: Rating | null): boolean {
  if (others.length > 0) {
    const tempsC = others.map(({ tempC }) => tempC);
    const outK = Math.max(outOfLineK(tempsC), 2 * peak.uK);
    return Math.abs(peak.tempC - median(tempsC)) > outK;
  }
  if (!rating) return false;
  const { lowC, highEndC } = bandOf('cut-out', rating);
  return peak.tempC + peak.uK < lowC || peak.tempC - peak.uK > highEndC;
}

/** How far off others a peak is out of line, K, by their own spread; the first, from cold, may be higher than the rest. */
function outOfLineK(tempsC: number[]): number {
  const settledC = tempsC.length > 2 ? tempsC.slice(1) : tempsC;
  if (settledC.length < 2) return OUT_OF_LINE_K;
  const middleC = settledC.reduce((sum, tempC) => sum + tempC, 0) / settledC.length;
  const squares = settledC.reduce((sum, tempC) => sum + (tempC - middleC) ** 2, 0);
  const deviationK = Math.sqrt(squares / (settledC.length - 1));
  // Two or three say little of their spread: what they lack is made up for with what is usual.
  const believedK = Math.hypot(deviationK, LEAST_OUT_OF_LINE_K / DEVIATIONS);
  return Math.min(OUT_OF_LINE_K, Math.max(LEAST_OUT_OF_LINE_K, DEVIATIONS * believedK));
}

function fellForGood(
  peak: Extreme,
  end: Extreme,
  valleys: Extreme[],
  rating: Rating | null,
): boolean {
  if (valleys.length > 0) {
    const usualC = median(valleys.map(({ tempC }) => tempC));
    if (end.tempC < usualC - OUT_OF_LINE_K) return true;
  } else if (rating && end.tempC < bandOf('reset', rating).lowEndC) return true;
  // Up where the one-shot part opens there is nothing else that could have cut the heat.
  return rating !== null && peak.tempC > rating.highLimitC - OUT_OF_LINE_K;
}
