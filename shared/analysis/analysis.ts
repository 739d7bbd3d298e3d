import type { Load, Probe, Rating } from './rating.ts';
import type { Mark } from './series.ts';

/** All that a run is judged by, beside its readings. */
export type AnalysisInput = {
  /** null: nothing is known of what the machine should do; points and legs only. */
  rating: Rating | null;
  probe: Probe;
  marks: Mark[];
  /** null where nobody wrote it down; counts as empty. */
  load: Load | null;
  roomC: number | null;
  /** Complete cycles that a proof run asks for. */
  minCycles: number;
  /** Swing threshold of a turning point, K; default 4 °F. */
  swingK: number;
  /** What the machine did when it was clean; null where no such run is known. */
  reference: ReferenceRun | null;
};

/**
 * A clean run of the same machine on the same heat setting, to go by where a run has nothing clean of its own. Middle
 * values (medians) over its complete cycles.
 */
export type ReferenceRun = {
  cycles: number;
  onS: number;
  offS: number;
  swingK: number;
  /** Its falls as one first-order response, good from `fromC` down to `toC`; null where they do not compare. */
  fall: { fromC: number; toC: number; asymptoteC: number; tauS: number } | null;
};

export type Call = 'inside' | 'outside' | 'within-allowance' | 'too-close';

/** A turning point. Every field named `u…` is expanded, k = 2. */
export type Point = {
  kind: 'cut-out' | 'reset';
  timeS: number;
  tempC: number;
  /** Noise, sampling, rounding and fit, K. */
  uK: number;
  /** With the probe's accuracy and calibration, K. */
  uTotalK: number;
  judged: boolean;
  call: Call | null;
  /** That the true value lies in the rated band, without the allowance. */
  probability: number | null;
  /** When the heater really lost (or got) power; null where the record does not show it. */
  switchTimeS: number | null;
  switchTempC: number | null;
  /** Expanded uncertainty of switchTimeS, s. */
  switchUS: number | null;
};

export type Cycle = { offS: number; onS: number; swingK: number };

/** A stretch between turning points, as a first-order response. */
export type Leg = {
  kind: 'heating' | 'cooling';
  fromS: number;
  toS: number;
  asymptoteC: number | null;
  asymptoteUK: number | null;
  tauS: number | null;
  tauUS: number | null;
  knee: { timeS: number; tempC: number } | null;
};

/** In order of precedence; the first that holds is the headline. */
export const FINDING_CODES = [
  'runaway',
  'heat-stays-on',
  'heat-lost',
  'limit-cycling',
  'drifting',
  'scattered',
  'opens-high',
  'opens-low',
  'closes-high',
  'closes-low',
  'below-cut-out',
  'no-heat',
  'mixed',
  'too-close',
  'too-short',
  'in-band',
] as const;
export type FindingCode = (typeof FINDING_CODES)[number];

/**
 * The numbers that a finding rests on. A key says its unit by its last letters: `…C` a temperature in °C,
 * `…K` a temperature difference, `…KPerS` a rate, `…S` seconds; a key with none is a count, a
 * probability, a word or a yes/no.
 */
export type Evidence = Record<string, number | string | boolean | null>;

export type Finding = { code: FindingCode; fromS: number; toS: number; evidence: Evidence };

export type Outcome = 'stop' | 'proven' | 'not-proven';

export type Analysis = {
  /** ANALYSIS_VERSION of the engine that made it. */
  version: string;
  samples: number;
  durationS: number;
  /** Readings set aside as single wild ones. */
  spikes: number;
  /** Spans without readings. */
  gaps: { fromS: number; toS: number }[];
  /** Standard deviation of a reading about the true temperature, K. */
  noiseK: number;
  cutOuts: Point[];
  resets: Point[];
  cycles: Cycle[];
  legs: Leg[];
  findings: Finding[];
  outcome: Outcome;
  /** Why no point is called, where none is. */
  notJudged: 'no-rating' | 'probe-too-slow' | null;
  /** First `cut-heat` of the guard when the record is played back; null until the guard exists. */
  guardAlarmS: number | null;
};
