import type { Random } from '#server/commands/heat-model/random.ts';
import { hotMachine } from '../machines.ts';
import type { Maker, Told } from '../plan.ts';
import { endAfterTurn } from './end-record.ts';

/** Runs that cycle by themselves at the wrong temperature, or at no steady one; plain ones and thin ones. */
export const THERMOSTAT_PLANS: Maker[] = [
  {
    name: 'opens high',
    meant: 'opens-high',
    make: (random) => hot(random, [175, 181], [143, 155]),
  },
  {
    name: 'opens high, just',
    meant: 'opens-high',
    make: (random) => hot(random, [170.2, 175], [140, 150]),
  },
  {
    name: 'opens high, near the ceiling',
    meant: 'opens-high',
    make: (random) => hot(random, [181, 186.5], [150, 162]),
  },
  {
    name: 'opens low',
    meant: 'opens-low',
    make: (random) => turning(random, [138, 146], [113, 117.5]),
  },
  {
    name: 'opens low, just',
    meant: 'opens-low',
    make: (random) => turning(random, [145.5, 149.8], [122, 127]),
  },
  {
    name: 'closes high',
    meant: 'closes-high',
    make: (random) => turning(random, [153, 157], [139.5, 145]),
  },
  {
    name: 'closes high, just',
    meant: 'closes-high',
    make: (random) => turning(random, [153, 157], [135.2, 139.5]),
  },
  {
    name: 'closes low',
    meant: 'closes-low',
    make: (random) => turning(random, [153, 157], [98, 110.5], 1400),
  },
  {
    name: 'closes low, just',
    meant: 'closes-low',
    make: (random) => turning(random, [153, 157], [110.5, 114.8], 1400),
  },
  {
    name: 'another part on low',
    meant: 'opens-high',
    make: (random) => ({
      ...turning(random, [151, 157], [127, 133]),
      rated: { opens: 125, closes: 105 },
    }),
  },
  {
    name: 'bias heater open',
    meant: 'opens-high',
    make: (random) => ({
      ...turning(random, [139, 150], [107, 114]),
      rated: { opens: 125, closes: 110 },
    }),
  },
  {
    name: 'drifts up',
    meant: 'drifting',
    make: (random) => drifts(random, [149.5, 152], [7, 15]),
  },
  {
    name: 'drifts down',
    meant: 'drifting',
    make: (random) => drifts(random, [158, 162], [-15, -7]),
  },
  {
    name: 'drifts a little',
    meant: 'drifting',
    make: (random) => drifts(random, [151, 154], [2, 7.5]),
  },
  {
    name: 'drifts, too hot',
    meant: 'drifting',
    make: (random) => ({
      ...drifts(random, [168, 172], [7, 11], [141, 149]),
      machine: hotMachine(random),
    }),
  },
  { name: 'scatters', meant: 'scattered', make: (random) => scatters(random, [4, 6.5]) },
  { name: 'scatters a little', meant: 'scattered', make: (random) => scatters(random, [1.5, 3.5]) },
  {
    name: 'one late',
    meant: 'mixed',
    // Hot enough to get past the late opening and round again; too few cut-outs for a scatter.
    make: (random) => ({
      machine: hotMachine(random),
      faults: { oneLate: { opening: 2, byK: random.between(10, 12) }, scatterK: 0 },
      finish: (plan) => endAfterTurn(plan, 7, random.between(15, 30)),
    }),
  },
  {
    name: 'one late among many',
    meant: 'scattered',
    make: (random) => ({
      machine: hotMachine(random),
      faults: { oneLate: { opening: 3, byK: random.between(10, 12) }, scatterK: 0.1 },
      watch: { forS: 1100 },
    }),
  },
  {
    name: 'one early among many',
    meant: 'mixed',
    make: (random) => ({
      faults: { oneLate: { opening: 3, byK: random.between(-7, -5.5) }, scatterK: 0.1 },
      accuracyK: 0.5 / 1.8,
      watch: { forS: random.between(1700, 2000) },
    }),
  },
];

type Span = [low: number, high: number];

function turning(random: Random, cutOutF: Span, resetF: Span, forS?: number): Told {
  return {
    turns: { cutOutF: random.between(...cutOutF), resetF: random.between(...resetF) },
    watch: { forS: forS ?? random.between(700, 1300) },
  };
}

function hot(random: Random, cutOutF: Span, resetF: Span): Told {
  const machine = hotMachine(random);
  return { machine, ...turning(random, cutOutF, resetF, 1500) };
}

/** By so many °F over the record, which ends with the last of its rounds. */
function drifts(random: Random, cutOutF: Span, totalF: Span, resetF: Span = [127, 131]): Told {
  const cutOuts = Math.floor(random.between(6, 15));
  const driftK = random.between(...totalF) / 1.8 / (cutOuts - 1);
  return {
    ...turning(random, cutOutF, resetF),
    faults: { scatterK: random.between(0.02, 0.15), driftK },
    finish: (plan) => endAfterTurn(plan, 2 * cutOuts - 1, 25),
  };
}

function scatters(random: Random, scatterK: Span): Told {
  return {
    // So hot that it gets past its highest opening.
    machine: hotMachine(random),
    faults: { scatterK: random.between(...scatterK) },
    watch: { forS: random.between(1600, 2100) },
  };
}
