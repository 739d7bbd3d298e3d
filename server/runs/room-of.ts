import type { LogReading } from '#shared/reading/log-reading.ts';
import { toCelsius } from '#shared/units.ts';

const ROOM_NAME = /\b(room|ambient)\b/i;

/** Mean of the log's own room column between two times, °C; null where it has none. */
export function roomOf(reading: LogReading, fromS: number, toS: number): number | null {
  const room = reading.channels.find(({ name }) => ROOM_NAME.test(name));
  if (!room) return null;
  const { timesS } = reading.series;
  let sum = 0;
  let count = 0;
  for (let i = 0; i < timesS.length; i++) {
    const temp = room.temps[i]!;
    if (Number.isNaN(temp) || timesS[i]! < fromS || timesS[i]! > toS) continue;
    sum += temp;
    count++;
  }
  return count > 0 ? toCelsius(sum / count, room.unit) : null;
}
