import type { PROBE_KINDS } from '../schemas/ratings.ts';
import type { ClassedSensor } from './probe-class.ts';

const SENSORS: Partial<Record<(typeof PROBE_KINDS)[number], ClassedSensor>> = {
  'thermocouple-k': 'K',
  'thermocouple-j': 'J',
  'thermocouple-t': 'T',
  pt100: 'pt100',
};

/** The sensor of a kind of probe that standards give classes for; null where they give none. */
export function sensorOf(kind: (typeof PROBE_KINDS)[number]): ClassedSensor | null {
  return SENSORS[kind] ?? null;
}
