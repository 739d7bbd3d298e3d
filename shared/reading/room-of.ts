import { firstAtOrAfter } from '../analysis/first-at-or-after.ts';
import { toCelsius } from '../units.ts';
import { isRoomName } from './layout/column-roles.ts';
import type { LogReading } from './log-reading.ts';

/** A room hardly changes: a longer record is looked at in evenly spread places. */
const MOST_LOOKED_AT = 20_000;

/**
 * The room's temperature by the log's own column of it, while a run lasted: the median, so that a door or a dead sensor
 * for a moment is no matter.
 *
 * @param fromS start of the run in the log, s
 * @param toS end of it, s
 * @returns °C; null where there is no such column, or nothing in it between the two
 */
export function roomOf(
  { channels, series }: LogReading,
  fromS: number,
  toS: number,
): number | null {
  const room = channels.find(({ name }) => isRoomName(name));
  if (!room) return null;
  const first = firstAtOrAfter(series.timesS, fromS);
  const during = room.temps.subarray(first, firstAtOrAfter(series.timesS, toS) + 1);
  const stride = Math.max(1, Math.floor(during.length / MOST_LOOKED_AT));
  const temps = during.filter((temp, i) => i % stride === 0 && !Number.isNaN(temp)).sort();
  const median = temps[temps.length >> 1];
  return median === undefined ? null : toCelsius(median, room.unit);
}
