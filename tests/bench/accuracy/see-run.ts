import type { Mark } from '#shared/analysis/series.ts';
import { STEP_S, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import {
  flatSpan,
  trueExtremes,
  trueTurningPoints,
  type TrueExtreme,
  type TrueTurn,
} from '#server/commands/heat-model/true-turning-points.ts';
import type { Method } from './methods.ts';
import type { Plan } from './plan.ts';

/** The threshold of a turning point, and how near it either answer is accepted, K. */
export const SWING_K = 4 / 1.8;
const NEAR_K = 0.6 / 1.8;

/** A run as one method's probe truly showed it, without noise, from the record's begin. */
export type SeenRun = {
  plan: Plan;
  method: Method;
  run: ModelRun;
  marks: Mark[];
  responseS: number;
  /** Turning points at the threshold; those that must be found; those that may be. */
  turns: TrueTurn[];
  needed: TrueTurn[];
  accepted: TrueTurn[];
};

/**
 * What a method's readings could show of a run.
 *
 * @param shown the run through the method's probe, from the start from cold
 * @param span first and last reading, s after the start from cold
 */
export function seeRun(
  plan: Plan,
  shown: ModelRun,
  method: Method,
  told: { responseS: number; span: { fromS: number; toS: number } },
): SeenRun {
  const run = cutRecord(shown, told.span);
  const clear = trueTurningPoints(run, Math.max(SWING_K + NEAR_K, method.neededSwingK));
  const accepted = [
    ...trueTurningPoints(run, SWING_K - NEAR_K),
    ...alikeOneShots(run),
    ...turnsOfTheAir(run),
  ];
  return {
    plan,
    method,
    run,
    responseS: told.responseS,
    marks: marksOf(plan, run, told.span.fromS),
    turns: trueTurningPoints(run, SWING_K),
    needed: clear.filter(
      (turn, i) =>
        isResolved(turn, clear[i - 1], clear[i + 1], method) &&
        !isDoorIn(plan, told.span.fromS, clear[i - 1], turn),
    ),
    accepted: accepted.sort((a, b) => a.timeS - b.timeS),
  };
}

/** The same run through another probe: a first-order lag behind the air at the outlet. */
export function throughProbe(run: ModelRun, lagS: number): ModelRun {
  const probeC = new Float64Array(run.outletC.length);
  let tempC = run.outletC[0] ?? 0;
  run.outletC.forEach((airC, i) => {
    probeC[i] = tempC;
    tempC += ((airC - tempC) / lagS) * STEP_S;
  });
  return { ...run, probeC };
}

/** Part of a run as a record of its own; changes of the heater before it keep their (negative) times. */
export function cutRecord(run: ModelRun, { fromS, toS }: { fromS: number; toS: number }): ModelRun {
  const first = Math.round(fromS / STEP_S);
  const past = Math.min(run.probeC.length, Math.round(toS / STEP_S) + 1);
  const shiftS = first * STEP_S;
  const endS = (past - 1) * STEP_S;
  return {
    probeC: run.probeC.slice(first, past),
    outletC: run.outletC.slice(first, past),
    switches: run.switches
      .filter(({ timeS }) => timeS <= endS)
      .map((change) => ({ ...change, timeS: change.timeS - shiftS })),
    clicksS: run.clicksS
      .filter((timeS) => timeS >= shiftS && timeS <= endS)
      .map((timeS) => timeS - shiftS),
    heatOffS: run.heatOffS === null || run.heatOffS > endS ? null : run.heatOffS - shiftS,
  };
}

/** Marks as a person taps them: to the second. */
function marksOf(plan: Plan, run: ModelRun, fromS: number): Mark[] {
  const endS = (run.probeC.length - 1) * STEP_S;
  const marks: Mark[] = plan.marks.map((mark) => ({ ...mark, timeS: mark.timeS - fromS }));
  if (plan.clicksMarked)
    marks.push(...run.clicksS.map((timeS): Mark => ({ timeS, kind: 'click' })));
  if (run.heatOffS !== null) marks.push({ timeS: run.heatOffS, kind: 'heat-off' });
  for (const open of plan.faults.doorOpen) {
    marks.push({ timeS: open.fromS - fromS, kind: 'door' });
  }
  return marks
    .map((mark) => ({ ...mark, timeS: Math.round(mark.timeS) }))
    .filter(({ timeS }) => timeS >= 0 && timeS <= endS)
    .sort((a, b) => a.timeS - b.timeS);
}

/** Turns between which too few readings lie are not asked for. */
function isResolved(
  turn: TrueTurn,
  before: TrueTurn | undefined,
  after: TrueTurn | undefined,
  { leastLegS }: Method,
): boolean {
  const sinceS = turn.timeS - (before?.timeS ?? -Infinity);
  return sinceS >= leastLegS && (after?.timeS ?? Infinity) - turn.timeS >= leastLegS;
}

/** After a door that stood open in a fall nobody can tell who brought the heat back. */
function isDoorIn(plan: Plan, recordFromS: number, before: TrueTurn | undefined, turn: TrueTurn) {
  if (turn.kind !== 'reset') return false;
  return plan.faults.doorOpen.some(({ fromS }) => {
    const doorS = fromS - recordFromS;
    return doorS > (before?.timeS ?? -Infinity) && doorS < turn.timeS;
  });
}

/** A one-shot part that opens where the machine's own cut-outs lie leaves no trace of what it was. */
function alikeOneShots(run: ModelRun): TrueTurn[] {
  const own = trueTurningPoints(run, SWING_K).filter(({ kind }) => kind === 'cut-out');
  return trueExtremes(run, SWING_K - NEAR_K)
    .filter(
      ({ kind, cause, tempC }) =>
        kind === 'peak' &&
        cause?.cause === 'one-shot' &&
        own.some((turn) => Math.abs(turn.tempC - tempC) < 5 / 1.8),
    )
    .map((extreme) => asTurn(run, extreme));
}

/** Turns that the air made while the heater did nothing: a blower that stops, a duct taken off, a drum that warms. */
function turnsOfTheAir(run: ModelRun): TrueTurn[] {
  return trueExtremes(run, SWING_K - NEAR_K)
    .filter(({ cause }) => cause === null)
    .map((extreme) => asTurn(run, extreme));
}

function asTurn(run: ModelRun, { kind, timeS, tempC, index, cause }: TrueExtreme): TrueTurn {
  return {
    kind: kind === 'peak' ? 'cut-out' : 'reset',
    timeS,
    tempC,
    switchTimeS: cause?.timeS ?? timeS,
    ...flatSpan(run.probeC, index),
  };
}
