import type { BinnedView, Extreme } from './run-facts.ts';
import type { Noise } from './estimate-noise.ts';
import type { Series } from './series.ts';
import { quantile } from './statistics/quantile.ts';
import { boundByReadings } from './turns/bound-by-readings.ts';
import { isCredible, NOISE_SWING } from './turns/is-credible.ts';
import { findExtremes } from './turns/find-extremes.ts';
import { firstAtOrAfter } from './first-at-or-after.ts';
import { withLastTurn } from './turns/find-last-turn.ts';
import { locateTurns, type LocatedTurn, type RoughTurn } from './turns/locate-turns.ts';

/** The zig-zag looks for a little less than the threshold: smoothing has taken something off each swing. */
const ROUGH_SHARE = 0.8;
/** Swings stand clear of a threshold where nine in ten of them are this much greater. */
const CLEAR_OF = 1.5;
const CLEAR_SHARE = 0.1;
/** With fewer readings a leg than this smoothing eats into the swings. */
const FEW_READINGS = 12;
const LEVEL_STEP = 1.25;
const MOST_ROUNDS = 4;
/** Nor is it less certain than this share of the greater swing beside it: it may have missed some of the smaller. */
const MOST_U_SHARE = 0.5;

/**
 * All extremes of a record whose swings reach the threshold, located by a fit of lagged first-order legs.
 *
 * The first and the last belong to the record's ends (`turnedBy` start and end); those between are `machine`
 * until what is known of the run says otherwise (see classifyTurns).
 *
 * @param series cleaned readings
 * @param view the same, binned and smoothed
 * @param noise of a reading
 * @param swingK threshold, K
 */
export function findTurningPoints(
  series: Series,
  view: BinnedView,
  noise: Noise,
  swingK: number,
): Extreme[] {
  let rough = findRough(view, swingK);
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const extremes = locate(series, view, rough, noise);
    const kept = withoutWeakSwings(extremes, swingK, leastLegS(view, extremes));
    if (kept.length === extremes.length) {
      return withLastTurn(extremes, view, noise, swingK);
    }
    rough = kept.map((i) => rough[i]!);
  }
  return locate(series, view, rough, noise);
}

type Rough = ReturnType<typeof findExtremes>;

/**
 * Looks at the smoothed view with the threshold, and at the readings as they are with the least threshold that noise
 * does not make swings at. By hand, with four readings a cycle, smoothing would drown the swings; there the second
 * look finds more.
 */
function findRough(view: BinnedView, swingK: number): Rough {
  const smooth = findExtremes(view.smoothC, ROUGH_SHARE * swingK);
  if (view.smoothC === view.tempsC) return smooth;
  const plain = findClearExtremes(view.tempsC, swingK);
  const isSparse = view.tempsC.length < FEW_READINGS * plain.length;
  return plain.length > smooth.length || (isSparse && plain.length === smooth.length)
    ? plain
    : smooth;
}

/**
 * Swings that noise makes pile up just above whatever threshold lets them through; those of a machine stand clear of
 * it. So the threshold is raised until (nearly) all swings do.
 */
function findClearExtremes(tempsC: Float64Array, swingK: number): Rough {
  for (let levelK = ROUGH_SHARE * swingK; ; levelK *= LEVEL_STEP) {
    const found = findExtremes(tempsC, levelK);
    if (found.length < 4) return [];
    const swingsK = found.slice(1).map(({ tempC }, i) => Math.abs(tempC - found[i]!.tempC));
    if (quantile(swingsK, CLEAR_SHARE) >= CLEAR_OF * levelK) return found;
  }
}

function locate(series: Series, view: BinnedView, rough: Rough, noise: Noise): Extreme[] {
  const { noiseK } = noise;
  if (rough.length < 2) return [];
  const turns = rough.map(({ kind, slot, tempC }) => ({
    kind,
    timeS: view.timesS[slot]!,
    tempC,
  }));
  const startS = turns[0]!.timeS;
  const endS = turns[turns.length - 1]!.timeS;
  const located = locateTurns(view, { turns: turns.slice(1, -1), startS, endS }, noise);
  return turns.map((turn, i): Extreme => {
    const isEnd = i === 0 || i === turns.length - 1;
    const fitted = isEnd ? null : located.turns[i - 1];
    const [swing, greaterK] = isEnd ? [0, 0] : swingsBeside(turns, i);
    const found =
      fitted && isCredible(fitted, turn.tempC, swing, greaterK, noiseK)
        ? withBoundedU(fitted, view, turn, greaterK, noiseK)
        : atReading(view, turn, noiseK);
    return {
      kind: turn.kind,
      turnedBy: i === 0 ? 'start' : isEnd ? 'end' : 'machine',
      ...found,
      index: nearestReading(series.timesS, found.timeS),
    };
  });
}

