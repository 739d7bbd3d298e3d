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
import { simulateRun, STEP_S } from '#server/commands/heat-model/simulate-run.ts';
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

/** A machine whose heat all goes into its air: nothing leaks in, nothing is lost, nothing cuts the heat. */
const LOSSLESS: Machine = {
  ...ELECTRIC,
  leak: 0,
  lossWPerK: 0,
  disc: { opensC: 500, closesC: 400, lagS: 6 },
  boxLimit: { opensC: 500, closesC: 400, lagS: 8 },
  fuse: { opensC: 500, lagS: 40 },
};

test('at rest the exhaust is warmer than the room by P/(m·cp)', () => {
  const run = simulateRun(LOSSLESS, SOUND, { ...watch, forS: 6000 }, createRandom(1));

  // Dry air, cp = 1006 J/(kg K) at room temperature (handbook): 5600 W / (0.07 kg/s · 1006) = 79.52 K.
  expect(run.probeC.at(-1)! - LOSSLESS.roomC).toBeCloseTo(79.52, 1);
});

test('a heater that alone stores heat warms the exhaust as a first-order response with its own time constant', () => {
  const bare = { ...LOSSLESS, drumWPerK: 0, heaterJPerK: 20000, mixingS: 0.5, probeLagS: 0.5 };

  const run = simulateRun(bare, SOUND, { ...watch, forS: 6000 }, createRandom(1));

  // By hand: m·cp = 70.42 W/K, of which 1 − e^(−46/70.42) = 0.4796 reaches the air, so τ = 20000 / 33.77 = 592.2 s.
  const reached = (run.probeC[Math.round(592.2 / STEP_S)]! - bare.roomC) / 79.52;
  expect(reached).toBeCloseTo(0.632, 2);
});

test('what the heater gave has left with the air or warmed the metal', () => {
  const forS = 6000;
  const run = simulateRun(LOSSLESS, SOUND, { ...watch, forS }, createRandom(1));

  const airJ = run.outletC.reduce((sum, tempC) => sum + 70.42 * (tempC - 22) * STEP_S, 0);

  // By hand, at rest: the drum is as warm as the air, 79.52 K up, and the heater 5600 W / 33.77 W/K = 165.8 K up; the
  // mixing air lags by 4 s of 5600 W.
  const metalJ = 16000 * 79.52 + 420 * 165.8 + 4 * 5600;
  expect(airJ / (5600 * forS - metalJ)).toBeCloseTo(1, 3);
});

test('the probe is behind a steady ramp of the outlet by slope times its response time', () => {
  const slow = { ...LOSSLESS, drumJPerK: 1e6, drumWPerK: 5000, probeLagS: 8 };

  const { probeC, outletC } = simulateRun(slow, SOUND, { ...watch, forS: 900 }, createRandom(1));

  // Hand derivation from τ·dT/dt = air − T: a first-order probe in air ramping at ρ reads low by ρ·τ in steady state.
  const at = Math.round(800 / STEP_S);
  const slopeKPerS = (outletC[at]! - outletC[at - 100]!) / (100 * STEP_S);
  expect(slopeKPerS).toBeGreaterThan(0.001);
  expect((outletC[at]! - probeC[at]!) / (8 * slopeKPerS)).toBeCloseTo(1, 1);
});

test('the disc opens when it is at its own point, the air being ahead of it by slope times lag', () => {
  const run = simulateRun(ELECTRIC, SOUND, watch, createRandom(1));
  const off = run.switches.filter(({ changeW }) => changeW < 0).at(-1)!;
  const at = Math.round(off.timeS / STEP_S);

  const slopeKPerS = (run.outletC[at]! - run.outletC[at - 30]!) / (30 * STEP_S);
  const aheadK = run.outletC[at]! - ELECTRIC.disc.opensC;
  expect(aheadK / (slopeKPerS * ELECTRIC.disc.lagS)).toBeGreaterThan(0.7);
  expect(aheadK / (slopeKPerS * ELECTRIC.disc.lagS)).toBeLessThan(1.5);
});

test('a bias heater makes the disc open that much lower and narrows its differential', () => {
  const plain = turnsOf(ELECTRIC, SOUND, watch).slice(-2);
  const biased = turnsOf({ ...ELECTRIC, biasK: 8 }, SOUND, watch).slice(-2);
  const of = (turns: typeof plain, kind: string) => turns.find((turn) => turn.kind === kind)!.tempC;

  expect(of(plain, 'cut-out') - of(biased, 'cut-out')).toBeGreaterThan(6);
  expect(of(plain, 'cut-out') - of(biased, 'cut-out')).toBeLessThan(10);
  expect(Math.abs(of(plain, 'reset') - of(biased, 'reset'))).toBeLessThan(2.5);
});

test('an open door takes the heat, and neither turn it makes is the machine’s', () => {
  const doorOpen = [{ fromS: 330, toS: 360 }];
  const faults = { ...SOUND, doorOpen };

  const run = simulateRun(ELECTRIC, faults, watch, createRandom(1));
  const near = trueTurningPoints(run, swingK).filter(
    ({ switchTimeS }) => switchTimeS >= 330 && switchTimeS <= 360,
  );
  const by = run.switches.filter(({ timeS }) => timeS > 329 && timeS < 361);

  expect(by.map(({ cause }) => cause)).toEqual(by.map(() => 'person'));
  expect(near).toEqual([]);
});

test('heat turned off at a time stays off, whatever the reading', () => {
  const run = simulateRun(ELECTRIC, SOUND, { ...watch, heatOffAtS: 400 }, createRandom(1));

  expect(run.heatOffS).toBeCloseTo(400, 1);
  expect(run.switches.filter(({ timeS, powerW }) => timeS > 400 && powerW > 0)).toEqual([]);
});
