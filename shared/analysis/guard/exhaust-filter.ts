/**
 * Temperature, slope and curvature of the exhaust with the upper half of their covariance: a Kalman filter (R. E.
 * Kalman 1960), discretised for any spacing as in Bar-Shalom, Li and Kirubarajan 2001, 6.2.3. Its memory is as long as
 * noise and spacing ask: about 10 s with a quiet probe, some 25 s where readings scatter by 0.9 K.
 */
export type ExhaustFilter = {
  tempC: number;
  slopeKPerS: number;
  curveKPerS2: number;
  /** Variances and covariances: t temperature, s slope, c curvature; K², K²/s … K²/s⁴. */
  ptt: number;
  pts: number;
  ptc: number;
  pss: number;
  psc: number;
  pcc: number;
};

/** How far a leg departs from a parabola: drift of its slope, K²/s³, and least drift of its curvature, K²/s⁵. */
const SLOPE_DRIFT = 1e-6;
const LEAST_CURVE_DRIFT = 1e-9;
/** The quick part of a steep leg fades within seconds: drift by the fourth power of the slope (bench, seeds 1–20) … */
const STEEP_CURVE_DRIFT = 1e-4;
/** … as a share of this slope, K/s, up to 2.5 of it. */
const STEEP_KPERS = 0.5;
const STEEPEST_SHARE = 2.5;
/** A slope that is not known: standard deviations of slope, K/s, and curvature, K/s². */
const FREE_SLOPE_KPERS = 0.5;
const FREE_CURVE_KPERS2 = 0.02;

/** A filter that knows a temperature to within its noise, and of the slope only what a dryer can do. */
export function startFilter(tempC: number, noiseK2: number): ExhaustFilter {
  return {
    tempC,
    slopeKPerS: 0,
    curveKPerS2: 0,
    ptt: noiseK2,
    pts: 0,
    ptc: 0,
    pss: FREE_SLOPE_KPERS ** 2,
    psc: 0,
    pcc: FREE_CURVE_KPERS2 ** 2,
  };
}

/** Carries a filter on by a time, in place. */
export function predict(f: ExhaustFilter, dtS: number): void {
  const dt = dtS;
  const h = 0.5 * dt * dt;
  const drift = curveDrift(f);
  const { ptt, pts, ptc, pss, psc, pcc } = f;
  f.tempC += dt * f.slopeKPerS + h * f.curveKPerS2;
  f.slopeKPerS += dt * f.curveKPerS2;
  f.ptt = ptt + dt * (2 * pts + dt * pss) + h * (2 * ptc + 2 * dt * psc + h * pcc);
  f.ptt += (SLOPE_DRIFT * dt * dt * dt) / 3 + (drift * h * h * dt) / 5;
  f.pts =
    pts + dt * (pss + ptc + dt * psc + h * pcc) + h * psc + h * (SLOPE_DRIFT + (drift * h) / 2);
  f.ptc = ptc + dt * psc + h * pcc + (drift * dt * h) / 3;
  f.pss = pss + dt * (2 * psc + dt * pcc) + SLOPE_DRIFT * dt + (2 * drift * dt * h) / 3;
  f.psc = psc + dt * pcc + drift * h;
  f.pcc = pcc + drift * dt;
}

/** The slope changed somewhere in the last `sinceS`: it, and the temperature with it, is known less well. In place. */
export function loosen(f: ExhaustFilter, sinceS: number): void {
  const half = 0.5 * sinceS;
  const variance = FREE_SLOPE_KPERS ** 2;
  f.ptt += variance * half * half;
  f.pts += variance * half;
  f.pss += variance;
  f.pcc += FREE_CURVE_KPERS2 ** 2;
}

/** Takes a reading of this variance in, in place. */
export function correct(f: ExhaustFilter, tempC: number, noiseK2: number): void {
  const { pts, ptc } = f;
  const scale = 1 / (f.ptt + noiseK2);
  const gainT = f.ptt * scale;
  const gainS = pts * scale;
  const gainC = ptc * scale;
  const offK = tempC - f.tempC;
  f.tempC += gainT * offK;
  f.slopeKPerS += gainS * offK;
  f.curveKPerS2 += gainC * offK;
  f.ptt = noiseK2 * gainT;
  f.pts = noiseK2 * gainS;
  f.ptc = noiseK2 * gainC;
  f.pss -= gainS * pts;
  f.psc -= gainS * ptc;
  f.pcc -= gainC * ptc;
}

function curveDrift({ slopeKPerS }: ExhaustFilter): number {
  const share = Math.min(STEEPEST_SHARE, Math.abs(slopeKPerS) / STEEP_KPERS);
  const square = share * share;
  return LEAST_CURVE_DRIFT + STEEP_CURVE_DRIFT * square * square;
}
