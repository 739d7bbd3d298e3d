import type { Random } from '#server/commands/heat-model/random.ts';
import { powerForLevel, randomMachine } from '../machines.ts';
import type { Maker, Told } from '../plan.ts';
import { endAfterTurn } from './end-record.ts';

/** Too little heat to cut out, none at all, or a record that ends too soon to tell. */
export const LITTLE_HEAT_PLANS: Maker[] = [
  {
    name: 'weak heat',
    meant: 'below-cut-out',
    make: (random) => levelling(random, random.between(112, 141)),
  },
  {
    name: 'weak heat, nearly there',
    meant: 'below-cut-out',
    make: (random) => levelling(random, random.between(141, 149.5)),
  },
  { name: 'weak supply', meant: 'below-cut-out', make: weakSupply },
  {
    name: 'no heat',
    meant: 'no-heat',
    make: (random) => ({
      faults: { heaterShare: random.between(0, 0.06) },
      watch: { forS: random.between(360, 800) },
    }),
  },
  {
    name: 'hardly any heat',
    meant: 'no-heat',
    make: (random) => {
      const machine = randomMachine(random);
      const levelF = machine.roomC * 1.8 + 32 + random.between(8, 22);
      return {
        machine: { ...machine, powerW: powerForLevel(machine, levelF) },
        watch: { forS: random.between(900, 1400) },
      };
    },
  },
  {
    name: 'stopped early',
    meant: 'too-short',
    make: (random) => ({ watch: { forS: random.between(60, 150) } }),
  },
  { name: 'one cut-out', meant: 'too-short', make: (random) => ending(random, 1, [12, 25]) },
  {
    name: 'one cut-out and one reset',
    meant: 'too-short',
    make: (random) => ending(random, 2, [15, 35]),
  },
  {
    name: 'damp load',
    meant: 'too-short',
    make: (random) => ({
      machine: { ...randomMachine(random), waterKg: random.between(1.7, 3) },
      watch: { forS: random.between(700, 950) },
      load: 'damp',
    }),
  },
];

function levelling(random: Random, levelF: number): Told {
  const machine = randomMachine(random);
  return {
    machine: { ...machine, powerW: powerForLevel(machine, levelF) },
    watch: { forS: random.between(1000, 1500) },
  };
}

/** 208 V in place of 240 V gives 0.75 of the heat; with plenty of air that does not reach the cut-out. */
function weakSupply(random: Random): Told {
  const machine = { ...randomMachine(random), relightS: 0 };
  const powerW = powerForLevel(machine, random.between(158, 170));
  return {
    machine: { ...machine, powerW: powerW * (208 / 240) ** 2 },
    watch: { forS: random.between(1000, 1500) },
  };
}

function ending(random: Random, nth: number, [lowS, highS]: [number, number]): Told {
  return {
    faults: { scatterK: 0 },
    finish: (plan) => endAfterTurn(plan, nth, random.between(lowS, highS)),
  };
}
