import type { Switch } from './controls.ts';
import { STEP_S, type ModelRun } from './simulate-run.ts';

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

/** Any extreme of the noise-free probe, and the change of the heater that made it; null where the air did. */
export type TrueExtreme = {
  kind: 'peak' | 'valley';
  timeS: number;
  tempC: number;
  index: number;
  cause: Switch | null;
};

/**
 * The turning points of the noise-free probe: extremes that stand out from both sides by the threshold. A turn that a
 * person, a one-shot part or the air alone made does not count, and the first rise from cold starts no reset.
 */
export function trueTurningPoints(run: ModelRun, swingK: number): TrueTurn[] {
  const turns: TrueTurn[] = [];
  for (const { kind, timeS, tempC, index, cause } of trueExtremes(run, swingK)) {
    if (!cause || cause.cause === 'person' || cause.cause === 'one-shot') continue;
    if (kind === 'valley' && turns.length === 0) continue;
    turns.push({
      kind: kind === 'peak' ? 'cut-out' : 'reset',
      timeS,
      tempC,
      switchTimeS: cause.timeS,
      ...flatSpan(run.probeC, index),
    });
  }
  return turns;
}

/** All extremes that stand out from both sides by the threshold, whatever made them, in time order. */
export function trueExtremes(run: ModelRun, swingK: number): TrueExtreme[] {
  let usedS = -Infinity;
  return extremes(run.probeC, swingK).map(({ index, isPeak }) => {
    const timeS = index * STEP_S;
    const last = run.switches.findLast(
      (change) => change.timeS <= timeS && change.changeW < 0 === isPeak,
    );
    // A change that an earlier extreme has answered already makes no second one.
    const cause = last && last.timeS > usedS ? last : null;
    if (cause) usedS = cause.timeS;
    const tempC = run.probeC[index] ?? 0;
    return { kind: isPeak ? 'peak' : 'valley', timeS, tempC, index, cause };
  });
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

/** The span around an index in which the probe stays within 0.25 °F of what it shows there. */
export function flatSpan(tempsC: Float64Array, at: number): { flatFromS: number; flatToS: number } {
  const near = (i: number) => Math.abs((tempsC[i] ?? Infinity) - tempsC[at]!) <= 0.25 / 1.8;
  let from = at;
  let to = at;
  while (near(from - 1)) from--;
  while (near(to + 1)) to++;
  return { flatFromS: from * STEP_S, flatToS: to * STEP_S };
}
