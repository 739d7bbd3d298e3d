/**
 * IAPWS Industrial Formulation 1997 (R7-97, 2012), region 4: coefficients n1 to n10 of the saturation line, table 34.
 */
const N = [
  0.11670521452767e4, -0.72421316703206e6, -0.17073846940092e2, 0.1202082470247e5,
  -0.32325550322333e7, 0.1491510861353e2, -0.48232657361591e4, 0.40511340542057e6,
  -0.23855557567849, 0.65017534844798e3,
] as const;
const LOWEST_MPA = 611.213e-6;
const HIGHEST_MPA = 22.064;

const HPA_PER_MPA = 10_000;
const ZERO_K = 273.15;

/**
 * Temperature at which water boils, K: IAPWS-IF97, backward equation 31.
 *
 * @param pressureMPa 0.000611213 to 22.064
 * @throws {RangeError} outside that
 */
export function saturationTempK(pressureMPa: number): number {
  if (!(pressureMPa >= LOWEST_MPA && pressureMPa <= HIGHEST_MPA)) {
    throw new RangeError(`water boils from ${LOWEST_MPA} to ${HIGHEST_MPA} MPa, not at this`);
  }
  const [n1, n2, n3, n4, n5, n6, n7, n8, n9, n10] = N;
  const beta = pressureMPa ** 0.25;
  const e = beta * beta + n3 * beta + n6;
  const f = n1 * beta * beta + n4 * beta + n7;
  const g = n2 * beta * beta + n5 * beta + n8;
  const d = (2 * g) / (-f - Math.sqrt(f * f - 4 * e * g));
  return (n10 + d - Math.sqrt((n10 + d) ** 2 - 4 * (n9 + n10 * d))) / 2;
}

/**
 * Boiling point of clean water, °C.
 *
 * @param pressureHPa air pressure where the water stands, not reduced to sea level; 500 to 1100
 * @throws {RangeError} outside that
 */
export function boilingPointC(pressureHPa: number): number {
  if (!(pressureHPa >= 500 && pressureHPa <= 1100)) {
    throw new RangeError(`an air pressure of ${pressureHPa} hPa is not met with on the ground`);
  }
  return saturationTempK(pressureHPa / HPA_PER_MPA) - ZERO_K;
}

/** How fast the boiling point follows the pressure there, K per hPa. */
export function boilingSlopeKPerHPa(pressureHPa: number): number {
  const step = 0.5;
  const [low, high] = [pressureHPa - step, pressureHPa + step];
  const rise = saturationTempK(high / HPA_PER_MPA) - saturationTempK(low / HPA_PER_MPA);
  return rise / (2 * step);
}

/**
 * Usual air pressure at an altitude, hPa: the standard atmosphere up to 11 km (ISO 2533:1975),
 * 1013.25 (1 − 0.0065 h / 288.15)^5.25588. Weather moves it by some 20 hPa either way.
 *
 * @param altitudeM −400 to 5000
 * @throws {RangeError} outside that
 */
export function standardPressureHPa(altitudeM: number): number {
  if (!(altitudeM >= -400 && altitudeM <= 5000)) {
    throw new RangeError(`an altitude of ${altitudeM} m is not one that people live at`);
  }
  return 1013.25 * (1 - (0.0065 * altitudeM) / 288.15) ** 5.25588;
}
