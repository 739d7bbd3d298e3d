import { correct, loosen, predict, startFilter, type ExhaustFilter } from './exhaust-filter.ts';

/** The exhaust as the readings so far have it, wild ones kept out. Plain data. */
export type ExhaustTrack = ExhaustFilter & {
  /** Of the last reading that was taken in, s. */
  timeS: number;
  /** Readings taken in. */
  readings: number;
  /** Variance of a reading, learnt as the run goes on, K². */
  noiseK2: number;
  /** The step that the scale is rounded to, as far as seen, K; 0 = none seen yet. */
  roundingK: number;
  /** Last reading as read, °C. */
  lastReadC: number;
  /** Running sum of departures in standard deviations: a trend that breaks shows here first. */
  departure: number;
  /** How often readings come: follows a longer spacing at once, a shorter one slowly, s. */
  spacingS: number;
  /** A reading far off the forecast that waits for a second which agrees. */
  doubted: { timeS: number; tempC: number } | null;
};

/** How a reading lay to what came before it. */
export type ReadingFit = 'in-line' | 'off-trend' | 'doubted' | 'confirmed';

/** Noise to begin with: half a degree Fahrenheit, as a person reads a dial (common practice), K². */
const FIRST_NOISE_K2 = 0.09;
const LEAST_NOISE_K2 = 0.0025;
const MOST_NOISE_K2 = 2.25;
/** Weight of a reading in the noise, once twenty were seen. */
const NOISE_WEIGHT = 0.04;
/** Departures, in standard deviations, beyond which the trend is taken to have broken: one, or their running sum. */
const BREAK_DEVIATIONS = 5;
const BREAK_SUM = 6.5;
const SUM_MEMORY = 0.6;
/** Beyond those deviations and this, a reading is off the trend and decides nothing by itself, K. */
const OFF_TREND_K = 1.5;
/** No exhaust moves faster, K/s, beside what noise does … */
const FASTEST_KPERS = 1.2;
/** … nor does one that climbs already climb much faster of a sudden. */
const FASTER_KPERS = 0.15;
/** Under this, nothing is a wild reading, K. */
const LEAST_WILD_K = 3;
const WILD_DEVIATIONS = 6;
/** Of rounding steps shorter than this, K, none is seen: conversions leave such crumbs. */
const LEAST_ROUNDING_K = 0.01;
/** Readings that share a step of a coarse scale tell the same thing several times; counted up to this many. */
const MOST_ALIKE = 12;
/** Readings before a climb is known to be one. */
const KNOWN_CLIMB_READINGS = 4;
/** How far off two readings alone may have the slope, beside their noise, K/s. */
const PAIR_SLOPE_KPERS = 0.1;

/** A track from its first reading. */
export function startTrack(timeS: number, tempC: number): ExhaustTrack {
  return {
    ...startFilter(tempC, FIRST_NOISE_K2),
    timeS,
    readings: 1,
    noiseK2: FIRST_NOISE_K2,
    roundingK: 0,
    lastReadC: tempC,
    departure: 0,
    spacingS: 0,
    doubted: null,
  };
}

/** Takes a reading in, in place; its time lies after that of every one before. */
export function followReading(track: ExhaustTrack, timeS: number, tempC: number): ReadingFit {
  noteSpacing(track, timeS);
  noteRounding(track, tempC);
  const sinceS = timeS - track.timeS;
  const aheadC = track.tempC + sinceS * (track.slopeKPerS + 0.5 * sinceS * track.curveKPerS2);
  const offK = tempC - aheadC;
  if (isWild(track, offK, sinceS)) return doubt(track, timeS, tempC);

  track.doubted = null;
  const noiseK2 = readingVariance(track, sinceS);
  predict(track, sinceS);
  const off = offK / Math.sqrt(track.ptt + noiseK2);
  track.departure = SUM_MEMORY * track.departure + off;
  if (Math.abs(off) > BREAK_DEVIATIONS || Math.abs(track.departure) > BREAK_SUM) {
    loosen(track, sinceS);
    track.departure = 0;
  } else {
    learnNoise(track, off);
  }
  correct(track, tempC, noiseK2);
  track.timeS = timeS;
  track.readings++;
  const isOff = Math.abs(off) > BREAK_DEVIATIONS && Math.abs(offK) > OFF_TREND_K;
  return isOff ? 'off-trend' : 'in-line';
}

