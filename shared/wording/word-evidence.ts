import type { Evidence } from '../analysis/analysis.ts';
import type { DisplayUnit } from '../units.ts';
import {
  formatMoment,
  formatProbability,
  formatRate,
  formatSpan,
  formatStep,
  formatTemp,
} from './format.ts';

/** What each evidence key means. The keys of a code are listed beside the code, in shared/analysis/findings. */
const LABELS: Record<string, string> = {
  aboveFromS: 'Above the band from',
  aboveForS: 'Above it for',
  aboveC: 'Band and allowance end at',
  peakC: 'Highest reading',
  highLimitC: 'High limit',
  limitAtS: 'High limit passed',
  ended: 'How it ended',
  afterTrip: 'The thermostat had opened',
  clickAtS: 'Click heard',
  clickC: 'Temperature at the click',
  kneeAtS: 'Heater changed power at',
  cutOutsBefore: 'Cut-outs before',
  asymptoteC: 'Heading for',
  asymptoteUK: 'Give or take',
  how: 'What shows it',
  fallRateKPerS: 'Fall rate',
  usualRateKPerS: 'Fall rate to be expected',
  atC: 'Compared at',
  shareOfUsualRate: 'Share of the usual rate',
  hangS: 'Above the reset band for',
  usualOffS: 'Usual time off',
  roomC: 'Room',
  fallFromC: 'Fell from',
  lastC: 'Last reading',
  belowResetAtS: 'Below the reset band from',
  cutOuts: 'Cut-outs',
  resets: 'Resets',
  cycles: 'Complete cycles',
  points: 'Points',
  meanCutOutC: 'Mean cut-out',
  meanCutOutUK: 'Give or take',
  meanResetC: 'Mean reset',
  meanResetUK: 'Give or take',
  cutOutProbability: 'Mean cut-out in band, probability',
  resetProbability: 'Mean reset in band, probability',
  meanSwingK: 'Mean swing',
  ratedDifferentialK: 'Rated differential',
  medianOnS: 'Heat on, middle value',
  usualOnS: 'Heat on in the clean run',
  slopePerCycleK: 'Slope a cycle',
  slopePerCycleUK: 'Give or take',
  totalK: 'In all',
  toleranceK: 'Tolerance',
  pValue: 'Chance of such a slope with none there',
  sdK: 'Standard deviation',
  allowedK: 'Allowed',
  meanC: 'Mean',
  meanUK: 'Give or take',
  bandLowC: 'Band from',
  bandHighC: 'Band to',
  allowanceK: 'Allowance for the air',
  by: 'Judged by',
  riseK: 'Rise',
  durationS: 'In',
  outside: 'Outside',
  judged: 'Judged points',
  tooClose: 'Too close to call',
  withinAllowance: 'Within the allowance',
  inside: 'Inside',
  reason: 'Reason',
  firstOnly: 'Judged by the first cut-out alone',
};

const WORDS: Record<string, string> = {
  'levels-off': 'levelled off',
  'by-hand': 'heat turned off by hand',
  'record-ends': 'still on its way when the record ended',
  'by-itself': 'turned by itself',
  'falls-slowly': 'a slow fall',
  hangs: 'a hang above the reset band',
  'keeps-off-room': 'a fall that heads for far above the room',
  swings: 'short swings',
  'on-times': 'short heats',
  points: 'peaks and troughs',
  switches: 'moments of switching',
  'no-rating': 'no rating known',
  'probe-too-slow': 'probe too slow',
  'damp-load': 'damp load',
  'ended-before-cut-out': 'no cut-out yet',
  'too-few-cut-outs': 'too few cut-outs',
  'no-reset': 'no reset yet',
  'few-readings': 'too few readings',
};

/** Moments of the run, told on its clock; every other `…S` is a span. */
const MOMENTS = /(At|From)S$/;

/**
 * Evidence as labelled values in the reader's unit, in the order of the finding; what is null is left out.
 * A key's last letters say its unit (see Evidence).
 */
export function wordEvidence(
  evidence: Evidence,
  unit: DisplayUnit,
): { label: string; value: string }[] {
  return Object.entries(evidence).flatMap(([key, value]) =>
    value === null ? [] : [{ label: LABELS[key] ?? key, value: wordValue(key, value, unit) }],
  );
}

function wordValue(key: string, value: number | string | boolean, unit: DisplayUnit): string {
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'string') return WORDS[value] ?? value;
  if (key.endsWith('KPerS')) return formatRate(value, unit);
  if (key.endsWith('C')) return formatTemp(value, unit);
  if (key.endsWith('K')) return formatStep(value, unit);
  if (MOMENTS.test(key)) return formatMoment(value);
  if (key.endsWith('S')) return formatSpan(value);
  if (key.endsWith('robability') || key === 'pValue' || key.startsWith('shareOf')) {
    return formatProbability(value);
  }
  return String(value);
}
