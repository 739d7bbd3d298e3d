import { toCelsius, type DisplayUnit } from '../../units.ts';

/** Why a probe's message holds no temperature. */
export type NoValue =
  /** The probe says so itself: open sensor, warming up. */
  | 'not-known'
  /** It reads beyond what it can say. */
  | 'out-of-range'
  /** No temperature that a dryer or a room could have: −60 to 1000 °C. */
  | 'implausible'
  /** Not what the characteristic is defined to be. */
  | 'malformed';

/** What one message of a live probe says, in the probe's own unit. */
export type LiveValue = { temp: number; unit: DisplayUnit } | { none: NoValue };

/** What the shop's ratings and notes take as well. */
const LEAST_C = -60;
const MOST_C = 1000;

/**
 * A value only where it can be one: a reading that no exhaust, oven or winter can have is a gap, not a reading.
 *
 * @param temp in `unit`; not finite counts as out of range
 */
export function plausibleValue(temp: number, unit: DisplayUnit): LiveValue {
  if (!Number.isFinite(temp)) return { none: 'out-of-range' };
  const tempC = toCelsius(temp, unit);
  return tempC >= LEAST_C && tempC <= MOST_C ? { temp, unit } : { none: 'implausible' };
}
