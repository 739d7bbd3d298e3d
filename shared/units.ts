/** °F and °C meet only in this file. Source of the factors: NIST SP 811 (2008), appendix B.8. */

/** The unit a reader sees or a file was written in. */
export type TemperatureUnit = 'F' | 'C' | 'K';

/** The units a person may choose to read in. */
export type DisplayUnit = 'F' | 'C';

/** A temperature in `unit` as °C. */
export function toCelsius(temp: number, unit: TemperatureUnit): number {
  if (unit === 'F') return (temp - 32) / 1.8;
  return unit === 'K' ? temp - 273.15 : temp;
}

/** A temperature in °C as `unit`. */
export function fromCelsius(tempC: number, unit: TemperatureUnit): number {
  if (unit === 'F') return tempC * 1.8 + 32;
  return unit === 'K' ? tempC + 273.15 : tempC;
}

/** A temperature *difference* in `unit` as kelvin: no offset, whatever the scale. */
export function toKelvinStep(step: number, unit: TemperatureUnit): number {
  return unit === 'F' ? step / 1.8 : step;
}

/** A temperature *difference* in kelvin as `unit`. */
export function fromKelvinStep(stepK: number, unit: TemperatureUnit): number {
  return unit === 'F' ? stepK * 1.8 : stepK;
}
