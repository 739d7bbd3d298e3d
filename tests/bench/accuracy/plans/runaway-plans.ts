import { toCelsius } from '#shared/units.ts';
import type { Random } from '#server/commands/heat-model/random.ts';
import {
  hotElectric,
  hotMachine,
  neverOpening,
  powerForLevel,
  randomMachine,
} from '../machines.ts';
import { offAt, type Maker, type Plan, type Told } from '../plan.ts';
import { endAt, endAfterTurn } from './end-record.ts';

/** Heat that goes on past the band and its allowance. */
export const RUNAWAY_PLANS: Maker[] = [
  { name: 'relay sticks', meant: 'runaway', make: (random) => relaySticks(random, [178, 189]) },
  {
    name: 'relay sticks, stopped soon',
    meant: 'runaway',
    make: (random) => relaySticks(random, [170.5, 176]),
  },
  {
    name: 'relay sticks, gas',
    meant: 'runaway',
    make: (random) => ({
      ...relaySticks(random, [178, 189]),
      machine: { ...hotMachine(random), heaterJPerK: 260, relightS: random.between(3, 8) },
    }),
  },
  {
    name: 'relay sticks, fuse ends it',
    meant: 'runaway',
    make: (random) => ({
      machine: { ...hotMachine(random), airKgPerS: 0.056 },
      faults: { relaySticksAfter: sticksAfter(random) },
      watch: { forS: 1500 },
    }),
  },
  {
    name: 'relay sticks, not over at the end',
    meant: 'runaway',
    make: (random) => {
      const endF = random.between(174, 189);
      const relaySticksAfter = sticksAfter(random);
      return {
        machine: hotMachine(random),
        faults: { relaySticksAfter, scatterK: 0 },
        finish: (plan) => endAt(plan, endF),
      };
    },
  },
  {
    name: 'contacts stick at the first click',
    meant: 'runaway',
    make: (random) => ({
      machine: hotMachine(random),
      faults: { relaySticksAfter: 0 },
      clicksMarked: true,
      watch: offAt(random.between(178, 189)),
    }),
  },
  {
    name: 'runs away from cold',
    meant: 'runaway',
    make: (random) => ({ ...never(hotMachine(random)), watch: offAt(random.between(178, 189)) }),
  },
  {
    name: 'runs away, medium setting',
    meant: 'runaway',
    make: (random) => ({
      ...never(hotMachine(random)),
      rated: { opens: 140, closes: 120 },
      watch: offAt(random.between(160, 176)),
    }),
  },
  {
    name: 'fuse ends a runaway',
    meant: 'runaway',
    make: (random) => ({
      ...never({ ...hotMachine(random), airKgPerS: 0.056 }),
      watch: { forS: 1500 },
    }),
  },
  { name: 'levels off up there', meant: 'runaway', make: levelsOffUpThere },
  {
    name: 'on its way at the end',
    meant: 'runaway',
    make: (random) => {
      const endF = random.between(171, 189);
      const told = never(hotMachine(random));
      return { ...told, finish: (plan) => endAt(told.finish(plan), endF) };
    },
  },
  { name: 'opens, and most heat stays', meant: 'runaway', make: opensAndGoesOn },
  { name: 'lone last peak', meant: 'runaway', make: loneLastPeak },
];

function sticksAfter(random: Random): number {
  return 1 + Math.floor(random.between(0, 4));
}

function relaySticks(random: Random, [lowF, highF]: [number, number]): Told {
  return {
    machine: hotMachine(random),
    faults: { relaySticksAfter: sticksAfter(random), relayLateS: random.between(0, 5) },
    watch: offAt(random.between(lowF, highF)),
  };
}

function never(machine: Plan['machine']) {
  const finish = (plan: Plan): Plan => ({ ...plan, machine: neverOpening(plan.machine) });
  return { machine, finish };
}

function levelsOffUpThere(random: Random): Told {
  const levelF = random.between(176, 189);
  const machine = randomMachine(random);
  return {
    ...never({ ...machine, powerW: powerForLevel(machine, levelF) }),
    watch: { forS: random.between(1300, 1900) },
  };
}

/** The thermostat opens, but a grounded coil keeps the exhaust going up: a knee in the opens band. */
function opensAndGoesOn(random: Random): Told {
  const share = random.between(0.68, 0.82);
  const machine = hotElectric(random);
  const groundedW = powerForLevel(machine, random.between(180, 192));
  return {
    machine: { ...machine, powerW: groundedW / share },
    faults: { groundedW, groundedAfter: 1 },
    watch: { heatOffAtC: toCelsius(random.between(174, 178), 'F'), forS: 1800 },
  };
}

/** A relay that lets go late, far up, and a record that ends in the fall after it. */
function loneLastPeak(random: Random): Told {
  const opening = 2 + Math.floor(random.between(0, 3));
  return {
    machine: hotMachine(random),
    faults: { oneLate: { opening, byK: random.between(11, 15) }, scatterK: 0 },
    // Between two readings by hand it may be over.
    mostSpacingS: 10,
    finish: (plan) => endAfterTurn(plan, 2 * opening - 1, random.between(15, 30)),
  };
}
