import { DEFAULT_RATING } from '#shared/analysis/rating.ts';

type Leg = { towardsC: number; tauS: number; untilC: number };
type Reading = { timeS: number; tempC: number };
export type OpeningRun = { readings: Reading[]; turns: Reading[] };

const { opensC, closesC } = DEFAULT_RATING;
/** A sound machine on its cycling thermostat: the drum warms through, then heat and air take turns. */
const COLD: Leg = { towardsC: 87, tauS: 210, untilC: opensC };
const OFF: Leg = { towardsC: 31, tauS: 96, untilC: closesC };
const ON: Leg = { towardsC: 87, tauS: 150, untilC: opensC };
const PROBE_LAG_S = 4;
const LONGEST_S = 900;

/** The run drawn over the sign-in: three cut-outs, three resets, and the pen on its way to the fourth. */
export function openingRun(): OpeningRun {
  const readings: Reading[] = [];
  let airC = 22;
  let probeC = airC;
  for (const leg of [COLD, OFF, ON, OFF, ON, OFF, ON]) {
    const isHeating = leg.towardsC > leg.untilC;
    for (let s = 0; s < LONGEST_S && (isHeating ? airC < leg.untilC : airC > leg.untilC); s++) {
      airC += (leg.towardsC - airC) / leg.tauS;
      probeC += (airC - probeC) / PROBE_LAG_S;
      readings.push({ timeS: readings.length, tempC: probeC });
    }
  }
  return { readings, turns: turnsOf(readings) };
}

function turnsOf(readings: Reading[]): Reading[] {
  return readings.filter((reading, index) => {
    const before = readings[index - 1];
    const after = readings[index + 1];
    if (!before || !after) return false;
    return (reading.tempC - before.tempC) * (after.tempC - reading.tempC) < 0;
  });
}
