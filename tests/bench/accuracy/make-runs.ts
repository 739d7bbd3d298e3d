import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';
import { createRandom, type Random } from '#server/commands/heat-model/random.ts';
import { simulateRun, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import type { Readings } from '#server/commands/heat-model/take-readings.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import type { AccuracyArguments } from './arguments.ts';
import { METHODS, type Method } from './methods.ts';
import { inputOf, type Plan } from './plan.ts';
import { plansOf } from './plans.ts';
import { cutRecord, seeRun, throughProbe, type SeenRun } from './see-run.ts';
import { seriesOf } from './story-input.ts';

/** A swing that a person with a display notices, K. */
const NOTICED_K = 3.4 / 1.8;
/** Share of the turns that must be far enough apart for the readings. */
const LEAST_SHOWN = 0.75;

/** A run read by one method, ready to be judged. */
export type ReadRun = {
  seed: number;
  seen: SeenRun;
  readings: Readings;
  series: Series;
  input: AnalysisInput;
};

/** Every run of the seeds, plans and methods asked for; a plan is simulated once and read by all. */
export function* makeRuns(asked: AccuracyArguments, ways = METHODS): Generator<ReadRun> {
  for (let seed = asked.from; seed < asked.from + asked.seeds; seed++) {
    for (const [p, plan] of plansOf(seed, asked.plan).entries()) {
      const methods = ways.filter(
        ({ name, spacingS }, m) =>
          name.includes(asked.method) &&
          spacingS <= plan.mostSpacingS &&
          (!asked.thin || (seed + p + m) % 3 === 0),
      );
      yield* readPlan(plan, seed, methods);
    }
  }
}

function* readPlan(plan: Plan, seed: number, methods: Method[]): Generator<ReadRun> {
  const whole = simulateRun(plan.machine, plan.faults, plan.watch, createRandom(seed));
  for (const method of methods) {
    const random = createRandom(seed * 7919 + 31 * numberOf(method) + plan.name.length);
    const run = readRun(plan, whole, method, random);
    if (!isTooCoarse(run.seen)) yield { seed, ...run };
  }
}

/** Its place in the table, the first one after it for a way that stands in none: the same readings each time. */
function numberOf(method: Method): number {
  const at = METHODS.indexOf(method);
  return at < 0 ? METHODS.length : at;
}

function readRun(plan: Plan, whole: ModelRun, method: Method, random: Random) {
  const lagS = method.lagS(random);
  const shown = lagS === null ? whole : throughProbe(whole, lagS);
  const record = cutRecord(shown, { fromS: plan.recordFromS, toS: Infinity });
  const readings = method.read(record, trueTurningPoints(record, NOTICED_K), random);
  const kept = readings.timesS.filter((_, i) => readings.temps[i] !== null);
  const span = {
    fromS: plan.recordFromS + (kept[0] ?? 0),
    toS: plan.recordFromS + (kept.at(-1) ?? 0),
  };
  const responseS = lagS ?? plan.machine.probeLagS;
  const seen = seeRun(plan, shown, method, { responseS, span });
  return {
    seen,
    readings,
    series: seriesOf(readings),
    input: inputOf(plan, seen.marks, responseS),
  };
}

/** Where most rounds are over between a few readings, the record is of nothing. */
function isTooCoarse({ needed, turns }: SeenRun): boolean {
  return turns.length > 3 && needed.length < LEAST_SHOWN * turns.length;
}
