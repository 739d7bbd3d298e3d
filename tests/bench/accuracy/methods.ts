import type { Random } from '#server/commands/heat-model/random.ts';
import type { ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import {
  PROBE,
  takeHandReadings,
  takeProbeReadings,
  type HandMethod,
  type ProbeMethod,
  type Readings,
} from '#server/commands/heat-model/take-readings.ts';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';

/** A way to read a run. */
export type Method = {
  name: string;
  spacingS: number;
  /** How near a found turn must lie to a true one, s. */
  withinS: number;
  /** Swings under this drown in its noise and are not asked for, K. */
  neededSwingK: number;
  /** Turns beside a leg shorter than this are not asked for: too few readings lie in it to tell it from noise, s. */
  leastLegS: number;
  /** Expanded uncertainty that a point read this way has at best, K: as wide as the truth is vague near a limit. */
  pointUK: number;
  /** A probe of its own, slower than the plan's: response time in s; null = the plan's. */
  lagS: (random: Random) => number | null;
  read: (run: ModelRun, turns: TrueTurn[], random: Random) => Readings;
};

/** Noise and rounding in °F, as a probe's recorder shows them. */
type ProbeTold = Partial<Omit<ProbeMethod, 'noiseK'>> & { noiseF?: number; pointUF?: number };

export const METHODS: Method[] = [
  probe('0.2 s', { spacingS: 0.2, noiseF: 0.15, pointUF: 0.1 }),
  probe('0.5 s', { spacingS: 0.5, noiseF: 0.3, pointUF: 0.15 }),
  probe('1 s', { spacingS: 1, noiseF: 0.18, pointUF: 0.12 }),
  probe('2 s', { spacingS: 2, noiseF: 0.18, pointUF: 0.2 }),
  probe('5 s', { spacingS: 5, noiseF: 0.18, pointUF: 0.35 }),
  probe('10 s', { spacingS: 10, noiseF: 0.2, pointUF: 0.8 }),
  probe('1 s, whole °F', { spacingS: 1, noiseF: 0.3, step: 1, pointUF: 0.3 }),
  probe('2 s, 0.5 °C', { spacingS: 2, noiseF: 0.2, unit: 'C', step: 0.5, pointUF: 0.4 }),
  probe('noisy', { spacingS: 1, noiseF: 1.08, pointUF: 0.7 }),
  { ...probe('noisiest', { spacingS: 1, noiseF: 1.6, pointUF: 1 }), neededSwingK: 6 / 1.8 },
  messy('messy', { spacingS: 2, noiseF: 0.36, step: 0.5, pointUF: 0.5 }),
  messy('messy, 1 s', { spacingS: 1, noiseF: 0.6, step: 0.1, pointUF: 0.5 }),
  slow('slow probe', { spacingS: 1, noiseF: 0.18, pointUF: 0.3 }, [8, 25]),
  hand('hand 10 s', { spacingS: 10, hurryS: 1.5, step: 0.1 }, 0.8),
  hand('hand 15 s', { spacingS: 15, hurryS: 3, step: 1 }, 1.2),
  hand('hand 20 s', { spacingS: 20, hurryS: 3, step: 1 }, 1.5),
];

/** Slower than a person is asked to read; played along the guard alone. */
export const HAND_30_S: Method = hand('hand 30 s', { spacingS: 30, hurryS: 4, step: 1 }, 2);

function probe(name: string, { noiseF = 0.2, pointUF = 0.2, ...told }: ProbeTold): Method {
  const method: ProbeMethod = { ...PROBE, ...told, noiseK: noiseF / 1.8 };
  return {
    name,
    spacingS: method.spacingS,
    withinS: Math.max(8, 2.5 * method.spacingS),
    neededSwingK: 0,
    leastLegS: 2 * method.spacingS,
    pointUK: pointUF / 1.8,
    lagS: () => null,
    read: (run, _, random) => takeProbeReadings(run, method, random),
  };
}

/** A recorder that stutters: jitter, wild and missing readings, and a pause. */
function messy(name: string, { noiseF = 0.2, pointUF = 0.2, ...told }: ProbeTold): Method {
  return {
    ...probe(name, { noiseF, pointUF, ...told }),
    read: (run, _, random) => {
      const method: ProbeMethod = { ...PROBE, ...told, noiseK: noiseF / 1.8 };
      const fromS = random.between(60, 400);
      const mess = {
        jitterS: 0.3 * method.spacingS,
        spikes: 0.003,
        dropOuts: 0.01,
        gaps: [{ fromS, toS: fromS + random.between(8, 14) }],
      };
      return takeProbeReadings(run, { ...method, ...mess }, random);
    },
  };
}

function slow(name: string, told: ProbeTold, [lowS, highS]: [number, number]): Method {
  return { ...probe(name, told), withinS: 8, lagS: (random) => random.between(lowS, highS) };
}

function hand(name: string, told: Partial<HandMethod>, pointUF: number): Method {
  const method = { spacingS: 15, hurryS: 3, step: 1, noiseK: 0.3 / 1.8, nearTurns: 0.85, ...told };
  return {
    name,
    spacingS: method.spacingS,
    withinS: 14,
    neededSwingK: 0,
    // Most turns have a reading of their own.
    leastLegS: 1.4 * method.spacingS,
    pointUK: pointUF / 1.8,
    lagS: () => null,
    read: (run, turns, random) => takeHandReadings(run, turns, random, method),
  };
}
