import type { Random } from '#server/commands/heat-model/random.ts';
import { powerForLevel, randomMachine } from '../machines.ts';
import type { Maker, Told } from '../plan.ts';

/** Some heat that stays on after the thermostat opened, and heat that is lost for good. */
export const HEAT_LEFT_PLANS: Maker[] = [
  {
    name: 'grounded coil hangs',
    meant: 'heat-stays-on',
    make: (random) => hangs(random, after(random, 2)),
  },
  {
    name: 'grounded coil hangs from the first',
    meant: 'heat-stays-on',
    make: (random) => hangs(random, 1),
  },
  {
    name: 'grounded coil levels in the band',
    meant: 'heat-stays-on',
    make: (random) => levels(random, 1, [151, 163]),
  },
  {
    name: 'grounded coil levels after rounds',
    meant: 'heat-stays-on',
    make: (random) => levels(random, after(random, 2), [142, 163]),
  },
  {
    name: 'grounded coil slows the fall',
    meant: 'heat-stays-on',
    make: (random) => slows(random, [1900, 2500]),
  },
  {
    name: 'grounded coil slows it a little',
    meant: 'heat-stays-on',
    make: (random) => slows(random, [800, 1900]),
  },
  {
    name: 'fuse opens',
    meant: 'heat-lost',
    make: (random) => ({
      faults: { opensForGoodS: random.between(420, 650) },
      watch: { forS: 1300 },
    }),
  },
  {
    name: 'timer ends the heat',
    meant: 'heat-lost',
    make: (random) => {
      const opensForGoodS = random.between(420, 700);
      // After the heat a machine tumbles cool for some minutes, then stands still.
      const stands = { fromS: opensForGoodS + random.between(100, 300), share: 0.08 };
      return { faults: { opensForGoodS, airflow: [stands] }, watch: { forS: 1400 } };
    },
  },
  {
    name: 'heat lost on the first rise',
    meant: 'heat-lost',
    make: (random) => ({
      faults: { opensForGoodS: random.between(130, 200) },
      watch: { forS: random.between(600, 1000) },
    }),
  },
  {
    name: 'heat lost, record ends soon',
    meant: 'heat-lost',
    make: (random) => {
      const opensForGoodS = random.between(420, 650);
      return {
        faults: { opensForGoodS },
        watch: { forS: opensForGoodS + random.between(50, 160) },
      };
    },
  },
];

function after(random: Random, least: number): number {
  return least + Math.floor(random.between(0, 3));
}

function electric(random: Random) {
  return { ...randomMachine(random), relightS: 0 };
}

/** The exhaust stops falling above the reset band or in it, far above the room. */
function hangs(random: Random, groundedAfter: number): Told {
  return {
    machine: electric(random),
    faults: { groundedW: random.between(3000, 3700), groundedAfter },
    watch: { forS: 1500 },
  };
}

/** With this opening on, so much heat stays that the exhaust goes level in the band or under it. */
function levels(random: Random, groundedAfter: number, [lowF, highF]: [number, number]): Told {
  const machine = electric(random);
  const groundedW = powerForLevel(machine, random.between(lowF, highF));
  return { machine, faults: { groundedW, groundedAfter }, watch: { forS: 1500 } };
}

function slows(random: Random, [lowW, highW]: [number, number]): Told {
  return {
    machine: electric(random),
    faults: { groundedW: random.between(lowW, highW), groundedAfter: 3 },
    watch: { forS: 1400 },
  };
}
