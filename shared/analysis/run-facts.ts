import type { AnalysisInput, Cycle, Point } from './analysis.ts';
import type { Series } from './series.ts';

/** A span without readings; the indexes are of the last reading before it and the first after it. */
export type Gap = { fromS: number; toS: number; beforeIndex: number; afterIndex: number };

/** The record averaged into slots of equal width (empty slots left out): what to loop over for a long record. */
export type BinnedView = {
  /** Width of a slot, s; a slot holds one reading where the record is no finer than this. */
  widthS: number;
  /** Mean time of the readings in each slot, s, strictly rising. */
  timesS: Float64Array;
  /** Mean temperature of the readings in each slot, °C. */
  tempsC: Float64Array;
  /** tempsC smoothed so far that noise is well under the swing threshold, °C. */
  smoothC: Float64Array;
  /** Standard deviation of smoothC that noise alone gives, K. */
  smoothNoiseK: number;
};

/**
 * Why an extreme is no cut-out or reset: `start` and `end` belong to the record's ends (a swing is missing),
 * `person` was made by somebody (mark heat-off, stopped or door), `one-shot` is a last peak out of line with the
 * others after which the exhaust went on to fall past the reset band for good, `before-cut-out` a valley that no
 * cut-out precedes. `machine`: it is a turning point.
 */
export type TurnedBy = 'machine' | 'start' | 'end' | 'person' | 'one-shot' | 'before-cut-out';

/** When the heater really lost or got power; both uncertainties are expanded, k = 2. */
export type SwitchInstant = { timeS: number; tempC: number; uS: number; uK: number };

/** A local extreme of the cleaned record. */
export type Extreme = {
  kind: 'peak' | 'valley';
  turnedBy: TurnedBy;
  timeS: number;
  tempC: number;
  /** Expanded uncertainty of tempC, k = 2: noise, sampling, rounding, fit; K. */
  uK: number;
  /** Reading of the cleaned series nearest to it. */
  index: number;
  /** Where the slope broke; null where the record does not show it. */
  switched: SwitchInstant | null;
};

/**
 * A first-order response `A − (A − T0)·exp(−(t − t0)/τ)` fitted to part of a record. Standard errors are
 * k = 1; null values mean that the stretch shows no curvature to fit an asymptote to.
 */
export type LegFit = {
  asymptoteC: number;
  asymptoteErrorK: number;
  tauS: number;
  tauErrorS: number;
  /** Temperature at the first fitted instant, °C. */
  startC: number;
  /** First and last fitted instants, s (the rounded corners at both ends are left out). */
  fromS: number;
  toS: number;
  /** Covariance of asymptote and tau, K·s. */
  covarianceKS: number;
  residualSdK: number;
};

/** Where a heating leg changed its rate without turning. */
export type Knee = {
  timeS: number;
  tempC: number;
  /** Slopes just before and after, K/s. */
  slopeBeforeKPerS: number;
  slopeAfterKPerS: number;
  /** Of the F test that two pieces fit no better than one. */
  pValue: number;
};

/** A stretch between extremes (those of the record's ends included). */
export type RunLeg = {
  kind: 'heating' | 'cooling';
  from: Extreme;
  to: Extreme;
  /** Null where too few readings or no curvature allow a fit. */
  fit: LegFit | null;
  /** Heating legs only. */
  knee: Knee | null;
  /** A heating leg that starts from a cold machine. */
  fromCold: boolean;
  /** A span without readings lies in it. */
  hasGap: boolean;
};

/** What the signal half hands to the findings: all °C, K, s. */
export type RunFacts = {
  input: AnalysisInput;
  /** Spikes set aside. */
  series: Series;
  binned: BinnedView;
  durationS: number;
  /** Median spacing of the readings, s. */
  spacingS: number;
  spikes: number;
  gaps: Gap[];
  /** Standard deviation of a reading, rounding included, K. */
  noiseK: number;
  /** Step of the readings' scale, K; 0 where none is seen. */
  roundingK: number;
  /** Swing threshold used, K: the asked one, raised where noise demands it. */
  swingK: number;
  /** Given room, else the first readings of a cold start, else null. */
  roomC: number | null;
  coldStart: boolean;
  /** In time order, alternating, the record's ends first and last. */
  extremes: Extreme[];
  /** Between consecutive extremes, so `legs.length === extremes.length - 1`. */
  legs: RunLeg[];
  cutOuts: Point[];
  resets: Point[];
  /** Complete ones: cut-out → reset → next cut-out. */
  cycles: Cycle[];
  probeTooSlow: boolean;
};
