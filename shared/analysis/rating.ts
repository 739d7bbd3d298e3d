/** What a machine is specified to do, in °C; every `…K` is a temperature difference. */
export type Rating = {
  opensC: number;
  opensTolK: number;
  closesC: number;
  closesTolK: number;
  /** Allowance above the opens band: the air runs ahead of the disc. */
  overshootK: number;
  /** Allowance below the closes band. */
  undershootK: number;
  /** Where the exhaust must not go: the rated opening of the safety that watches the exhaust stream. */
  highLimitC: number;
  /** By when the heat must have been cut; default 6 °F under the high limit. */
  ceilingC: number;
};

/** The defaults of the analyse command (common practice), converted from °F. */
export const DEFAULT_RATING: Rating = {
  opensC: (155 - 32) / 1.8,
  opensTolK: 5 / 1.8,
  closesC: (130 - 32) / 1.8,
  closesTolK: 5 / 1.8,
  overshootK: 10 / 1.8,
  undershootK: 10 / 1.8,
  highLimitC: (196 - 32) / 1.8,
  ceilingC: (190 - 32) / 1.8,
};

/**
 * What a calibration adds to every reading t: b(t) = interceptK + slope · (t − aboutC), the line of JCGM 100:2008, H.3.
 * `…Error` is a standard uncertainty; what else the calibration does not know is in the probe's `calibrationUK`.
 */
export type ProbeCorrection = {
  aboutC: number;
  interceptK: number;
  /** K per K. */
  slope: number;
  interceptErrorK: number;
  slopeError: number;
  /** Of intercept and slope, −1 to 1: left out, u at a distance from aboutC comes out far too large. */
  correlation: number;
};

/** How good the probe is and how fast. */
export type Probe = {
  /** ± accuracy, rectangular, common to all points of a run, K; 0 where a correction takes its place. */
  accuracyK: number;
  /** Expanded (k = 2) uncertainty of its calibration, the same at every temperature, K; 0 where none is known. */
  calibrationUK: number;
  /** Added to its readings before they are judged; null where it has no calibration of its own. */
  correction: ProbeCorrection | null;
  /** First-order response time in moving air, s; null where it is not known. */
  responseS: number | null;
};

export type Load = 'empty' | 'damp';
