import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { AnalysisInput, FindingCode } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';
import { simulateRun, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import { matchTurns, type FoundTurn } from './match-turns.ts';
import { METHODS, type Method } from './methods.ts';
import { findPeaksPlainly, judgePlainly } from './peak-finder.ts';
import { plansOf, type Plan } from './plans.ts';
import { emptyTally, printTallies, type Tally } from './tally.ts';
import { trueCodes } from './true-codes.ts';
import { seriesOf } from './story-input.ts';

const ACCURACY_F = 2;
/** Seeds from 1 are for tuning; those reported are from here on. */
const REPORTED_FROM = 101;

/** Arguments: number of seeds (default 3), first seed, and `wrong` to list each wrong headline. */
export function bench(args: string[]): void {
  const seeds = Number(args[0] ?? 3);
  const from = Number(args[1] ?? REPORTED_FROM);
  const tallies = METHODS.map(({ name }) => ({ name, ours: emptyTally(), plain: emptyTally() }));
  for (let seed = from; seed < from + seeds; seed++) {
    for (const plan of plansOf(seed)) judgePlan(plan, seed, tallies, args.includes('wrong'));
  }
  printTallies(tallies, `seeds ${from} to ${from + seeds - 1}`);
}

type Named = { name: string; ours: Tally; plain: Tally };

function judgePlan(plan: Plan, seed: number, tallies: Named[], list: boolean): void {
  const run = simulateRun(plan.machine, plan.faults, plan.watch, createRandom(seed));
  const needed = trueTurningPoints(run, 4.6 / 1.8);
  const accepted = trueTurningPoints(run, 3.4 / 1.8);
  const truth = trueCodes(plan, trueTurningPoints(run, 4 / 1.8));
  const input = inputOf(plan, run);
  METHODS.forEach((method, m) => {
    const tally = tallies[m]!;
    const random = createRandom(seed * 7919 + m);
    const series = seriesOf(method.read(run, accepted, random));
    const analysis = analyseRun(series, input);
    const headline = analysis.findings[0]!.code;
    addTurns(tally.ours, [...analysis.cutOuts, ...analysis.resets], { needed, accepted, method });
    addHeadline(tally.ours, headline, truth);
    const peaks = findPeaksPlainly(series);
    addTurns(tally.plain, peaks, { needed, accepted, method });
    addHeadline(tally.plain, judgePlainly(series, peaks), truth);
    if (list && !truth.allowed.includes(headline)) {
      console.log(
        `seed ${seed} ${plan.name}, ${method.name}: ${analysis.findings.map(({ code }) => code).join(' ')} for ${truth.allowed.join('/')}`,
      );
    }
  });
}

export function inputOf(plan: Plan, run: ModelRun): AnalysisInput {
  const clicks = plan.clicksMarked ? run.clicksS : [];
  const marks: Mark[] = clicks.map((timeS) => ({ timeS, kind: 'click' }));
  if (run.heatOffS !== null) marks.push({ timeS: run.heatOffS, kind: 'heat-off' });
  return {
    rating: DEFAULT_RATING,
    probe: {
      accuracyK: ACCURACY_F / 1.8,
      calibrationUK: 0,
      correction: null,
      responseS: plan.machine.probeLagS,
    },
    marks,
    load: plan.load,
    roomC: plan.machine.roomC,
    minCycles: 3,
    swingK: 4 / 1.8,
    reference: null,
  };
}

type Truth = {
  needed: Parameters<typeof matchTurns>[1];
  accepted: Parameters<typeof matchTurns>[2];
  method: Method;
};

function addTurns(tally: Tally, found: FoundTurn[], { needed, accepted, method }: Truth): void {
  const { pairs, hits, missed, invented } = matchTurns(found, needed, accepted, method.withinS);
  tally.hits += hits;
  tally.missed += missed;
  tally.invented += invented;
  for (const { truth, point } of pairs) {
    const errorF = Math.abs(point.tempC - truth.tempC) * 1.8;
    tally.errorsF.push(errorF);
    if (point.uK !== undefined) {
      tally.uF.push(point.uK * 1.8);
      if (errorF <= point.uK * 1.8) tally.covered++;
    }
    if (typeof point.switchTimeS === 'number') {
      tally.switchErrorsS.push(Math.abs(point.switchTimeS - truth.switchTimeS));
    }
  }
}

function addHeadline(
  tally: Tally,
  headline: FindingCode,
  truth: ReturnType<typeof trueCodes>,
): void {
  tally.runs++;
  if (truth.allowed.includes(headline)) tally.right++;
  if (truth.faulty && headline === 'in-band') tally.falselyInBand++;
  const unnamed: FindingCode[] = ['in-band', 'too-close', 'too-short', 'mixed'];
  if (truth.sound && !unnamed.includes(headline)) tally.falseAlarms++;
  if (headline === 'runaway' && !truth.allowed.includes('runaway')) tally.falseRunaways++;
  if (headline !== 'runaway' && truth.allowed[0] === 'runaway') tally.missedRunaways++;
}
