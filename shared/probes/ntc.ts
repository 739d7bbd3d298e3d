import { polynomial, polynomialSlope } from './polynomial.ts';
import { solveRising } from './solve-rising.ts';

/** 0 °C in kelvin (NIST SP 811, B.8). */
const ZERO_K = 273.15;
/** Of any NTC that watches air; beyond, a curve says nothing. */
const LOWEST_C = -60;
const HIGHEST_C = 300;

/** 1/T = Σ k_i Lⁱ with L = ln(R / refOhm), T in kelvin: what the usual equations of an NTC have in common. */
export type NtcCurve = { refOhm: number; coefficients: readonly [number, number, number, number] };

/**
 * The beta equation: exact at 25 °C, and at the second temperature that beta was taken at; near 0 °C it is off by
 * more than half a degree for a B25/85.
 *
 * @param r25Ohm resistance at 25 °C
 * @param betaK B in kelvin
 * @throws {RangeError} either is not positive
 */
export function betaCurve(r25Ohm: number, betaK: number): NtcCurve {
  if (!(r25Ohm > 0 && betaK > 0)) throw new RangeError('resistance and beta must be positive');
  return { refOhm: r25Ohm, coefficients: [1 / (25 + ZERO_K), 1 / betaK, 0, 0] };
}

/**
 * B of the beta equation from two points, K: ln(R1/R2) / (1/T1 − 1/T2).
 *
 * @throws {RangeError} a resistance is not positive, or the temperatures are the same
 */
export function betaOfPoints(a: NtcPoint, b: NtcPoint): number {
  const [first, second] = [inverseK(a.tempC), inverseK(b.tempC)];
  if (!(a.ohm > 0 && b.ohm > 0) || first === second) throw new RangeError('two points are needed');
  return Math.log(a.ohm / b.ohm) / (first - second);
}

/** Steinhart and Hart: 1/T = A + B ln R + C (ln R)³, R in ohm. */
export function steinhartHartCurve(a: number, b: number, c: number): NtcCurve {
  return { refOhm: 1, coefficients: [a, b, 0, c] };
}

export type NtcPoint = { tempC: number; ohm: number };

/**
 * Steinhart–Hart through three points, by divided differences.
 *
 * @throws {RangeError} a resistance is not positive, or two are the same
 */
export function steinhartHartOfPoints(points: readonly [NtcPoint, NtcPoint, NtcPoint]): NtcCurve {
  const logs = points.map(({ ohm }) => Math.log(ohm)) as [number, number, number];
  const inverses = points.map(({ tempC }) => inverseK(tempC)) as [number, number, number];
  const [l1, l2, l3] = logs;
  const g2 = (inverses[1] - inverses[0]) / (l2 - l1);
  const g3 = (inverses[2] - inverses[0]) / (l3 - l1);
  const c = (g3 - g2) / (l3 - l2) / (l1 + l2 + l3);
  if (!Number.isFinite(c)) throw new RangeError('three different resistances above 0 are needed');
  const b = g2 - c * (l1 * l1 + l1 * l2 + l2 * l2);
  return steinhartHartCurve(inverses[0] - l1 * (b + c * l1 * l1), b, c);
}

/**
 * Temperature of an NTC, °C.
 *
 * @throws {RangeError} the resistance is not positive, or the curve puts it outside −60 to 300 °C
 */
export function ntcTemp({ refOhm, coefficients }: NtcCurve, ohm: number): number {
  if (!(ohm > 0)) throw new RangeError(`a resistance of ${ohm} ohm is none`);
  const tempC = 1 / polynomial(coefficients, Math.log(ohm / refOhm)) - ZERO_K;
  if (!(tempC >= LOWEST_C && tempC <= HIGHEST_C)) {
    throw new RangeError(`${ohm} ohm is outside ${LOWEST_C} to ${HIGHEST_C} °C of this NTC`);
  }
  return tempC;
}

/**
 * Resistance of an NTC, ohm.
 *
 * @throws {RangeError} outside −60 to 300 °C
 */
export function ntcOhm({ refOhm, coefficients }: NtcCurve, tempC: number): number {
  if (!(tempC >= LOWEST_C && tempC <= HIGHEST_C)) {
    throw new RangeError(`an NTC is used from ${LOWEST_C} to ${HIGHEST_C} °C, not at ${tempC}`);
  }
  const at = (log: number) => ({
    value: polynomial(coefficients, log),
    slope: polynomialSlope(coefficients, log),
  });
  const guess = (inverseK(tempC) - coefficients[0]) / coefficients[1];
  return refOhm * Math.exp(solveRising(at, inverseK(tempC), { low: -30, high: 30, guess }));
}

function inverseK(tempC: number): number {
  return 1 / (tempC + ZERO_K);
}
