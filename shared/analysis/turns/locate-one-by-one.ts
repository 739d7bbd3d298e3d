import type { BinnedView } from '../run-facts.ts';
import { median } from '../statistics/quantile.ts';
import type { FittedLegs } from './fit-legs.ts';
import { LN_TAU_COOL, LN_TAU_HEAT, lagsOf, placeOfRamp } from './lagged-legs.ts';
import { locateQuickly, type QuickTask, type QuickTurn } from './locate-quickly.ts';
import type { LocatedTurn, RoughTurn } from './locate-turns.ts';
import type { FitWindow } from './plan-windows.ts';
import { createQuickBench, type QuickBench } from './quick-bench.ts';
import { tabulateTurn, type TurnShape } from './turn-shape.ts';

/** What a joint fit of one window taught. */
export type Lesson = { window: number; fit: FittedLegs; valueNoiseK: number };

/** Shares of the legs beside a turn that its local fit uses: clear of the corner before, and of the switch after. */
const USED_BEFORE = 0.6;
const USED_AFTER = 0.8;
/** The ramps may be this much steeper than those of the joint fits. */
const RAMP_FACTOR = 2;

/**
 * Locates the turns that no joint fit has, one by one, with legs and lags of the nearest window that was fitted jointly.
 * Its errors leave out what the legs' and lags' own errors add; so they are widened by what they come short of on
 * turns that both have located.
 *
 * @param located filled in where it is null
 */
export function locateOneByOne(
  view: BinnedView,
  turns: RoughTurn[],
  edgesS: number[],
  windows: FitWindow[],
  lessons: Lesson[],
  located: (LocatedTurn | null)[],
): void {
  const bench = createQuickBench();
  const readers = lessons.map((lesson) => createReader(view, turns, edgesS, lesson, bench));
  const widening = findWidening(windows, lessons, located, readers);
  let nearest = 0;
  windows.forEach((window, i) => {
    if (lessons.some((lesson) => lesson.window === i)) return;
    while (nearest + 1 < lessons.length && closer(lessons, nearest, i)) nearest++;
    for (let turn = window.readFrom; turn < window.readTo; turn++) {
      const quick = readers[nearest]!(turn);
      located[turn - 1] = quick && widen(quick, widening);
    }
  });
}

function closer(lessons: Lesson[], nearest: number, window: number): boolean {
  const here = Math.abs(lessons[nearest]!.window - window);
  return Math.abs(lessons[nearest + 1]!.window - window) < here;
}

type Reader = (turn: number) => QuickTurn | null;

function createReader(
  view: BinnedView,
  turns: RoughTurn[],
  edgesS: number[],
  { fit, valueNoiseK }: Lesson,
  bench: QuickBench,
): Reader {
  const { lagAS, lagBS } = lagsOf(fit.parameters);
  const heatS = Math.exp(fit.parameters[LN_TAU_HEAT]!);
  const coolS = Math.exp(fit.parameters[LN_TAU_COOL]!);
  const reachS = longestLeg(fit);
  const lags = { lagAS, lagBS };
  const peak = tabulateTurn({ tauBeforeS: heatS, tauAfterS: coolS, ...lags }, reachS, reachS);
  const valley = tabulateTurn({ tauBeforeS: coolS, tauAfterS: heatS, ...lags }, reachS, reachS);
  const rampKPerS = RAMP_FACTOR * (steepestRamp(fit) + 1e-4);
  return (turn) => {
    const { kind } = turns[turn - 1]!;
    const timeS = edgesS[turn]!;
    const beforeS = Math.min(reachS, timeS - edgesS[turn - 1]!);
    const afterS = Math.min(reachS, edgesS[turn + 1]! - timeS);
    const shape: TurnShape = kind === 'peak' ? peak : valley;
    const task: QuickTask = {
      shape,
      sign: kind === 'peak' ? 1 : -1,
      switchS: timeS - 0.7 * (lagAS + lagBS),
      startS: timeS - USED_BEFORE * beforeS,
      endS: timeS + USED_AFTER * afterS,
      noiseK: valueNoiseK,
      rampKPerS,
    };
    return locateQuickly(view, task, bench);
  };
}

function longestLeg({ shape }: FittedLegs): number {
  return (1.3 * (shape.endS - shape.startS)) / Math.max(1, shape.switches);
}

function steepestRamp({ shape, parameters }: FittedLegs): number {
  const legS = (shape.endS - shape.startS) / (shape.switches + 1);
  let greatest = 0;
  for (let leg = 0; leg <= shape.switches; leg++) {
    greatest = Math.max(greatest, Math.abs(parameters[placeOfRamp(shape, leg)]!));
  }
  return greatest / legS;
}

type Widening = { temperature: number; time: number };

function findWidening(
  windows: FitWindow[],
  lessons: Lesson[],
  located: (LocatedTurn | null)[],
  readers: Reader[],
): Widening {
  const temperature: number[] = [];
  const time: number[] = [];
  lessons.forEach((lesson, i) => {
    const window = windows[lesson.window]!;
    for (let turn = window.readFrom; turn < window.readTo; turn++) {
      const joint = located[turn - 1];
      const quick = readers[i]!(turn);
      if (!joint || !quick) continue;
      temperature.push(joint.uK / (2 * quick.errorK));
      if (joint.switched) time.push(joint.switched.uS / (2 * quick.switchErrorS));
    }
  });
  const atLeastOne = (ratios: number[]) => (ratios.length > 0 ? Math.max(1, median(ratios)) : 1);
  return { temperature: atLeastOne(temperature), time: atLeastOne(time) };
}

function widen(quick: QuickTurn, { temperature, time }: Widening): LocatedTurn {
  return {
    timeS: quick.timeS,
    tempC: quick.tempC,
    uK: 2 * temperature * quick.errorK,
    switched: {
      timeS: quick.switchS,
      tempC: quick.switchC,
      uS: 2 * time * quick.switchErrorS,
      uK: 2 * time * quick.switchErrorK,
    },
  };
}
