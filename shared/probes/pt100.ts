import { solveRising } from './solve-rising.ts';

/** IEC 60751:2008 (the 2022 edition has the same function): R(t) = R0 (1 + At + Bt² + C(t − 100)t³), C below 0 °C only. */
const A = 3.9083e-3;
const B = -5.775e-7;
const C = -4.183e-12;
const R0_OHM = 100;
const LOWEST_C = -200;
const HIGHEST_C = 850;

/**
 * Resistance of a Pt100, ohm.
 *
 * @param tempC −200 to 850 °C
 * @throws {RangeError} outside that, or not finite
 */
export function pt100Ohm(tempC: number): number {
  if (!(tempC >= LOWEST_C && tempC <= HIGHEST_C)) {
    throw new RangeError(`a Pt100 is defined from ${LOWEST_C} to ${HIGHEST_C} °C, not at ${tempC}`);
  }
  return resistanceAt(tempC).value;
}

/**
 * Temperature of a Pt100, °C: the quadratic solved above 0 °C, Newton's rule below.
 *
 * @param ohm about 18.52 to 390.48
 * @throws {RangeError} outside that, or not finite
 */
export function pt100Temp(ohm: number): number {
  const lowestOhm = resistanceAt(LOWEST_C).value;
  const highestOhm = resistanceAt(HIGHEST_C).value;
  if (!(ohm >= lowestOhm && ohm <= highestOhm)) {
    throw new RangeError(`a Pt100 has ${lowestOhm} to ${highestOhm} ohm, not ${ohm}`);
  }
  const byQuadratic = (-A + Math.sqrt(A * A - 4 * B * (1 - ohm / R0_OHM))) / (2 * B);
  if (ohm >= R0_OHM) return byQuadratic;
  return solveRising(resistanceAt, ohm, { low: LOWEST_C, high: 0, guess: byQuadratic });
}

function resistanceAt(tempC: number) {
  const c = tempC < 0 ? C : 0;
  const value = R0_OHM * (1 + A * tempC + B * tempC ** 2 + c * (tempC - 100) * tempC ** 3);
  const slope = R0_OHM * (A + 2 * B * tempC + c * (4 * tempC ** 3 - 300 * tempC ** 2));
  return { value, slope };
}
