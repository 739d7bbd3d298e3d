import { toCelsius } from '#shared/units.ts';
import {
  ELECTRIC,
  GAS,
  SOUND,
  type Faults,
  type Machine,
} from '#server/commands/heat-model/machine.ts';
import { createRandom, type Random } from '#server/commands/heat-model/random.ts';
import { simulateRun, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';

/** A temperature that nothing in a machine reaches, °C. */
export const NEVER_C = 600;

/** A machine of its own, empty, with the usual spread of sizes, air and lags. */
export function randomMachine(random: Random): Machine {
  const gas = random.chance(0.2);
  return {
    ...(gas ? GAS : ELECTRIC),
    // Flames that come within ten seconds keep the troughs of a default rating; slower ones have a rating of their own.
    relightS: gas ? random.between(3, 8) : 0,
    powerW: random.between(5100, 6100),
    roomC: random.between(16, 27),
    airKgPerS: random.between(0.062, 0.074),
    leak: random.between(0.04, 0.14),
    heaterJPerK: random.between(250, 650),
    heaterWPerK: random.between(35, 60),
    drumJPerK: random.between(12000, 20000),
    drumWPerK: random.between(80, 140),
    mixingS: random.between(2, 6),
    // Clear of a sound machine's own heat; plans with little air set it where it works.
    boxLimit: { opensC: 175, closesC: 140, lagS: 8 },
    probeLagS: random.between(1.5, 6),
  };
}

/** A machine with heat to spare: it gets past its thermostat when that does not open. */
export function hotMachine(random: Random): Machine {
  return { ...randomMachine(random), powerW: 6000, airKgPerS: 0.064, leak: 0.06 };
}

/** An electric one with heat to spare: a grounded coil goes on heating it at once. */
export function hotElectric(random: Random): Machine {
  return { ...hotMachine(random), relightS: 0 };
}

/** The machine with a thermostat that never opens. */
export function neverOpening(machine: Machine): Machine {
  return { ...machine, disc: { ...machine.disc, opensC: NEVER_C } };
}

/** Nor anything else that could cut the heat. */
export function nothingOpening(machine: Machine): Machine {
  return {
    ...neverOpening(machine),
    boxLimit: { ...machine.boxLimit, opensC: NEVER_C },
    fuse: { ...machine.fuse, opensC: NEVER_C },
  };
}

/**
 * Power at which the outlet levels off at a temperature, W: an empty machine's rise is proportional to its power, so
 * one long run tells it.
 */
export function powerForLevel(machine: Machine, levelF: number): number {
  const watch = { forS: 4000, heatOffAtC: Infinity, afterHeatOffS: 0 };
  const run = simulateRun(nothingOpening(machine), SOUND, watch, createRandom(1));
  const levelC = run.outletC.at(-1) ?? machine.roomC;
  return (machine.powerW * (toCelsius(levelF, 'F') - machine.roomC)) / (levelC - machine.roomC);
}

/** The run of a machine that nobody turns off, without chance in it. */
export function unattended(machine: Machine, faults: Faults, forS = 1800): ModelRun {
  const watch = { forS, heatOffAtC: Infinity, afterHeatOffS: 0 };
  return simulateRun(machine, { ...faults, scatterK: 0 }, watch, createRandom(1));
}

/**
 * The disc that makes the *exhaust* of a sound machine turn at the given temperatures, °F: what the probe shows
 * runs ahead of the disc by an amount that differs from machine to machine.
 */
export function withTurnsAt(
  machine: Machine,
  turns: { cutOutF: number; resetF: number },
  random: Random,
): Machine {
  const aimC = { opensC: toCelsius(turns.cutOutF, 'F'), closesC: toCelsius(turns.resetF, 'F') };
  let disc = { ...aimC, lagS: random.between(3, 10) };
  for (let round = 0; round < 4; round++) {
    const found = usualTurns({ ...machine, disc });
    if (!found || areNear(found, aimC)) break;
    disc = {
      ...disc,
      opensC: disc.opensC + aimC.opensC - found.cutOutC,
      closesC: Math.min(disc.opensC - 2, disc.closesC + aimC.closesC - found.resetC),
    };
  }
  return { ...machine, disc };
}

function areNear(
  found: { cutOutC: number; resetC: number },
  aimC: { opensC: number; closesC: number },
) {
  return Math.abs(found.cutOutC - aimC.opensC) < 0.1 && Math.abs(found.resetC - aimC.closesC) < 0.1;
}

function usualTurns(machine: Machine): { cutOutC: number; resetC: number } | null {
  const turns = trueTurningPoints(unattended({ ...machine, waterKg: 0 }, SOUND, 1300), 1);
  const cutOut = turns.findLast(({ kind }) => kind === 'cut-out');
  const reset = turns.findLast(({ kind }) => kind === 'reset');
  return cutOut && reset ? { cutOutC: cutOut.tempC, resetC: reset.tempC } : null;
}
