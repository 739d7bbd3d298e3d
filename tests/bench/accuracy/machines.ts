import { toCelsius } from '#shared/units.ts';
import { ELECTRIC, GAS, SOUND, type Machine } from '#server/commands/heat-model/machine.ts';
import { createRandom, type Random } from '#server/commands/heat-model/random.ts';
import { simulateRun } from '#server/commands/heat-model/simulate-run.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';

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
    if (!found) break;
    disc = {
      ...disc,
      opensC: disc.opensC + aimC.opensC - found.cutOutC,
      closesC: Math.min(disc.opensC - 2, disc.closesC + aimC.closesC - found.resetC),
    };
  }
  return { ...machine, disc };
}

function usualTurns(machine: Machine): { cutOutC: number; resetC: number } | null {
  const watch = { forS: 1500, heatOffAtC: Infinity, afterHeatOffS: 0 };
  const turns = trueTurningPoints(simulateRun(machine, SOUND, watch, createRandom(1)), 1);
  const cutOut = turns.findLast(({ kind }) => kind === 'cut-out');
  const reset = turns.findLast(({ kind }) => kind === 'reset');
  return cutOut && reset ? { cutOutC: cutOut.tempC, resetC: reset.tempC } : null;
}
