import type { BinnedView, Extreme } from './run-facts.ts';
import type { Series } from './series.ts';
import { findExtremes } from './turns/find-extremes.ts';
import { firstAtOrAfter } from './first-at-or-after.ts';
import { locateTurns, type LocatedTurn } from './turns/locate-turns.ts';

/** The zig-zag looks for a little less than the threshold: smoothing has taken something off each swing. */
const ROUGH_SHARE = 0.8;

/**
 * All extremes of a record whose swings reach the threshold, located by a fit of lagged first-order legs.
 *
 * The first and the last belong to the record's ends (`turnedBy` start and end); those between are `machine`
 * until what is known of the run says otherwise (see classifyTurns).
 *
 * @param series cleaned readings
 * @param view the same, binned and smoothed
 * @param noiseK standard deviation of a reading, K
 * @param swingK threshold, K
 */
export function findTurningPoints(
  series: Series,
  view: BinnedView,
  noiseK: number,
  swingK: number,
): Extreme[] {
  let rough = findRough(view, noiseK, swingK);
  for (let round = 0; round < 6; round++) {
    const extremes = locate(series, view, rough, noiseK);
    const weakest = weakestSwing(extremes, swingK);
    if (weakest === null) return extremes;
    rough = withoutSwing(rough, weakest);
  }
  return locate(series, view, rough, noiseK);
}

type Rough = ReturnType<typeof findExtremes>;

/**
 * Looks at the smoothed view with the threshold, and at the readings as they are with one that noise does not reach
 * (the range of n normal values is about 2·√(2 ln n) deviations). By hand, with four readings a cycle, smoothing would
 * drown the swings and turns pass for noise; there the second look finds more.
 */
function findRough(view: BinnedView, noiseK: number, swingK: number): Rough {
  const smooth = findExtremes(view.smoothC, ROUGH_SHARE * swingK);
  if (view.smoothC === view.tempsC) return smooth;
  const rangeK = (2 * Math.sqrt(2 * Math.log(view.tempsC.length + 1)) + 1) * noiseK;
  const plain = findExtremes(view.tempsC, Math.max(rangeK, ROUGH_SHARE * swingK));
  return plain.length > smooth.length ? plain : smooth;
}

function locate(series: Series, view: BinnedView, rough: Rough, noiseK: number): Extreme[] {
  if (rough.length < 2) return [];
  const turns = rough.map(({ kind, slot }) => ({
    kind,
    timeS: view.timesS[slot]!,
    tempC: view.smoothC[slot]!,
  }));
  const located = locateTurns(
    view,
    turns.slice(1, -1),
    turns[0]!.timeS,
    turns[turns.length - 1]!.timeS,
    noiseK,
  );
  return turns.map((turn, i): Extreme => {
    const isEnd = i === 0 || i === turns.length - 1;
    const found = (isEnd ? null : located[i - 1]) ?? atReading(turn, noiseK);
    return {
      kind: turn.kind,
      turnedBy: i === 0 ? 'start' : isEnd ? 'end' : 'machine',
      ...found,
      index: nearestReading(series.timesS, found.timeS),
    };
  });
}

/** What is left where no fit holds: the smoothed reading itself. */
function atReading(turn: { timeS: number; tempC: number }, noiseK: number): LocatedTurn {
  return { timeS: turn.timeS, tempC: turn.tempC, uK: 2 * noiseK, switched: null };
}

/** The smallest swing under the threshold, as the place of its first extreme; null where all stand out. */
function weakestSwing(extremes: Extreme[], swingK: number): number | null {
  let weakest: number | null = null;
  let leastK = swingK;
  for (let i = 0; i + 1 < extremes.length; i++) {
    const swing = Math.abs(extremes[i + 1]!.tempC - extremes[i]!.tempC);
    if (swing < leastK) {
      leastK = swing;
      weakest = i;
    }
  }
  return weakest;
}

/** Takes a swing out; at the record's ends that leaves the next extreme as the end. */
function withoutSwing(rough: Rough, at: number): Rough {
  if (at === 0) return rough.slice(1);
  if (at === rough.length - 2) return rough.slice(0, -1);
  return [...rough.slice(0, at), ...rough.slice(at + 2)];
}

function nearestReading(timesS: Float64Array, timeS: number): number {
  const after = firstAtOrAfter(timesS, timeS);
  if (after === 0) return 0;
  if (after === timesS.length) return after - 1;
  return timesS[after]! - timeS < timeS - timesS[after - 1]! ? after : after - 1;
}
