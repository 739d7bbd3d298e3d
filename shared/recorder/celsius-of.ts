import { toCelsius, type DisplayUnit } from '../units.ts';
import type { Measured } from './run-event.ts';

type Reading = { temp: number; measured?: Measured | null | undefined };

/**
 * A reading in °C: from what the probe said, where it said it in a unit of its own, so that 68.25 °C is 68.25 °C and
 * the hundredths of a live probe stay whole steps.
 *
 * @param unit the run's, which `temp` is in
 */
export function celsiusOf({ temp, measured }: Reading, unit: DisplayUnit): number {
  return measured ? toCelsius(measured.temp, measured.unit) : toCelsius(temp, unit);
}
