import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';
import { simulateRun } from '#server/commands/heat-model/simulate-run.ts';
import type { Readings } from '#server/commands/heat-model/take-readings.ts';
import type { AccuracyArguments } from './arguments.ts';
import { METHODS } from './methods.ts';
import { inputOf, type Plan } from './plan.ts';
import { plansOf } from './plans.ts';
import { seeRun, type SeenRun } from './see-run.ts';
import { seriesOf } from './story-input.ts';

/** A run read by one method, ready to be judged. */
export type ReadRun = {
  seed: number;
  seen: SeenRun;
  readings: Readings;
  series: Series;
  input: AnalysisInput;
};

/** Every run of the seeds, plans and methods asked for; a plan is simulated once and read by all. */
export function* makeRuns(asked: AccuracyArguments): Generator<ReadRun> {
  for (let seed = asked.from; seed < asked.from + asked.seeds; seed++) {
    for (const plan of plansOf(seed, asked.plan)) yield* readPlan(plan, seed, asked.method);
  }
}

function* readPlan(plan: Plan, seed: number, named: string): Generator<ReadRun> {
  const whole = simulateRun(plan.machine, plan.faults, plan.watch, createRandom(seed));
  for (const [m, method] of METHODS.entries()) {
    if (!method.name.includes(named) || method.spacingS > plan.mostSpacingS) continue;
    const random = createRandom(seed * 7919 + 31 * m + plan.name.length);
    const seen = seeRun(plan, whole, method, method.lagS(random));
    if (isTooCoarse(seen)) continue;
    const readings = method.read(seen.run, seen.accepted, random);
    yield {
      seed,
      seen,
      readings,
      series: seriesOf(readings),
      input: inputOf(plan, seen.marks, seen.responseS),
    };
  }
}

/** Where most rounds are over between a few readings, the record is of nothing. */
function isTooCoarse({ needed, turns }: SeenRun): boolean {
  return turns.length > 3 && needed.length < LEAST_SHOWN * turns.length;
}

const LEAST_SHOWN = 0.75;