/** The smaller and the greater of the swings beside a turn, K. */
function swingsBeside(turns: { tempC: number }[], i: number): [number, number] {
  const tempC = turns[i]!.tempC;
  const beforeK = Math.abs(tempC - turns[i - 1]!.tempC);
  const afterK = Math.abs(tempC - turns[i + 1]!.tempC);
  return [Math.min(beforeK, afterK), Math.max(beforeK, afterK)];
}

/**
 * A fit of few readings may say that it knows less of a turn than the readings themselves show. Its `u` is no greater
 * than the distance to the further end of what they bound, with their noise (whose estimate
 * takes turns for noise by hand: so no more of it than a real swing allows); and no greater than half the swing beside it.
 */
function withBoundedU(
  fitted: LocatedTurn,
  view: BinnedView,
  turn: RoughTurn,
  swing: number,
  noiseK: number,
): LocatedTurn {
  const { timesS, tempsC } = view;
  const at = firstAtOrAfter(timesS, turn.timeS);
  const { lowC, highC } = boundByReadings(timesS, tempsC, at, turn.kind === 'peak' ? 1 : -1);
  const { tempC, uK } = fitted;
  const furthestK = Math.max(Math.abs(tempC - lowC), Math.abs(highC - tempC));
  const boundK = Math.hypot(furthestK, Math.min(2 * noiseK, (2 * swing) / NOISE_SWING));
  return { ...fitted, uK: Math.min(uK, boundK, MOST_U_SHARE * swing) };
}

/** What is left where no fit holds: the reading itself; the true turn may lie half a step beyond it. */
function atReading(view: BinnedView, turn: RoughTurn, noiseK: number): LocatedTurn {
  const at = firstAtOrAfter(view.timesS, turn.timeS);
  const stepK = (i: number) => Math.abs(turn.tempC - (view.tempsC[i] ?? turn.tempC));
  const beyondK = 0.5 * Math.max(stepK(at - 1), stepK(at + 1));
  const uK = Math.hypot(2 * noiseK, beyondK);
  return { timeS: turn.timeS, tempC: turn.tempC, uK, switched: null };
}

/** Where readings are many, two turns within two of them are one noise; where they are few a leg may have no more. */
function leastLegS({ tempsC, widthS }: BinnedView, extremes: Extreme[]): number {
  return tempsC.length < FEW_READINGS * extremes.length ? 0 : 2 * widthS;
}

/**
 * Places of the extremes that are left when the smallest swing under the threshold is taken out again and again: it
 * joins the two legs beside it. At the record's ends the next extreme becomes the end.
 */
function withoutWeakSwings(extremes: Extreme[], swingK: number, leastS: number): number[] {
  const kept = extremes.map((_, i) => i);
  for (;;) {
    const at = weakestSwing(
      kept.map((i) => extremes[i]!),
      swingK,
      leastS,
    );
    if (at === null) return kept;
    if (at === 0) kept.shift();
    else if (at === kept.length - 2) kept.pop();
    else kept.splice(at, 2);
  }
}

/** A located peak that lies under its valley, or within a reading of it, is no swing at all. */
function weakestSwing(extremes: Extreme[], swingK: number, leastS: number): number | null {
  let weakest: number | null = null;
  let leastK = swingK;
  for (let i = 0; i + 1 < extremes.length; i++) {
    const { kind, tempC, timeS } = extremes[i]!;
    const next = extremes[i + 1]!;
    const isLeg = next.timeS - timeS >= leastS;
    const swing = isLeg ? (kind === 'valley' ? 1 : -1) * (next.tempC - tempC) : 0;
    if (swing < leastK) {
      leastK = swing;
      weakest = i;
    }
  }
  return weakest;
}

function nearestReading(timesS: Float64Array, timeS: number): number {
  const after = firstAtOrAfter(timesS, timeS);
  if (after === 0) return 0;
  if (after === timesS.length) return after - 1;
  return timesS[after]! - timeS < timeS - timesS[after - 1]! ? after : after - 1;
}
