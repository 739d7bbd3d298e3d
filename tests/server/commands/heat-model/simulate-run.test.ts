import { expect, test } from 'vitest';
import {
  ELECTRIC,
  GAS,
  SOUND,
  type Faults,
  type Machine,
  type Watch,
} from '#server/commands/heat-model/machine.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';
import { simulateRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';

const watch: Watch = { forS: 900, heatOffAtC: Infinity, afterHeatOffS: 0 };
const swingK = 4 / 1.8;

function turnsOf(machine: Machine, faults: Faults, watched: Watch) {
  return trueTurningPoints(simulateRun(machine, faults, watched, createRandom(1)), swingK);
}

test('a sound machine levels off at the heat that its air and its walls carry away', () => {
  const never = {
    ...ELECTRIC,
    disc: { ...ELECTRIC.disc, opensC: 500 },
    fuse: { opensC: 500, lagS: 40 },
  };
  const run = simulateRun(never, SOUND, { ...watch, forS: 6000 }, createRandom(1));

  // Energy balance by hand: P = m·cp·(T_drum out − room) + loss·(drum − room), and at rest the drum is at the air's temperature.
  const airWPerK = ELECTRIC.airKgPerS * 1006;
  const drumK = ELECTRIC.powerW / (airWPerK + ELECTRIC.lossWPerK);
  expect(run.probeC.at(-1)).toBeGreaterThan(ELECTRIC.roomC + (1 - ELECTRIC.leak) * drumK - 3);
  expect(run.probeC.at(-1)).toBeLessThan(
    ELECTRIC.roomC + (1 - ELECTRIC.leak) * (ELECTRIC.powerW / airWPerK),
  );
});

test('the heater lost power before each true cut-out, and got it before each true reset', () => {
  for (const turn of turnsOf(ELECTRIC, SOUND, watch)) {
    expect(turn.switchTimeS).toBeLessThan(turn.timeS);
    expect(turn.timeS - turn.switchTimeS).toBeLessThan(10);
  }
});

test('cut-outs and resets take turns, beginning with a cut-out', () => {
  const kinds = turnsOf(ELECTRIC, SOUND, watch).map(({ kind }) => kind);

  expect(kinds.length).toBeGreaterThan(10);
  kinds.forEach((kind, i) => expect(kind).toBe(i % 2 === 0 ? 'cut-out' : 'reset'));
});

test('a gas machine gets its heat back half a minute after its disc has closed', () => {
  const electric = turnsOf({ ...GAS, relightS: 0 }, SOUND, watch);
  const gas = turnsOf(GAS, SOUND, watch);

  const offS = (turns: typeof gas) => turns[1]!.switchTimeS - turns[0]!.switchTimeS;
  expect(offS(gas) - offS(electric)).toBeCloseTo(30, 0);
});

test('a turn that a person makes is no turning point', () => {
  const stopped = { ...watch, heatOffAtC: 60, afterHeatOffS: 200 };

  expect(turnsOf(ELECTRIC, SOUND, stopped)).toEqual([]);
});

test('a fall after a one-shot part opened is no turning point', () => {
  const turns = turnsOf(ELECTRIC, { ...SOUND, opensForGoodS: 330 }, watch);

  expect(turns.map(({ kind }) => kind)).toEqual(['cut-out', 'reset']);
});

test('a relay that sticks after the third opening lets no fourth cut-out happen', () => {
  const run = simulateRun(ELECTRIC, { ...SOUND, relaySticksAfter: 3 }, watch, createRandom(1));

  const cutOuts = trueTurningPoints(run, swingK).filter(({ kind }) => kind === 'cut-out');
  expect(cutOuts).toHaveLength(3);
  expect(run.clicksS.length).toBe(4);
});

test('a damp load holds the exhaust flat and delays the first cut-out', () => {
  const empty = turnsOf(ELECTRIC, SOUND, { ...watch, forS: 2400 })[0];
  const damp = turnsOf({ ...ELECTRIC, waterKg: 1.7 }, SOUND, { ...watch, forS: 2400 })[0];

  expect(damp!.timeS).toBeGreaterThan(3 * empty!.timeS);
});

test('the same seed gives the same run', () => {
  const faults = { ...SOUND, scatterK: 3 };

  expect(simulateRun(ELECTRIC, faults, watch, createRandom(7)).switches).toEqual(
    simulateRun(ELECTRIC, faults, watch, createRandom(7)).switches,
  );
});
