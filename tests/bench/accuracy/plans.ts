import type { FindingCode } from '#shared/analysis/analysis.ts';
import { toCelsius } from '#shared/units.ts';
import {
  SOUND,
  type Faults,
  type Machine,
  type Watch,
} from '#server/commands/heat-model/machine.ts';
import { createRandom, type Random } from '#server/commands/heat-model/random.ts';
import { simulateRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';
import { randomMachine, withTurnsAt } from './machines.ts';

/** One run to make, and what is wrong in it. */
export type Plan = {
  name: string;
  machine: Machine;
  faults: Faults;
  watch: Watch;
  load: 'empty' | 'damp';
  clicksMarked: boolean;
  /** The code that the fault is there to give; null: what the true points say. */
  cause: FindingCode | null;
};

type Maker = (random: Random) => Plan;

const NEVER = 600;

/** Every run of a seed: about one in four is sound. */
export function plansOf(seed: number): Plan[] {
  return MAKERS.map((make, i) => make(createRandom(seed * 1000 + i)));
}

function plan(
  name: string,
  random: Random,
  told: Partial<Plan> & { turns?: { cutOutF: number; resetF: number } },
): Plan {
  const { turns, ...rest } = told;
  const base = rest.machine ?? randomMachine(random);
  const machine = withTurnsAt(base, turns ?? inBandTurns(random), random);
  return {
    name,
    faults: { ...SOUND, scatterK: random.between(0.05, 0.4) },
    watch: watchFor(random.between(700, 1300)),
    load: 'empty',
    clicksMarked: random.chance(0.4),
    cause: null,
    ...rest,
    machine,
  };
}

function watchFor(forS: number): Watch {
  return { forS, heatOffAtC: Infinity, afterHeatOffS: 0 };
}

function inBandTurns(random: Random) {
  return { cutOutF: random.between(152.5, 157.5), resetF: random.between(127.5, 132.5) };
}

function faultsOf(random: Random, told: Partial<Faults>): Faults {
  return { ...SOUND, scatterK: random.between(0.05, 0.4), ...told };
}

function stoppedAt(random: Random, forS = 1800): Watch {
  return {
    forS,
    heatOffAtC: toCelsius(random.between(178, 189), 'F'),
    afterHeatOffS: random.between(60, 200),
  };
}

function hot(machine: Machine): Machine {
  return { ...machine, powerW: 6000, airKgPerS: 0.064, leak: 0.06 };
}

const sound: Maker = (random) => plan('sound', random, {});

/** Tried anew until the bursts show at the outlet, and well under the thermostat: else it is no run of this kind. */
const crushedDuct: Maker = (random) => {
  for (;;) {
    const made = plan('crushed duct', random, {
      machine: { ...randomMachine(random), drumWPerK: random.between(65, 100), mixingS: 2.5 },
      faults: faultsOf(random, { airflow: [{ fromS: 0, share: random.between(0.22, 0.28) }] }),
      watch: watchFor(random.between(500, 800)),
      cause: 'limit-cycling',
    });
    const boxLimit = {
      opensC: random.between(103, 110),
      closesC: random.between(62, 76),
      lagS: random.between(5, 10),
    };
    const machine = { ...made.machine, boxLimit };
    const run = simulateRun(machine, made.faults, made.watch, createRandom(1));
    const turns = trueTurningPoints(run, 5.5 / 1.8);
    const cutOuts = turns.filter(({ kind }) => kind === 'cut-out').map(({ tempC }) => tempC);
    const resets = turns.filter(({ kind }) => kind === 'reset').map(({ tempC }) => tempC);
    const swingK = (cutOuts.at(-1) ?? 0) - (resets.at(-1) ?? 0);
    if (cutOuts.length >= 5 && Math.max(...cutOuts) < 63 && swingK < 8.5)
      return { ...made, machine };
  }
};

const MAKERS: Maker[] = [
  sound,
  sound,
  sound,
  sound,
  sound,
  (random) =>
    plan('edge of the band', random, {
      turns: { cutOutF: random.between(158, 164), resetF: random.between(123, 130) },
    }),
  (random) =>
    plan('opens high', random, {
      machine: hot(randomMachine(random)),
      watch: watchFor(1500),
      turns: { cutOutF: random.between(173.5, 179), resetF: random.between(143, 155) },
    }),
  (random) =>
    plan('opens low', random, {
      turns: { cutOutF: random.between(138, 146.5), resetF: random.between(116, 123) },
    }),
  (random) =>
    plan('closes high', random, {
      turns: { cutOutF: random.between(153, 157), resetF: random.between(138.5, 145) },
    }),
  (random) =>
    plan('closes low', random, {
      watch: watchFor(1400),
      turns: { cutOutF: random.between(153, 157), resetF: random.between(98, 111.5) },
    }),
  (random) =>
    plan('relay sticks', random, {
      machine: hot(randomMachine(random)),
      faults: faultsOf(random, {
        relaySticksAfter: 1 + Math.floor(random.between(0, 4)),
        relayLateS: random.between(0, 5),
      }),
      watch: stoppedAt(random),
      cause: 'runaway',
    }),
  (random) => {
    const made = plan('runs away from cold', random, {
      machine: hot(randomMachine(random)),
      watch: stoppedAt(random),
      cause: 'runaway',
    });
    return { ...made, machine: { ...made.machine, disc: { ...made.machine.disc, opensC: NEVER } } };
  },
  (random) => {
    const made = plan('fuse ends a runaway', random, {
      machine: { ...hot(randomMachine(random)), airKgPerS: 0.056 },
      watch: watchFor(1500),
      cause: 'runaway',
    });
    return { ...made, machine: { ...made.machine, disc: { ...made.machine.disc, opensC: NEVER } } };
  },
  (random) =>
    plan('grounded coil hangs', random, {
      machine: { ...randomMachine(random), relightS: 0 },
      faults: faultsOf(random, {
        groundedW: random.between(3000, 3700),
        groundedAfter: 1 + Math.floor(random.between(0, 4)),
      }),
      watch: watchFor(1500),
      cause: 'heat-stays-on',
    }),
  (random) =>
    plan('grounded coil slows the fall', random, {
      machine: { ...randomMachine(random), relightS: 0 },
      faults: faultsOf(random, { groundedW: random.between(1900, 2500), groundedAfter: 3 }),
      watch: watchFor(1400),
      cause: 'heat-stays-on',
    }),
  (random) =>
    plan('fuse opens', random, {
      faults: faultsOf(random, { opensForGoodS: random.between(420, 650) }),
      watch: watchFor(1300),
      cause: 'heat-lost',
    }),
  crushedDuct,
  (random) =>
    plan('drifts', random, {
      turns: { cutOutF: random.between(149.5, 152), resetF: random.between(127, 131) },
      faults: faultsOf(random, {
        driftK: random.between(0.8, 1.2),
        scatterK: random.between(0.05, 0.3),
      }),
      watch: watchFor(1300),
    }),
  (random) =>
    plan('scatters', random, {
      faults: faultsOf(random, { scatterK: random.between(3.3, 5) }),
      watch: watchFor(1300),
    }),
  (random) =>
    plan('weak heat', random, {
      faults: faultsOf(random, { heaterShare: random.between(0.35, 0.52) }),
      watch: watchFor(random.between(1000, 1500)),
      cause: 'below-cut-out',
    }),
  (random) =>
    plan('no heat', random, {
      faults: faultsOf(random, { heaterShare: random.between(0, 0.06) }),
      watch: watchFor(random.between(360, 800)),
      cause: 'no-heat',
    }),
  (random) =>
    plan('damp load', random, {
      machine: { ...randomMachine(random), waterKg: random.between(1.7, 3) },
      watch: watchFor(random.between(700, 950)),
      load: 'damp',
      cause: 'too-short',
    }),
  (random) =>
    plan('stopped early', random, { watch: watchFor(random.between(90, 150)), cause: 'too-short' }),
  (random) =>
    plan('one late', random, {
      // Hot enough to get past the late opening and round again.
      machine: hot(randomMachine(random)),
      faults: faultsOf(random, {
        oneLate: { opening: 2, byK: random.between(10, 12) },
        scatterK: 0.1,
      }),
      watch: watchFor(950),
    }),
];
