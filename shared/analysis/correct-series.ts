import type { Probe, ProbeCorrection } from './rating.ts';
import type { Series } from './series.ts';

/** The correction of a reading, K: what is added to it (JCGM 100:2008, H.3.1). */
export function correctionAt(correction: ProbeCorrection, tempC: number): number {
  return correction.interceptK + correction.slope * (tempC - correction.aboutC);
}

/**
 * Standard uncertainty of the correction at a temperature, K, with the covariance of intercept and slope
 * (JCGM 100:2008, H.3.4, equation H.15).
 */
export function correctionErrorAt(correction: ProbeCorrection, tempC: number): number {
  const { interceptErrorK, slopeError, correlation } = correction;
  const slopePartK = slopeError * (tempC - correction.aboutC);
  const squareK2 =
    interceptErrorK ** 2 + slopePartK ** 2 + 2 * correlation * interceptErrorK * slopePartK;
  return Math.sqrt(Math.max(0, squareK2));
}

/**
 * Readings as the calibration of their probe would have them. Known errors are put right, not counted as
 * uncertainty (JCGM 100:2008, 3.2.4). The readings given are left as they are.
 *
 * @returns the same series where the probe has no correction
 */
export function correctSeries(series: Series, { correction }: Pick<Probe, 'correction'>): Series {
  if (!correction) return series;
  const tempsC = series.tempsC.map((tempC) => tempC + correctionAt(correction, tempC));
  return { timesS: series.timesS, tempsC };
}