function noteSpacing(track: ExhaustTrack, timeS: number): void {
  const gapS = timeS - (track.doubted?.timeS ?? track.timeS);
  const { spacingS } = track;
  track.spacingS = gapS > spacingS ? gapS : spacingS + 0.25 * (gapS - spacingS);
}

function noteRounding(track: ExhaustTrack, tempC: number): void {
  const stepK = Math.abs(tempC - track.lastReadC);
  if (stepK > LEAST_ROUNDING_K && (track.roundingK === 0 || stepK < track.roundingK)) {
    track.roundingK = stepK;
  }
  track.lastReadC = tempC;
}

/** Noise of a reading, never under step/√12 (JCGM 100:2008, F.2.2.1), more where several share a step. */
function readingVariance({ noiseK2, roundingK, slopeKPerS }: ExhaustTrack, sinceS: number) {
  const movedK = Math.abs(slopeKPerS) * sinceS;
  const alike =
    roundingK > movedK * MOST_ALIKE ? MOST_ALIKE : Math.max(1, roundingK / Math.max(movedK, 1e-9));
  return Math.max(noiseK2, (roundingK * roundingK * Math.min(alike, MOST_ALIKE)) / 12);
}

function isWild(track: ExhaustTrack, offK: number, sinceS: number): boolean {
  const climbs = track.slopeKPerS > 0 && track.readings >= KNOWN_CLIMB_READINGS;
  const fastKPerS = offK > 0 && climbs ? FASTER_KPERS : FASTEST_KPERS;
  const sizeK = Math.abs(offK);
  return sizeK > LEAST_WILD_K && sizeK > leastWildK(track) + fastKPerS * sinceS;
}

function leastWildK({ noiseK2 }: ExhaustTrack): number {
  return Math.max(LEAST_WILD_K, WILD_DEVIATIONS * Math.sqrt(noiseK2));
}

/** A wild reading waits; with a second one that agrees the track begins anew from the two. */
function doubt(track: ExhaustTrack, timeS: number, tempC: number): ReadingFit {
  const first = track.doubted;
  const agrees =
    first !== null &&
    Math.abs(tempC - first.tempC) <= leastWildK(track) + FASTEST_KPERS * (timeS - first.timeS);
  if (!agrees) {
    track.doubted = { timeS, tempC };
    return 'doubted';
  }
  restartAtPair(track, first, { timeS, tempC });
  return 'confirmed';
}

type Reading = { timeS: number; tempC: number };

function restartAtPair(track: ExhaustTrack, first: Reading, second: Reading): void {
  const gapS = second.timeS - first.timeS;
  const slopeKPerS = (second.tempC - first.tempC) / gapS;
  const { noiseK2 } = track;
  const free = startFilter(second.tempC, noiseK2);
  const pairVariance = PAIR_SLOPE_KPERS ** 2 + (2 * noiseK2) / (gapS * gapS);
  Object.assign(track, free, {
    slopeKPerS: Math.max(-FASTEST_KPERS, Math.min(FASTEST_KPERS, slopeKPerS)),
    pss: Math.min(free.pss, pairVariance),
    timeS: second.timeS,
    readings: track.readings + 2,
    departure: 0,
    doubted: null,
  });
}

/** Variance from the departures, whose square is 1 on average where it is right; a great one counts as three. */
function learnNoise(track: ExhaustTrack, off: number): void {
  const weight = Math.max(NOISE_WEIGHT, 1 / (track.readings + 4));
  const factor = 1 + weight * (Math.min(9, off * off) - 1);
  track.noiseK2 = Math.min(MOST_NOISE_K2, Math.max(LEAST_NOISE_K2, track.noiseK2 * factor));
}
