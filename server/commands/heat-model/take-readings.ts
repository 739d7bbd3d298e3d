import { fromCelsius } from '#shared/units.ts';
import type { Random } from './random.ts';
import { STEP_S, type ModelRun } from './simulate-run.ts';
import type { TrueTurn } from './true-turning-points.ts';

/** How a probe and its recorder turn the true temperature into readings. */
export type ProbeMethod = {
  spacingS: number;
  unit: 'F' | 'C';
  noiseK: number;
  /** Rounding, in the recorder's unit. */
  step: number;
  jitterS: number;
  /** Share of the readings that are wild, and that say nothing. */
  spikes: number;
  dropOuts: number;
  gaps: { fromS: number; toS: number }[];
};

export const PROBE: ProbeMethod = {
  spacingS: 1,
  unit: 'F',
  noiseK: 0.12,
  step: 0.1,
  jitterS: 0,
  spikes: 0,
  dropOuts: 0,
  gaps: [],
};

/** Readings in the recorder's unit; null where the sensor said nothing. */
export type Readings = { unit: 'F' | 'C'; timesS: number[]; temps: (number | null)[] };

export function takeProbeReadings(run: ModelRun, method: ProbeMethod, random: Random): Readings {
  const readings: Readings = { unit: method.unit, timesS: [], temps: [] };
  const endS = (run.probeC.length - 1) * STEP_S;
  for (let slotS = 0; slotS <= endS; slotS += method.spacingS) {
    const jitterS = slotS === 0 ? 0 : method.jitterS * random.between(-1, 1);
    const timeS = Math.min(endS, slotS + jitterS);
    if (method.gaps.some((gap) => timeS > gap.fromS && timeS < gap.toS)) continue;
    const wild = random.chance(method.spikes)
      ? random.between(15, 60) * (random.chance(0.5) ? 1 : -1)
      : 0;
    const tempC = probeAt(run, timeS) + method.noiseK * random.gaussian() + wild;
    readings.timesS.push(timeS);
    readings.temps.push(
      random.chance(method.dropOuts) ? null : roundTo(fromCelsius(tempC, method.unit), method.step),
    );
  }
  return readings;
}

/** How a person reads a display against a stopwatch. */
export type HandMethod = {
  /** Usual time between two readings, s, and how much it varies either way. */
  spacingS: number;
  hurryS: number;
  /** Rounding of the display, °F. */
  step: number;
  noiseK: number;
  /** Share of the turns near which one more reading is taken. */
  nearTurns: number;
};

export const BY_HAND: HandMethod = {
  spacingS: 15,
  hurryS: 5,
  step: 1,
  noiseK: 0.1,
  nearTurns: 0.85,
};

/**
 * A person with a thermometer and a stopwatch: a reading every 10 to 20 s in whole °F, and one more soon after most
 * turns, since the eye sees the needle stop.
 */
export function takeHandReadings(
  run: ModelRun,
  turns: TrueTurn[],
  random: Random,
  method: HandMethod = BY_HAND,
): Readings {
  const endS = (run.probeC.length - 1) * STEP_S;
  const { spacingS, hurryS, step, noiseK } = method;
  const moments = [0];
  let nextS = 0;
  while ((nextS += random.between(spacingS - hurryS, spacingS + hurryS)) <= endS) {
    moments.push(nextS);
  }
  for (const turn of turns) {
    if (random.chance(method.nearTurns)) moments.push(turn.timeS + random.between(-1.5, 2.5));
  }
  const timesS = spread(moments.map(Math.round), endS);
  const temps = timesS.map((timeS) =>
    roundTo(
      fromCelsius(
        probeAt(run, timeS + random.between(-0.4, 0.4)) + noiseK * random.gaussian(),
        'F',
      ),
      step,
    ),
  );
  return { unit: 'F', timesS, temps };
}

/** In order, and no two closer than 3 s: nobody writes faster. */
function spread(momentsS: number[], endS: number): number[] {
  const kept: number[] = [];
  for (const momentS of momentsS.sort((a, b) => a - b)) {
    const before = kept.at(-1);
    if (momentS <= endS && (before === undefined || momentS - before >= 3)) kept.push(momentS);
  }
  return kept;
}

/** The noise-free probe at any time, °C. */
export function probeAt({ probeC }: ModelRun, timeS: number): number {
  const place = Math.min(probeC.length - 1, Math.max(0, timeS / STEP_S));
  const below = Math.floor(place);
  const lowC = probeC[below] ?? 0;
  return lowC + (place - below) * ((probeC[below + 1] ?? lowC) - lowC);
}

function roundTo(value: number, step: number): number {
  // Through the decimal text, so that 154.8 is 154.8 and not 154.80000000000001.
  return Number((Math.round(value / step) * step).toFixed(4));
}
