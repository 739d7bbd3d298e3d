import { toCelsius } from '#shared/units.ts';
import { STEP_S } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import { unattended } from '../machines.ts';
import type { Plan } from '../plan.ts';

/** Swing at which turns are counted here, K. */
const SWING_K = 1;

/** The plan whose record ends where the probe first reaches a temperature; only for plans without scatter. */
export function endAt(plan: Plan, tempF: number): Plan {
  const { probeC } = unattended(plan.machine, plan.faults, 2400);
  const reached = probeC.findIndex((tempC) => tempC >= toCelsius(tempF, 'F'));
  const forS = (reached < 0 ? probeC.length - 1 : reached) * STEP_S;
  return { ...plan, watch: { ...plan.watch, forS } };
}

/** The plan whose record ends some seconds after its n-th turn, counted from 1; only for plans without scatter. */
export function endAfterTurn(plan: Plan, nth: number, afterS: number): Plan {
  const turns = trueTurningPoints(unattended(plan.machine, plan.faults, 2400), SWING_K);
  const turn = turns[nth - 1];
  return turn ? { ...plan, watch: { ...plan.watch, forS: turn.timeS + afterS } } : plan;
}
