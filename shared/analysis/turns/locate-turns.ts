import { firstAtOrAfter } from '../first-at-or-after.ts';
import type { Noise } from '../estimate-noise.ts';
import type { BinnedView, SwitchInstant } from '../run-facts.ts';
import { firstOrderProblem, readTurn } from './first-order-turns.ts';
import type { FittedLegs } from './fit-legs.ts';
import { fitNearTurns } from './fit-near-turns.ts';
import { gatherValues, VALUES_PER_LEG, type WindowValues } from './gather-values.ts';
import { LN_LAG, placeOfSwitch, SHARED } from './lagged-legs.ts';
import { locateOneByOne, type Lesson } from './locate-one-by-one.ts';
import { planWindows, type FitWindow } from './plan-windows.ts';
import { mixed } from './mix-turns.ts';
import { fitTurns, type WeighedPlants } from './plant-problem.ts';
import { plantReader } from './read-plant.ts';
import { plantAt, solvePlant } from './switched-plant.ts';

/** A turn as located: expanded uncertainties, k = 2. */
export type LocatedTurn = {
  timeS: number;
  tempC: number;
  uK: number;
  switched: SwitchInstant | null;
};

/** A turn to be located. */
export type RoughTurn = { kind: 'peak' | 'valley'; timeS: number; tempC: number };

/** Turns and the edges of the record's first and last leg, s. */
export type TurnsToLocate = { turns: RoughTurn[]; startS: number; endS: number };

export type Located = {
  /** One for each turn; null where no fit holds. */
  turns: (LocatedTurn | null)[];
  /** Where the last leg is at a time after the last turn, °C, if it goes on as it is; null where no fit holds. */
  aheadC: (timeS: number) => number | null;
};

/** Beyond this many turns only some are fitted jointly; the others one by one, with what those taught … */
const MANY_TURNS = 60;
/** … but not so few readings, of which one turn alone has too few; up to this many turns. */
const FEW_READINGS = 10;
const MOST_SPARSE = 240;
/** Turns fitted at once: at least so many, and more where readings are so few that it costs no more than this. */
export const LEAST_AT_ONCE = 12;
const MOST_WORK = 9e5;

/**
 * Locates turns by fitting a switched plant through all of them: the temperature and time of the noise-free extreme, and
 * where the slope broke before it. First-order legs of their own are where that fit starts, and what is left where it
 * does not hold.
 *
 * @param noise of a reading
 */
export function locateTurns(view: BinnedView, task: TurnsToLocate, noise: Noise): Located {
  const { turns } = task;
  const isMany =
    turns.length > MOST_SPARSE ||
    (turns.length > MANY_TURNS && view.timesS.length > FEW_READINGS * turns.length);
  return isMany ? locateMany(view, task, noise) : locateJointly(view, task, noise);
}

function edgesOf({ turns, startS, endS }: TurnsToLocate): number[] {
  return [startS, ...turns.map(({ timeS }) => timeS), endS];
}

function locateJointly(view: BinnedView, task: TurnsToLocate, noise: Noise): Located {
  const { turns } = task;
  const located: Located = { turns: turns.map(() => null), aheadC: () => null };
  let shared: Float64Array | null = null;
  for (const window of planWindows(edgesOf(task), turnsAtOnce(view, task))) {
    const own = turns.slice(window.from - 1, window.to - 1);
    const values = gatherValues(
      view,
      window,
      own.map(({ timeS }) => timeS),
    );
    const simple = fitFirstOrder(values, own, window, noise.noiseK, shared);
    const plants = fitTurns(values, own, window, noise, simple && startFrom(simple));
    readWindow(located, turns, window, plants, simple, values);
    if (simple && own.length > 2) shared = simple.parameters.slice(0, SHARED);
  }
  return located;
}

function readWindow(
  located: Located,
  turns: RoughTurn[],
  window: FitWindow,
  plants: WeighedPlants,
  simple: FittedLegs | null,
  values: WindowValues,
): void {
  const readers = plants.map(({ fit, share }) => ({
    read: plantReader(fit, values.timesS),
    share,
  }));
  for (let turn = window.readFrom; turn < window.readTo; turn++) {
    const { kind } = turns[turn - 1]!;
    const place = turn - window.from;
    const readings = readers.map(({ read, share }) => ({ turn: read(place, kind), share }));
    located.turns[turn - 1] =
      readings.length > 0 ? mixed(readings) : simple && readTurn(simple, place, kind);
  }
  const [best] = [...plants].sort((a, b) => b.share - a.share);
  if (!best || window.readTo <= turns.length) return;
  const { parameters, shape } = best.fit;
  const solved = solvePlant(parameters, shape);
  located.aheadC = (timeS) => plantAt(solved, shape.switches, timeS);
}

function fitFirstOrder(
  values: WindowValues,
  own: RoughTurn[],
  window: FitWindow,
  noiseK: number,
  shared: Float64Array | null,
): FittedLegs | null {
  const problem = firstOrderProblem(values, own, window, noiseK, shared);
  return problem && fitNearTurns(problem);
}

/** The longest of three lags is about as long as this times the two lags' sum. */
const LAG_OF_SUM = 1.8;

function startFrom({ parameters, shape }: FittedLegs) {
  const lagS = LAG_OF_SUM * Math.exp(parameters[LN_LAG]!);
  return { lagS, switchesS: parameters.slice(SHARED, placeOfSwitch(shape.switches)) };
}

/** The cost of a round goes with the square of the parameters, times the values and some more parameters. */
function turnsAtOnce(view: BinnedView, { turns, startS, endS }: TurnsToLocate): number {
  const count = firstAtOrAfter(view.timesS, endS) - firstAtOrAfter(view.timesS, startS);
  const each = Math.min(VALUES_PER_LEG, count / (turns.length + 1));
  const workOf = (most: number) => (each * most + 3 * (2 * most + 13)) * (2 * most + 13) ** 2;
  let most = LEAST_AT_ONCE;
  while (most < turns.length && workOf(most + 1) < MOST_WORK) most++;
  return most;
}

/** Some windows jointly, with first-order legs; all other turns one by one. */
function locateMany(view: BinnedView, task: TurnsToLocate, { noiseK }: Noise): Located {
  const { turns } = task;
  const edgesS = edgesOf(task);
  const windows = planWindows(edgesS, LEAST_AT_ONCE);
  const located = new Array<LocatedTurn | null>(turns.length).fill(null);
  const jointly = windows.length > 4 ? spreadOut(windows.length) : windows.map((_, i) => i);
  const lessons: Lesson[] = [];
  for (const i of jointly) {
    const window = windows[i]!;
    const own = turns.slice(window.from - 1, window.to - 1);
    const values = gatherValues(
      view,
      window,
      own.map(({ timeS }) => timeS),
    );
    const fit = fitFirstOrder(values, own, window, noiseK, null);
    for (let turn = window.readFrom; turn < window.readTo; turn++) {
      located[turn - 1] = fit && readTurn(fit, turn - window.from, turns[turn - 1]!.kind);
    }
    if (!fit || own.length <= 2) continue;
    lessons.push({ window: i, fit, valueNoiseK: fit.noiseK * Math.sqrt(values.averaged) });
  }
  if (lessons.length > 0) locateOneByOne(view, turns, edgesS, windows, lessons, located);
  return { turns: located, aheadC: () => null };
}

/** The first windows, two inside and the last: what changes over a long record shows. */
function spreadOut(count: number): number[] {
  const places = [0, 1, Math.floor(count / 3), Math.floor((2 * count) / 3), count - 1];
  return [...new Set(places)];
}
