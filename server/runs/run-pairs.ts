import { compareDuctPair } from '#shared/analysis/compare/compare-duct-pair.ts';
import { compareSettings } from '#shared/analysis/compare/compare-settings.ts';
import { HEAT_SETTINGS, type MachinePage } from '#shared/schemas/homes.ts';
import type { RunPairs } from '#shared/schemas/pairs.ts';
import type { RunConditions } from '#shared/schemas/runs.ts';
import { toCelsius } from '#shared/units.ts';
import { hadSameParts, type JudgedRun, type MachineRuns } from './machine-runs.ts';
import type { Run } from './run.ts';

/** Sets a run beside others of its machine: with the duct the other way, and on another heat setting. */
export async function findRunPairs(
  run: Run,
  machine: MachinePage,
  machineRuns: MachineRuns,
): Promise<RunPairs> {
  const others = (await machineRuns.list(machine.id))
    .filter(({ id, conditions }) => id !== run.id && conditions.load === run.conditions.load)
    .filter(({ startedAtMs }) => hadSameParts(machine, run.startedAtMs, startedAtMs));
  const { duct, setting } = run.conditions;
  const otherDuct = nearest(run, others, (told) => told.setting === setting && told.duct !== duct);
  const otherSetting = nearest(
    run,
    others,
    (told) => told.setting !== setting && told.duct === duct,
  );
  if (!otherDuct && !otherSetting) return { duct: null, settings: null };
  const own = await machineRuns.judged(run);
  return {
    duct: otherDuct && toDuctPair(own, await machineRuns.judged(otherDuct)),
    settings: otherSetting && toSettingsPair(own, await machineRuns.judged(otherSetting), machine),
  };
}

/** The same visit's first, then the nearest in time: the less lies between two runs, the better they compare. */
function nearest(
  run: Run,
  others: Run[],
  suits: (conditions: RunConditions) => boolean,
): Run | null {
  const far = (other: Run) => Math.abs(other.startedAtMs - run.startedAtMs);
  const rank = (other: Run) => Number(other.visitId !== run.visitId);
  const [best] = others
    .filter(({ conditions }) => suits(conditions))
    .sort((a, b) => rank(a) - rank(b) || far(a) - far(b));
  return best ?? null;
}

function toDuctPair(one: JudgedRun, other: JudgedRun): NonNullable<RunPairs['duct']> {
  const [off, on] = one.run.conditions.duct === 'off' ? [one, other] : [other, one];
  const pair = compareDuctPair(off.analysis, on.analysis, probesErrorK(off, on));
  return { off: named(off.run), on: named(on.run), pair };
}

function toSettingsPair(
  one: JudgedRun,
  other: JudgedRun,
  machine: MachinePage,
): NonNullable<RunPairs['settings']> {
  const heat = ({ run }: JudgedRun) => HEAT_SETTINGS.indexOf(run.conditions.setting);
  const [hotter, cooler] = heat(one) < heat(other) ? [one, other] : [other, one];
  const pair = compareSettings(hotter.analysis, cooler.analysis, {
    ratedK: ratedDifference(machine, hotter.run.conditions, cooler.run.conditions),
    probesErrorK: probesErrorK(hotter, cooler),
  });
  const told = ({ run }: JudgedRun) => ({ ...named(run), setting: run.conditions.setting });
  return { hotter: told(hotter), cooler: told(cooler), pair };
}

function named({ id, label, startedAtMs }: Run) {
  return { id, label, startedAtMs };
}

/** How much lower the machine is specified to open on the cooler setting, K; null where it does not say. */
function ratedDifference(
  { specified }: MachinePage,
  hotter: RunConditions,
  cooler: RunConditions,
): number | null {
  const opensC = ({ setting }: RunConditions) => {
    const rating = specified.find((each) => each.setting === setting)?.rating;
    return rating && toCelsius(rating.opens, rating.unit);
  };
  const [highC, lowC] = [opensC(hotter), opensC(cooler)];
  return highC !== undefined && lowC !== undefined && highC > lowC ? highC - lowC : null;
}

/** Standard error (k = 1) of one probe against another, K, by what each result was judged with; 0 for the same one. */
function probesErrorK(one: JudgedRun, other: JudgedRun): number {
  if (one.run.conditions.probeId === other.run.conditions.probeId) return 0;
  return Math.hypot(probeErrorK(one), probeErrorK(other));
}

function probeErrorK({ analysis: { cutOuts } }: JudgedRun): number {
  const [first] = cutOuts;
  return first ? Math.sqrt(Math.max(0, first.uTotalK ** 2 - first.uK ** 2)) / 2 : 0;
}
