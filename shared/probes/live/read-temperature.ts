import { plausibleValue, type LiveValue } from './live-value.ts';

const BYTES = 2;
const NOT_KNOWN = -0x8000;
/** Absolute zero in steps of 0.01 °C: nothing may lie below it. */
const LEAST_STEPS = -27_315;

/**
 * Temperature (0x2A6E) of the Environmental Sensing Service (0x181A): sint16, least significant octet first, in steps
 * of 0.01 °C; −273.15 to 327.67 °C; 0x8000 says "value is not known"; all else is prohibited.
 *
 * @param value as the characteristic gave it
 * @returns °C, a whole number of hundredths; never throws, what cannot be read is `malformed`
 * @see Bluetooth SIG, GATT Specification Supplement, section Temperature (its text as docs.rs/trouble-host quotes it)
 */
export function readTemperature(value: DataView): LiveValue {
  if (value.byteLength !== BYTES) return { none: 'malformed' };
  const steps = value.getInt16(0, true);
  if (steps === NOT_KNOWN) return { none: 'not-known' };
  if (steps < LEAST_STEPS) return { none: 'malformed' };
  return plausibleValue(steps / 100, 'C');
}
