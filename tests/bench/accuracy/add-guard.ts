import { replayGuard } from '#shared/analysis/guard/replay-guard.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';
import { simulateRun, STEP_S, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import { NEVER_C } from './machines.ts';
import type { ReadRun } from './make-runs.ts';
import type { Method } from './methods.ts';
import type { Plan } from './plan.ts';
import { cutRecord, throughProbe } from './see-run.ts';
import { seriesOf } from './story-input.ts';
import type { Tally } from './tally.ts';
import type { TrueCodes } from './truth/true-codes.ts';

/** A machine counts as turning by itself under the ceiling where it stays this far under it, K (1 °F). */
const UNDER_CEILING_K = 1 / 1.8;
/** How long a run is followed that nobody turns off, s. */
const FOLLOWED_S = 2400;

/** Plays the guard along a run that must not alarm it, or along a runaway as it would go on with nobody there. */
export function addGuard(tally: Tally, read: ReadRun, truth: TrueCodes): void {
  const codes = [...truth.expected, ...truth.allowed];
  if (truth.expected.includes('runaway')) addLead(tally, read);
  else if (!codes.includes('runaway') && !codes.includes('heat-stays-on'))
    addQuiet(tally, read, truth);
}

function addQuiet(tally: Tally, { seen, series, input }: ReadRun, truth: TrueCodes): void {
  const { ceilingC } = seen.plan.rating;
  const highestC = seen.run.probeC.reduce((high, tempC) => Math.max(high, tempC), -Infinity);
  if (highestC > ceilingC - UNDER_CEILING_K || seen.turns.length === 0) return;
  const { alarmS, changes } = replayGuard(series, input.marks, input);
  const cut = alarmS === null ? 0 : 1;
  tally.turningRuns++;
  tally.turningCut += cut;
  if (!truth.sound) return;
  tally.soundRuns++;
  tally.soundCut += cut;
  if (changes.some(({ says }) => says === 'watch' || says === 'cut-heat')) tally.soundWatched++;
}

/** Seconds from the alarm to the high limit; 0 where no alarm came before it. Runs that level off under it give none. */
function addLead(tally: Tally, { seed, seen, input }: ReadRun): void {
  const { plan, method, responseS } = seen;
  const shown = goOn(plan, seed, responseS);
  const limit = shown.probeC.findIndex((tempC) => tempC >= plan.rating.highLimitC);
  if (limit < 0) return;
  const limitS = limit * STEP_S;
  const series = readUntil(shown, limitS, plan, method, seed);
  const clicks = plan.clicksMarked ? shown.clicksS : [];
  const marks = clicks.map((timeS) => ({ timeS: Math.round(timeS), kind: 'click' as const }));
  const { alarmS } = replayGuard(series, marks, input);
  tally.leadsS.push(alarmS === null ? 0 : Math.max(0, limitS - alarmS));
}

/** The same run with nobody to turn it off and no fuse to end it. */
function goOn(plan: Plan, seed: number, responseS: number): ModelRun {
  const machine = { ...plan.machine, fuse: { ...plan.machine.fuse, opensC: NEVER_C } };
  const watch = { forS: FOLLOWED_S, heatOffAtC: Infinity, afterHeatOffS: 0 };
  return throughProbe(simulateRun(machine, plan.faults, watch, createRandom(seed)), responseS);
}

function readUntil(shown: ModelRun, toS: number, plan: Plan, method: Method, seed: number) {
  const record = cutRecord(shown, { fromS: plan.recordFromS, toS });
  return seriesOf(method.read(record, [], createRandom(seed * 6007 + plan.name.length)));
}
