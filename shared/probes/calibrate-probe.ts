import { correctionAt, correctionErrorAt } from '../analysis/correct-series.ts';
import type { ProbeCorrection } from '../analysis/rating.ts';
import { boilingPointC, boilingSlopeKPerHPa, standardPressureHPa } from './boiling-point.ts';
import { coverageFactor, ofResolution, rectangular } from './combine-uncertainty.ts';
import { fitCorrection, type ComparedPoint } from './fit-correction.ts';

export const CALIBRATION_KINDS = ['ice-and-boiling', 'reference'] as const;

/** What was written down when a probe was calibrated, in °C, K and hPa. */
export type CalibrationRecord = {
  kind: (typeof CALIBRATION_KINDS)[number];
  /** Ice and boiling: exactly these two in this order, with no reference. Else what the reference showed at each. */
  points: { referenceC: number | null; readingsC: number[] }[];
  /** Boiling only: air pressure at the place, or else the altitude, m. */
  pressureHPa: number | null;
  altitudeM: number | null;
  /** Expanded (k = 2) uncertainty of the reference thermometer, from its certificate, K. */
  referenceUK: number;
  /** The step that the probe's readings are shown in, K. */
  resolutionK: number;
};

export type ProbeCalibration = {
  /** Its errors are such that twice them covers 95 %, few points or not. */
  correction: ProbeCorrection;
  /** Expanded (k = 2) uncertainty that all points have in common: the reference's own, K. */
  commonUK: number;
  points: ComparedPoint[];
  /** How the points lie about the line; null for two. */
  residualSdK: number | null;
  degrees: number;
};

/** A stirred bath of crushed ice and water stays within this of 0 °C, K (common practice). */
const ICE_HALF_K = 0.1;
/** Tap water that boils hard, and how it is stirred, K (common practice). */
const BOILING_HALF_K = 0.2;
/** A barometer read on the spot, hPa (common practice). */
const BAROMETER_HALF_HPA = 2;
/** Weather about the usual pressure of a place, hPa (common practice). */
const WEATHER_HALF_HPA = 25;
/** Farther out than this a probe is faulty, or a point was mistaken, K. */
const MOST_CORRECTION_K = 20;

/**
 * A calibration worked out: differences, the line through them, and how well it is known.
 *
 * Each point's own uncertainty is that of the mean of its readings (type A, pooled over the points, widened by Student's
 * t for few repeats), half a step of the display, and the fixed point's own; the reference thermometer's is common to
 * all and no number of points averages it out (JCGM 100:2008, 4.2, 4.3, H.3.5).
 *
 * @throws {RangeError} too few points, none read, or farther off than any sound probe
 */
export function calibrateProbe(record: CalibrationRecord): ProbeCalibration {
  const repeatSdK = pooledRepeats(record.points.map(({ readingsC }) => readingsC));
  const points = record.points.map(({ readingsC }, i): ComparedPoint => {
    if (readingsC.length === 0) throw new RangeError(`point ${i + 1} has no reading`);
    const fixed = fixedPoint(record, i);
    const repeatErrorK = repeatSdK / Math.sqrt(readingsC.length);
    const resolutionErrorK = ofResolution(record.resolutionK);
    return {
      readingC: meanOf(readingsC),
      referenceC: fixed.tempC,
      ownErrorK: Math.hypot(fixed.errorK, repeatErrorK, resolutionErrorK),
    };
  });
  const off = points.find(({ readingC, referenceC }) => !isPlausible(referenceC - readingC));
  if (off) throw new RangeError('a point is off by more than any sound probe');
  const aboutC = meanOf(points.map(({ readingC }) => readingC));
  const { correction, degrees, residualSdK } = fitCorrection(points, aboutC);
  const widening = degrees === Infinity ? 1 : coverageFactor(degrees) / 2;
  return {
    correction: {
      ...correction,
      interceptErrorK: correction.interceptErrorK * widening,
      slopeError: correction.slopeError * widening,
    },
    commonUK: record.kind === 'reference' ? record.referenceUK : 0,
    points,
    residualSdK,
    degrees,
  };
}

/** Expanded (k = 2) uncertainty of a corrected reading's correction at a temperature, drift included, K. */
export function calibrationU(
  { correction, commonUK }: Pick<ProbeCalibration, 'correction' | 'commonUK'>,
  driftK: number,
  tempC: number,
): number {
  return 2 * Math.hypot(correctionErrorAt(correction, tempC), commonUK / 2, rectangular(driftK));
}

/** What is added to a reading at a temperature, K. */
export function calibrationCorrection({ correction }: ProbeCalibration, tempC: number): number {
  return correctionAt(correction, tempC);
}

/** The boiling point that a record goes by, °C, and how well it is known by the pressure alone, K. */
export function boilingOf({
  pressureHPa,
  altitudeM,
}: Pick<CalibrationRecord, 'pressureHPa' | 'altitudeM'>) {
  const airHPa = pressureHPa ?? standardPressureHPa(altitudeM ?? 0);
  const halfHPa = pressureHPa === null ? WEATHER_HALF_HPA : BAROMETER_HALF_HPA;
  const errorK = rectangular(halfHPa * boilingSlopeKPerHPa(airHPa));
  return { tempC: boilingPointC(airHPa), errorK };
}

function fixedPoint(record: CalibrationRecord, i: number): { tempC: number; errorK: number } {
  if (record.kind === 'reference') {
    const tempC = record.points[i]!.referenceC;
    if (tempC === null) throw new RangeError(`point ${i + 1} has no reference`);
    return { tempC, errorK: 0 };
  }
  if (record.points.length !== 2) throw new RangeError('ice and boiling are two points');
  if (i === 0) return { tempC: 0, errorK: rectangular(ICE_HALF_K) };
  const { tempC, errorK } = boilingOf(record);
  return { tempC, errorK: Math.hypot(errorK, rectangular(BOILING_HALF_K)) };
}

/**
 * Standard deviation of one reading from all repeats together, so widened that twice it covers 95 % (JCGM 100:2008,
 * 4.2.4 and G.3), K; 0 where nothing was read twice.
 */
function pooledRepeats(points: number[][]): number {
  let squares = 0;
  let degrees = 0;
  for (const readings of points) {
    if (readings.length < 2) continue;
    const mean = meanOf(readings);
    squares += readings.reduce((sum, reading) => sum + (reading - mean) ** 2, 0);
    degrees += readings.length - 1;
  }
  if (degrees === 0) return 0;
  return (Math.sqrt(squares / degrees) * coverageFactor(degrees)) / 2;
}

function isPlausible(differenceK: number): boolean {
  return Math.abs(differenceK) <= MOST_CORRECTION_K;
}

function meanOf(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
