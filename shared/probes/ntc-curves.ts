import { steinhartHartCurve, type NtcCurve } from './ntc.ts';

/**
 * Ratio curve of the widespread general-purpose NTC material with B25/85 = 3977 K: Amphenol Thermometrics,
 * Temperature Resistance Curves Reference Guide, Rev. C (2014), material type 1, −40 to 155 °C.
 *
 * @param r25Ohm resistance at 25 °C
 */
export function generalNtcCurve(r25Ohm: number): NtcCurve {
  return {
    refOhm: r25Ohm,
    coefficients: [3.3539438e-3, 2.5646095e-4, 2.5158166e-6, 1.0503069e-7],
  };
}

/** The widely published 10 kΩ "curve 3" coefficients of the Steinhart–Hart equation. */
export const TEN_K_CURVE_3: NtcCurve = steinhartHartCurve(1.129241e-3, 2.341077e-4, 8.775468e-8);
