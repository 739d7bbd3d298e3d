import type { DisplayUnit } from '../../units.ts';
import { plausibleValue, type LiveValue, type NoValue } from './live-value.ts';
import { readMedicalFloat, type SpecialFloat } from './read-medical-float.ts';

/** Bits of the flags octet. */
const IS_FAHRENHEIT = 0b001;
const HAS_TIME_STAMP = 0b010;
const HAS_TYPE = 0b100;

const FLAGS_BYTES = 1;
const FLOAT_BYTES = 4;
const TIME_STAMP_BYTES = 7;
const TYPE_BYTES = 1;

const NO_VALUES: Record<SpecialFloat, NoValue> = {
  NaN: 'not-known',
  NRes: 'out-of-range',
  '+INF': 'out-of-range',
  '-INF': 'out-of-range',
  reserved: 'malformed',
};

/**
 * Temperature Measurement (0x2A1C) of the Health Thermometer Service (0x1809): a flags octet, a FLOAT-Type in °C or,
 * with bit 0 set, °F; with bit 1 a time stamp of seven octets, with bit 2 a temperature type of one. The stamp is not
 * used: it is of the probe's own clock, to the second; a reading counts at the moment that it arrives. Octets beyond
 * those that the flags announce are let be, since a later edition may add some.
 *
 * @param value as the characteristic gave it
 * @returns in the unit that the flags name; never throws, what cannot be read is `malformed`
 * @see Bluetooth SIG, GATT Specification Supplement, section Temperature Measurement (as docs.rs/trouble-host quotes it)
 */
export function readHealthThermometer(value: DataView): LiveValue {
  if (value.byteLength < FLAGS_BYTES) return { none: 'malformed' };
  const flags = value.getUint8(0);
  if (value.byteLength < announcedBytes(flags)) return { none: 'malformed' };
  const unit: DisplayUnit = flags & IS_FAHRENHEIT ? 'F' : 'C';
  const temp = readMedicalFloat(value, FLAGS_BYTES);
  return typeof temp === 'string' ? { none: NO_VALUES[temp] } : plausibleValue(temp, unit);
}

function announcedBytes(flags: number): number {
  const stampBytes = flags & HAS_TIME_STAMP ? TIME_STAMP_BYTES : 0;
  return FLAGS_BYTES + FLOAT_BYTES + stampBytes + (flags & HAS_TYPE ? TYPE_BYTES : 0);
}
