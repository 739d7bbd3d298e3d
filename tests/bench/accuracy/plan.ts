import type { AnalysisInput, FindingCode } from '#shared/analysis/analysis.ts';
import type { Load, Rating } from '#shared/analysis/rating.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { toCelsius, toKelvinStep } from '#shared/units.ts';
import {
  SOUND,
  type Faults,
  type Machine,
  type Watch,
} from '#server/commands/heat-model/machine.ts';
import type { Random } from '#server/commands/heat-model/random.ts';
import { randomMachine, withTurnsAt } from './machines.ts';
import { ratingOf } from './story-input.ts';

/** One run to make: a machine, what is wrong in it, who watches how long, and what it is judged by. */
export type Plan = {
  name: string;
  /** The code that the run is there to give; where it lies near a limit the truth may say another. */
  meant: FindingCode;
  machine: Machine;
  faults: Faults;
  watch: Watch;
  /** Where the record begins, s after the start from cold. */
  recordFromS: number;
  load: Load;
  rating: Rating;
  /** As the engine is told it, ± K. */
  accuracyK: number;
  /** Whether the engine is told the probe's response time, and the room. */
  tellsResponse: boolean;
  tellsRoom: boolean;
  clicksMarked: boolean;
  /** Beside clicks, doors and the heat turned off, which come from the run; s after the start from cold. */
  marks: Mark[];
  /** Records coarser than this cannot show what the plan is about, s. */
  mostSpacingS: number;
};

/** A rating as on a shop's list, °F; left out: the usual allowances of 10 and the usual high limit of 196. */
export type RatedF = { opens: number; closes: number; opensTol?: number; closesTol?: number };

/** Where a sound machine of the plan turns at the outlet, °F. */
export type TurnsF = { cutOutF: number; resetF: number };

export type Maker = { name: string; meant: FindingCode; make: (random: Random) => Told };

/** What a plan tells beyond the usual. */
export type Told = Partial<Omit<Plan, 'name' | 'meant' | 'rating' | 'faults' | 'watch'>> & {
  rated?: RatedF;
  /** Where a sound machine like this turns; left out: in band. */
  turns?: TurnsF;
  /** Changes the plan once its disc is set. */
  finish?: (plan: Plan) => Plan;
  faults?: Partial<Faults>;
  watch?: Partial<Watch>;
};

export const USUAL: RatedF = { opens: 155, closes: 130 };

/** A told plan with everything that is not worth saying filled in. */
export function fillPlan({ name, meant, make }: Maker, random: Random): Plan {
  const { rated = USUAL, turns, finish, machine, faults, watch, ...told } = make(random);
  const base = machine ?? randomMachine(random);
  const plan: Plan = {
    name,
    meant,
    machine: withTurnsAt(base, turns ?? inBandTurns(rated, random), random),
    faults: { ...SOUND, scatterK: random.between(0.05, 0.4), ...faults },
    watch: {
      forS: random.between(700, 1300),
      heatOffAtC: Infinity,
      afterHeatOffS: random.between(60, 200),
      ...watch,
    },
    recordFromS: 0,
    load: 'empty',
    rating: rate(rated),
    accuracyK: toKelvinStep(oneOf(random, [0, 1, 2, 2, 3]), 'F'),
    tellsResponse: random.chance(0.7),
    tellsRoom: random.chance(0.6),
    clicksMarked: random.chance(0.4),
    marks: [],
    mostSpacingS: Infinity,
    ...told,
  };
  return finish ? finish(plan) : plan;
}

/** Turns of a sound machine: clear of the edges of the band. */
export function inBandTurns({ opens, closes }: RatedF, random: Random): TurnsF {
  return {
    cutOutF: opens + random.between(-2.5, 2.5),
    resetF: closes + random.between(-2.5, 2.5),
  };
}

export function rate({ opens, closes, opensTol = 5, closesTol = 5 }: RatedF): Rating {
  const usual = { overshoot: 10, undershoot: 10, highLimit: 196 };
  return ratingOf({ name: '', unit: 'F', opens, opensTol, closes, closesTol, ...usual });
}

/** Reading at which the heat is turned off by hand, °F. */
export function offAt(tempF: number): { heatOffAtC: number; forS: number } {
  return { heatOffAtC: toCelsius(tempF, 'F'), forS: 1800 };
}

export function oneOf<T>(random: Random, choices: readonly [T, ...T[]]): T {
  return choices[Math.floor(random.between(0, choices.length))] ?? choices[0];
}

/** What the engine is told of a plan's run. */
export function inputOf(plan: Plan, marks: Mark[], responseS: number): AnalysisInput {
  return {
    rating: plan.rating,
    probe: {
      accuracyK: plan.accuracyK,
      calibrationUK: 0,
      correction: null,
      responseS: plan.tellsResponse ? responseS : null,
    },
    marks,
    load: plan.load,
    roomC: plan.tellsRoom ? plan.machine.roomC : null,
    minCycles: 3,
    swingK: 4 / 1.8,
    reference: null,
  };
}
