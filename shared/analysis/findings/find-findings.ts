import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { findBelowCutOut } from './below-cut-out.ts';
import { findDrifting } from './drifting.ts';
import { findHeatLost } from './heat-lost.ts';
import { findHeatStaysOn } from './heat-stays-on.ts';
import { findInBand } from './in-band.ts';
import { findLimitCycling } from './limit-cycling.ts';
import { findMixed } from './mixed.ts';
import { findNoHeat } from './no-heat.ts';
import { findOutOfBand } from './out-of-band.ts';
import { findRunaway } from './runaway.ts';
import { findScattered } from './scattered.ts';
import { findTooClose } from './too-close.ts';
import { findTooShort } from './too-short.ts';

/**
 * Everything that a run's facts say, in order of precedence (FINDING_CODES); the first is the headline. Never empty.
 *
 * Faults with a name come first, and those that can stand together do. Where there is none, the first that holds of
 * mixed, in-band, too-close and too-short stands alone.
 */
export function findFindings(facts: RunFacts): Finding[] {
  const heat = findHeatFaults(facts);
  // Heat that stays on under the band is no heat that is missing.
  const staysOn = heat.some(({ code }) => code === 'heat-stays-on');
  const missing = staysOn ? [] : findMissingHeat(facts);
  const named = [...heat, ...findThermostatFaults(facts), ...missing];
  if (named.length > 0) return named;
  // Points that were not called say nothing of a band.
  if (!facts.input.rating || facts.probeTooSlow) return [findTooShort(facts)];
  const unnamed = findMixed(facts) ?? findInBand(facts) ?? findTooClose(facts);
  return [unnamed ?? findTooShort(facts)];
}

function findHeatFaults(facts: RunFacts): Finding[] {
  const limitCycling = findLimitCycling(facts);
  const lost = findHeatLost(facts);
  // Short bursts fall as the housing does, not as the drum: their falls say nothing of heat left on.
  const staysOn = limitCycling ? null : findHeatStaysOn(facts);
  // A fall that goes on to the room kept no heat, however slow: a machine that stopped moves no air.
  const kept = staysOn && lost && staysOn.fromS === lost.fromS ? null : staysOn;
  return [findRunaway(facts), kept, lost, limitCycling].filter((found) => found !== null);
}

/** What the thermostat's own points say; nothing where a limit cuts before it, or where the probe hides them. */
function findThermostatFaults(facts: RunFacts): Finding[] {
  if (facts.probeTooSlow || findLimitCycling(facts)) return [];
  const unsteady = [findDrifting(facts), findScattered(facts)].filter((found) => found !== null);
  return [...unsteady, ...findOutOfBand(facts)];
}

function findMissingHeat(facts: RunFacts): Finding[] {
  const noHeat = findNoHeat(facts);
  const below = noHeat ? null : findBelowCutOut(facts);
  return [below, noHeat].filter((found) => found !== null);
}
