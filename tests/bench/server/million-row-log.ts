const ROWS = 1_000_000;
const START_MS = Date.parse('2026-05-04T10:00:00Z');
const HOT_F = 205;
const ROOM_F = 75;

/** A probe left in a sound dryer for eleven days, two temperatures a second: 1,000,000 rows, about 32 MB. */
export function millionRowLog(): Buffer {
  const pieces: string[] = [];
  let rows: string[] = ['Time,Exhaust °F,Room °F'];
  let tempF = ROOM_F;
  let isHeating = true;
  for (let i = 0; i < ROWS; i++) {
    // A reading as a logger gives it: to one place, with a little noise that repeats every run.
    const noiseF = ((i * 7919) % 11) / 20 - 0.25;
    const stamp = new Date(START_MS + i * 1000).toISOString().slice(0, 19);
    rows.push(`${stamp}Z,${(tempF + noiseF).toFixed(1)},${(72 + ((i >> 9) % 9) / 10).toFixed(1)}`);
    tempF += isHeating ? (HOT_F - tempF) / 150 : (ROOM_F - tempF) / 160;
    if (tempF >= 155) isHeating = false;
    if (tempF <= 130) isHeating = true;
    if (rows.length === 50_000) {
      pieces.push(rows.join('\n'));
      rows = [];
    }
  }
  return Buffer.from([...pieces, rows.join('\n')].join('\n'));
}
