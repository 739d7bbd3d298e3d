import type { Random } from '#server/commands/heat-model/random.ts';
import { hotMachine, randomMachine, unattended } from '../machines.ts';
import { inBandTurns, USUAL, type Maker, type Told } from '../plan.ts';

const sound: Maker = { name: 'sound', meant: 'in-band', make: () => ({}) };

/** Runs of machines with nothing wrong: every kind of record that must not be called faulty. */
export const SOUND_PLANS: Maker[] = [
  sound,
  sound,
  sound,
  {
    name: 'sound, slow igniter',
    meant: 'in-band',
    make: (random) => {
      // Closes as seen at the outlet: the air falls on while the igniter warms up.
      const rated = { opens: 155, closes: 122, closesTol: 7 };
      const relightS = random.between(24, 34);
      return {
        machine: { ...randomMachine(random), heaterJPerK: 260, relightS },
        rated,
        turns: inBandTurns(rated, random),
      };
    },
  },
  {
    name: 'sound, record begins warm',
    meant: 'in-band',
    make: (random) => ({ recordFromS: random.between(250, 600), watch: { forS: 1600 } }),
  },
  {
    name: 'sound, medium setting',
    meant: 'in-band',
    make: () => ({ rated: { opens: 140, closes: 120 } }),
  },
  {
    name: 'sound, bias heater on low',
    meant: 'in-band',
    make: (random) => ({
      machine: { ...randomMachine(random), biasK: random.between(6, 9) },
      rated: { opens: 125, closes: 108 },
      // The short rounds of a low setting run a few degrees lower until the drum is warm.
      turns: { cutOutF: random.between(126.5, 129), resetF: random.between(106, 110) },
    }),
  },
  {
    name: 'sound, wide differential',
    meant: 'in-band',
    make: (random) => ({
      rated: { opens: 155, closes: 105 },
      watch: { forS: random.between(1000, 1600) },
    }),
  },
  {
    name: 'sound, narrow differential',
    meant: 'in-band',
    make: () => ({ rated: { opens: 153, closes: 138 } }),
  },
  { name: 'sound, door opened', meant: 'in-band', make: doorOpened },
  { name: 'sound, duct taken off', meant: 'in-band', make: ductTakenOff },
  {
    name: 'sound, stopped by hand',
    meant: 'in-band',
    make: (random) => ({ watch: { heatOffAtS: random.between(650, 900), forS: 1400 } }),
  },
  {
    name: 'sound, nearly dry load',
    meant: 'in-band',
    make: (random) => ({
      machine: { ...randomMachine(random), waterKg: random.between(0.3, 0.6) },
      load: 'damp',
      watch: { forS: random.between(1500, 2000) },
    }),
  },
  { name: 'sound, long', meant: 'in-band', make: () => ({ watch: { forS: 2800 } }) },
  {
    name: 'sound, first overshoot',
    meant: 'in-band',
    make: (random) => ({
      machine: {
        ...hotMachine(random),
        heaterJPerK: random.between(800, 1100),
        drumJPerK: 9000,
        drumWPerK: 70,
      },
      watch: { forS: random.between(800, 1200) },
    }),
  },
  edge('cut-outs', (random) => ({
    ...inBandTurns(USUAL, random),
    cutOutF: random.between(158, 164),
  })),
  edge('cut-outs low', (random) => ({
    ...inBandTurns(USUAL, random),
    cutOutF: random.between(147, 152),
  })),
  edge('resets', (random) => ({
    ...inBandTurns(USUAL, random),
    resetF: random.between(132, 137.5),
  })),
  edge('resets low', (random) => ({
    ...inBandTurns(USUAL, random),
    resetF: random.between(120, 127),
  })),
];

function edge(of: string, turns: (random: Random) => NonNullable<Told['turns']>): Maker {
  return {
    name: `edge of the band, ${of}`,
    meant: 'too-close',
    make: (random) => ({ turns: turns(random) }),
  };
}

/** The door stands open for half a minute or so, in the middle of a rise or a fall. */
function doorOpened(random: Random): Told {
  const nth = 3 + Math.floor(random.between(0, 4));
  const share = random.between(0.3, 0.7);
  const forS = random.between(15, 50);
  return {
    faults: { scatterK: 0 },
    watch: { forS: random.between(1000, 1400) },
    finish: (plan) => {
      const { switches } = unattended(plan.machine, plan.faults, plan.watch.forS);
      const [from, to] = [switches[nth]?.timeS ?? 400, switches[nth + 1]?.timeS ?? 440];
      const fromS = from + share * (to - from);
      return { ...plan, faults: { ...plan.faults, doorOpen: [{ fromS, toS: fromS + forS }] } };
    },
  };
}

/** More air from one moment on: falls are quicker after it. */
function ductTakenOff(random: Random): Told {
  const timeS = random.between(350, 600);
  const airflow = [
    { fromS: 0, share: random.between(0.72, 0.88) },
    { fromS: timeS, share: 1 },
  ];
  return {
    faults: { airflow },
    marks: [{ timeS, kind: 'duct-off' }],
    watch: { forS: random.between(1000, 1400) },
  };
}
