import type { Machine } from '#server/commands/heat-model/machine.ts';
import type { Random } from '#server/commands/heat-model/random.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import { randomMachine, unattended } from '../machines.ts';
import type { Maker, Plan, Told } from '../plan.ts';

/** A limit on the heater housing that cuts again and again for want of air. */
export const LIMIT_PLANS: Maker[] = [
  {
    name: 'crushed duct, quick bursts',
    meant: 'limit-cycling',
    make: (random) => {
      const quick = { mixingS: 1.2, heaterJPerK: random.between(120, 250), probeLagS: 2 };
      return { ...bursts(random, [3.4, 6], [2, 5], quick), mostSpacingS: 2 };
    },
  },
  {
    name: 'crushed duct',
    meant: 'limit-cycling',
    make: (random) => ({ ...bursts(random, [5, 8.2], [5, 10]), mostSpacingS: 5 }),
  },
  {
    // The rated differential is 13.9 K: from well under 0.7 of it to over.
    name: 'crushed duct, wide swings',
    meant: 'limit-cycling',
    make: (random) => ({ ...bursts(random, [8.2, 11.5], [8, 14]), mostSpacingS: 5 }),
  },
];

type Span = [low: number, high: number];

/** Swings under this are no turns here, and cut-outs over that are the thermostat's, K and °C. */
const SEEN_K = 2.6;
const UNDER_C = 63;

function bursts(random: Random, swingK: Span, lagS: Span, machine: Partial<Machine> = {}): Told {
  return {
    machine: {
      ...randomMachine(random),
      drumWPerK: random.between(65, 100),
      mixingS: 2.5,
      ...machine,
    },
    faults: { airflow: [{ fromS: 0, share: random.between(0.22, 0.28) }] },
    watch: { forS: random.between(500, 800) },
    finish: (plan) => setLimit(plan, random.between(...swingK), random.between(...lagS)),
  };
}

/** The limit that makes the outlet swing so far, opening no higher than keeps the outlet under the thermostat. */
function setLimit(plan: Plan, swingK: number, lagS: number): Plan {
  let made = plan;
  for (let opensC = 108; opensC >= 84; opensC -= 6) {
    made = withSwing(plan, swingK, { opensC, lagS });
    if (burstsOf(made).highestC < UNDER_C) return made;
  }
  return made;
}

/** How far under its opening the limit closes, found by halving: the further, the wider the swings. */
function withSwing(plan: Plan, swingK: number, limit: { opensC: number; lagS: number }): Plan {
  let lowK = 4;
  let highK = 60;
  let made = plan;
  for (let round = 0; round < 7; round++) {
    const lessK = (lowK + highK) / 2;
    const boxLimit = { ...limit, closesC: limit.opensC - lessK };
    made = { ...plan, machine: { ...plan.machine, boxLimit } };
    if (burstsOf(made).swingK > swingK) highK = lessK;
    else lowK = lessK;
  }
  return made;
}

/** The last swing and the highest turn of a plan's run; no swing at all counts as 0. */
function burstsOf({ machine, faults, watch }: Plan): { swingK: number; highestC: number } {
  const turns = trueTurningPoints(unattended(machine, faults, watch.forS), SEEN_K);
  const [before, last] = turns.slice(-2);
  return {
    swingK: before && last ? Math.abs(last.tempC - before.tempC) : 0,
    highestC: Math.max(-Infinity, ...turns.map(({ tempC }) => tempC)),
  };
}
