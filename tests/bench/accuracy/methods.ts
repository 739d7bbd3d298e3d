import type { Random } from '#server/commands/heat-model/random.ts';
import type { ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import {
  PROBE,
  takeHandReadings,
  takeProbeReadings,
  type ProbeMethod,
  type Readings,
} from '#server/commands/heat-model/take-readings.ts';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';

/** A way to read a run, and how near a found turn must lie to a true one, s. */
export type Method = {
  name: string;
  withinS: number;
  read: (run: ModelRun, turns: TrueTurn[], random: Random) => Readings;
};

export const METHODS: Method[] = [
  probe('1 s', { spacingS: 1, noiseK: 0.1 }),
  probe('2 s', { spacingS: 2, noiseK: 0.1 }),
  probe('5 s', { spacingS: 5, noiseK: 0.1 }),
  probe('noisy', { spacingS: 1, noiseK: 0.6 }),
  {
    name: 'messy',
    withinS: 8,
    read: (run, _, random) => {
      const fromS = random.between(60, 400);
      const gaps = [{ fromS, toS: fromS + random.between(8, 14) }];
      const messy = {
        spacingS: 2,
        noiseK: 0.2,
        step: 0.5,
        jitterS: 0.6,
        spikes: 0.003,
        dropOuts: 0.01,
        gaps,
      };
      return takeProbeReadings(run, { ...PROBE, ...messy }, random);
    },
  },
  { name: 'hand', withinS: 14, read: takeHandReadings },
];

function probe(name: string, told: Partial<ProbeMethod>): Method {
  const method = { ...PROBE, ...told };
  return {
    name,
    withinS: Math.max(8, 2.5 * method.spacingS),
    read: (run, _, random) => takeProbeReadings(run, method, random),
  };
}
