import { fromCelsius, toCelsius, type DisplayUnit } from '../units.ts';
import type { Measured } from './run-event.ts';

/** Finer than any probe's step in either unit (0.01 °C is 0.018 °F), and free of a double's last bits. */
const PER_DEGREE = 1000;

/**
 * What a live probe said, as a reading of a run: in the run's unit, with its own beside it where the two differ.
 *
 * @param unit the run's
 */
export function measuredInRun(
  measured: Measured,
  unit: DisplayUnit,
): { temp: number; measured?: Measured } {
  if (measured.unit === unit) return { temp: measured.temp };
  const temp = fromCelsius(toCelsius(measured.temp, measured.unit), unit);
  return { temp: Math.round(temp * PER_DEGREE) / PER_DEGREE, measured };
}
