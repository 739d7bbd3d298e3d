import { createRandom, type Random } from '#server/commands/heat-model/random.ts';
import { simulateRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import { randomMachine } from '../machines.ts';
import type { Maker, Plan, Told } from '../plan.ts';

/** Half-cycles, s, and swings, K, that a kind of bursts must show at the probe. */
type Wanted = { fromS: number; toS: number; leastSwingK: number; mostSwingK: number };

/** A limit on the heater housing that cuts again and again for want of air. */
export const LIMIT_PLANS: Maker[] = [
  {
    name: 'crushed duct, quick bursts',
    meant: 'limit-cycling',
    make: (random) => ({
      ...bursts(random, { fromS: 7, toS: 16, leastSwingK: 3.2, mostSwingK: 8 }, [52, 80], [3, 6]),
      mostSpacingS: 2,
    }),
  },
  {
    name: 'crushed duct',
    meant: 'limit-cycling',
    make: (random) => ({
      ...bursts(
        random,
        { fromS: 14, toS: 40, leastSwingK: 3.2, mostSwingK: 8.2 },
        [45, 76],
        [5, 10],
      ),
      mostSpacingS: 5,
    }),
  },
  {
    name: 'crushed duct, wide swings',
    meant: 'limit-cycling',
    make: (random) => ({
      ...bursts(random, { fromS: 14, toS: 80, leastSwingK: 8, mostSwingK: 12 }, [38, 60], [8, 14]),
      mostSpacingS: 5,
    }),
  },
];

type Span = [low: number, high: number];

function bursts(random: Random, wanted: Wanted, closesC: Span, lagS: Span): Told {
  return {
    machine: { ...randomMachine(random), drumWPerK: random.between(65, 100), mixingS: 2.5 },
    faults: { airflow: [{ fromS: 0, share: random.between(0.22, 0.3) }] },
    watch: { forS: random.between(500, 800) },
    finish: (plan) => tryLimits(plan, wanted, () => drawLimit(random, closesC, lagS)),
  };
}

function drawLimit(random: Random, closesC: Span, lagS: Span): Plan['machine']['boxLimit'] {
  return {
    opensC: random.between(98, 112),
    closesC: random.between(...closesC),
    lagS: random.between(...lagS),
  };
}

/** Tried anew until the bursts show at the outlet as wanted, and well under the thermostat. */
function tryLimits(plan: Plan, wanted: Wanted, draw: () => Plan['machine']['boxLimit']): Plan {
  let made = plan;
  for (let attempt = 0; attempt < 60; attempt++) {
    made = { ...plan, machine: { ...plan.machine, boxLimit: draw() } };
    if (bursting(made, wanted)) return made;
  }
  return made;
}

function bursting(plan: Plan, { fromS, toS, leastSwingK, mostSwingK }: Wanted): boolean {
  const run = simulateRun(plan.machine, plan.faults, plan.watch, createRandom(1));
  const turns = trueTurningPoints(run, 2.6);
  const cutOuts = turns.filter(({ kind }) => kind === 'cut-out').map(({ tempC }) => tempC);
  const [first, last] = turns.slice(-2);
  if (!first || !last || cutOuts.length < 4 || Math.max(...cutOuts) > 63.5) return false;
  const swingK = Math.abs(last.tempC - first.tempC);
  const halfS = (last.timeS - turns.at(-3)!.timeS) / 2;
  return halfS >= fromS && halfS <= toS && swingK >= leastSwingK && swingK <= mostSwingK;
}
