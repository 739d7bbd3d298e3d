import type { RATING_KINDS, PROBE_KINDS, StoredRating } from '#shared/schemas/ratings.ts';

export const RATING_KIND_WORDS: Record<(typeof RATING_KINDS)[number], string> = {
  'cycling-thermostat': 'Cycling thermostat',
  'high-limit': 'High limit',
  'thermal-cut-off': 'Thermal cut-off',
  'thermal-fuse': 'Thermal fuse',
  thermistor: 'Thermistor set-point',
};

export const PROBE_KIND_WORDS: Record<(typeof PROBE_KINDS)[number], string> = {
  'thermocouple-k': 'Thermocouple, type K',
  'thermocouple-j': 'Thermocouple, type J',
  'thermocouple-t': 'Thermocouple, type T',
  pt100: 'Pt100',
  thermistor: 'Thermistor',
  'liquid-in-glass': 'Liquid in glass',
  other: 'Other',
};

export function unitWords(unit: 'F' | 'C' | 'K') {
  return unit === 'K' ? 'K' : `°${unit}`;
}

/** "opens 155 ± 5, closes 130 ± 5 °F", in the unit it was typed in. */
export function ratedWords(rating: StoredRating) {
  const opens = `opens ${band(rating.opens, rating.opensTol)}`;
  const closes =
    rating.closes === null ? '' : `, closes ${band(rating.closes, rating.closesTol ?? 0)}`;
  return `${opens}${closes}\u00a0${unitWords(rating.unit)}`;
}

/** "155 ± 5", held together by no-break spaces. */
export function band(middle: number, tolerance: number) {
  return `${middle}\u00a0±\u00a0${tolerance}`;
}
