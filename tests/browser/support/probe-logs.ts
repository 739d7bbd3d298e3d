/** Readings of a machine on a sound thermostat, as a probe in its outlet would log them. */
type Reading = { timeS: number; tempF: number };

const ROOM_F = 70;
const HEATED_F = 205;
const HEATING_TAU_S = 150;
// As fast as the demo's machine falls after its repair: it is compared with that.
const COOLING_TAU_S = 74;
const LAG_TAU_S = 8;

/**
 * A first-order air temperature behind a first-order probe, heat cut at `opensF` and back at `closesF`:
 * simple enough to check by eye, and nothing the analysis is fitted to.
 */
export function cyclingReadings(durationS: number, opensF = 153.5, closesF = 131): Reading[] {
  const readings: Reading[] = [];
  let airF = ROOM_F;
  let probeF = ROOM_F;
  let heating = true;
  for (let timeS = 0; timeS <= durationS; timeS += 1) {
    if (timeS % 2 === 0) readings.push({ timeS, tempF: probeF });
    airF += heating ? (HEATED_F - airF) / HEATING_TAU_S : (ROOM_F - airF) / COOLING_TAU_S;
    probeF += (airF - probeF) / LAG_TAU_S;
    if (probeF >= opensF) heating = false;
    if (probeF <= closesF) heating = true;
  }
  return readings;
}

/** Elapsed `m:ss` and °F, comma between: what most probes write. */
export function plainLog(readings: Reading[]): string {
  const rows = readings.map(({ timeS, tempF }) => {
    const seconds = String(timeS % 60).padStart(2, '0');
    return `${Math.floor(timeS / 60)}:${seconds},${tempF.toFixed(1)}`;
  });
  return ['Elapsed,Exhaust °F', ...rows].join('\n');
}

/** Semicolons, decimal commas and °C without a word about the unit. */
export function unitlessLog(readings: Reading[]): string {
  const rows = readings.map(({ timeS, tempF }) => {
    const tempC = ((tempF - 32) / 1.8).toFixed(1).replace('.', ',');
    return `${timeS};${tempC}`;
  });
  return ['Seconds;Outlet', ...rows].join('\r\n');
}

/** One field of letters where a reading belongs to no known word, at a 1-based row of the file. */
export function brokenAt(log: string, row: number, cell: string): string {
  const lines = log.split('\n');
  const time = lines[row - 1]?.split(/[,;]/)[0] ?? '';
  lines[row - 1] = `${time},${cell}`;
  return lines.join('\n');
}
