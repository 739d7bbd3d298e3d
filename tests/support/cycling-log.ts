type Thermostat = { opensF: number; closesF: number };

const STEP_S = 5;
/** Where a heated drum would end up, and what it falls towards. */
const HOT_F = 205;
const ROOM_F = 75;
const HEATING_TAU_S = 150;
const COOLING_TAU_S = 160;

/**
 * Exhaust temperatures of a dryer that cuts out and comes back exactly where its thermostat says, °F to one place,
 * every 5 s from a cold start: first-order heating and cooling, nothing else.
 */
export function cyclingTemps(readings: number, { opensF, closesF }: Thermostat): number[] {
  const temps: number[] = [];
  let tempF = ROOM_F;
  let isHeating = true;
  for (let i = 0; i < readings; i++) {
    temps.push(Math.round(tempF * 10) / 10);
    const towards = isHeating ? HOT_F : ROOM_F;
    const tauS = isHeating ? HEATING_TAU_S : COOLING_TAU_S;
    tempF = towards + (tempF - towards) * Math.exp(-STEP_S / tauS);
    if (tempF >= opensF) isHeating = false;
    if (tempF <= closesF) isHeating = true;
  }
  return temps;
}

/** The same as a probe's file. */
export function cyclingLog(readings = 480, thermostat = { opensF: 155, closesF: 130 }): string {
  const rows = cyclingTemps(readings, thermostat).map((tempF, i) => `${i * STEP_S},${tempF}`);
  return ['Elapsed (s),Exhaust (°F)', ...rows, ''].join('\n');
}
