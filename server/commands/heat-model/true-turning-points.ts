import type { ModelRun } from './simulate-run.ts';
import { STEP_S } from './simulate-run.ts';

export type TrueTurn = {
  kind: 'cut-out' | 'reset';
  timeS: number;
  tempC: number;
  /** When the heater really changed, and what the probe showed then. */
  switchTimeS: number;
  /** The span around it in which the noise-free probe stays within 0.25 °F of the turn. */
  flatFromS: number;
  flatToS: number;
};

/**
 * The turning points of the noise-free probe: extremes that stand out from both sides by the threshold. A turn that a
 * person or a one-shot part made does not count, and the first rise from cold starts no reset.
 */
export function trueTurningPoints(run: ModelRun, swingK: number): TrueTurn[] {
  const turns: TrueTurn[] = [];
  for (const { index, isPeak } of extremes(run.probeC, swingK)) {
    const timeS = index * STEP_S;
    const cause = run.switches.findLast(
      (change) => change.timeS <= timeS && change.changeW < 0 === isPeak,
    );
    if (!cause || cause.cause === 'person' || cause.cause === 'one-shot') continue;
    if (!isPeak && turns.length === 0) continue;
    turns.push({
      kind: isPeak ? 'cut-out' : 'reset',
      timeS,
      tempC: run.probeC[index] ?? 0,
      switchTimeS: cause.timeS,
      ...flatSpan(run.probeC, index),
    });
  }
  return turns;
}

function extremes(tempsC: Float64Array, swingK: number): { index: number; isPeak: boolean }[] {
  const found: { index: number; isPeak: boolean }[] = [];
  let lowest = 0;
  let highest = 0;
  let direction = 0;
  tempsC.forEach((tempC, i) => {
    if (tempC > tempsC[highest]!) highest = i;
    if (tempC < tempsC[lowest]!) lowest = i;
    if (direction >= 0 && tempsC[highest]! - tempC >= swingK) {
      if (direction === 1) found.push({ index: highest, isPeak: true });
      direction = -1;
      lowest = i;
    } else if (direction <= 0 && tempC - tempsC[lowest]! >= swingK) {
      if (direction === -1) found.push({ index: lowest, isPeak: false });
      direction = 1;
      highest = i;
    }
  });
  return found;
}

function flatSpan(tempsC: Float64Array, at: number): { flatFromS: number; flatToS: number } {
  const near = (i: number) => Math.abs((tempsC[i] ?? Infinity) - tempsC[at]!) <= 0.25 / 1.8;
  let from = at;
  let to = at;
  while (near(from - 1)) from--;
  while (near(to + 1)) to++;
  return { flatFromS: from * STEP_S, flatToS: to * STEP_S };
}
