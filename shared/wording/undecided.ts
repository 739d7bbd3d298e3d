import type { Finding } from '../analysis/analysis.ts';
import type { TooShortReason } from '../analysis/findings/too-short.ts';
import { formatWithin } from './format.ts';
import {
  counted,
  numberOf,
  type About,
  type Cause,
  type FindingWords,
  unlessRun,
} from './finding-words.ts';

type Code = 'mixed' | 'too-close' | 'too-short' | 'in-band';

/** Words for a run that is sound, or that does not say enough. */
export const UNDECIDED: Record<Code, FindingWords> = {
  mixed: {
    title: () => 'Some points outside, with no pattern',
    sentences: mixedSentences,
    causes: () => mixedCauses(),
    nextChecks: () => [
      'The marks of the run: door, duct, a moved probe at that moment?',
      'Another run of at least four cycles, probe fixed in the centre of the outlet',
      'Terminals in the heat circuit, power off',
    ],
  },
  'too-close': {
    title: () => 'Too close to call',
    sentences: tooCloseSentences,
    causes: () => [],
    nextChecks: () => [
      'A better probe, or one with a calibration, in the centre of the outlet',
      'A longer run: more cycles narrow the mean',
      'A reading every second or two shows the moment of switching',
    ],
  },
  'too-short': {
    title: (finding) => TOO_SHORT[reasonOf(finding)].title,
    sentences: (finding) => [TOO_SHORT[reasonOf(finding)].sentence],
    causes: () => [],
    nextChecks: (finding) => TOO_SHORT[reasonOf(finding)].next,
  },
  'in-band': {
    title: () => 'Cuts out and comes back in band',
    sentences: inBandSentences,
    causes: () => [],
    nextChecks: (_, about) =>
      unlessRun(about, 'on', 'If it was run with the duct off: a run with the duct on'),
  },
};

const TOO_SHORT: Record<TooShortReason, { title: string; sentence: string; next: string[] }> = {
  'no-rating': {
    title: 'Not judged: no rating',
    sentence: 'The points are found, but nothing says what this machine is specified to have.',
    next: ['Give the machine its specified rating, from the service sheet, and judge again'],
  },
  'probe-too-slow': {
    title: 'Not judged: the probe is too slow',
    sentence:
      'Its response time is long against the time that heat is on, so peaks and troughs look smaller than they were.',
    next: ['Run again with a faster probe in the centre of the outlet'],
  },
  'damp-load': {
    title: 'Still drying: no cut-out yet',
    sentence:
      'A damp load holds the exhaust down until it is nearly dry. This record shows drying, not the thermostat.',
    next: ['Run it empty, timed, on the same setting, to read the cut-outs'],
  },
  'ended-before-cut-out': {
    title: 'Ended before the first cut-out',
    sentence:
      'The exhaust was still rising when the record ended, below where the heat is to stop.',
    next: ['Run again and stay through at least three full cycles'],
  },
  'too-few-cut-outs': {
    title: 'Too few cut-outs to judge',
    sentence: 'One cut-out from cold says little: cold metal lets the first one overshoot.',
    next: ['Run again and stay through at least three full cycles'],
  },
  'no-reset': {
    title: 'Ended before heat came back',
    sentence: 'Without a reset in the record, where the heat returns is not known.',
    next: ['Run again and stay through at least three full cycles'],
  },
  'few-readings': {
    title: 'Too few readings to judge',
    sentence: 'The readings are too far apart, or too few, to follow the exhaust.',
    next: ['Take a reading every 10 to 15\u00a0s, closer near each turn'],
  },
};

function reasonOf({ evidence }: Finding): TooShortReason {
  const reason = evidence.reason;
  return isReason(reason) ? reason : 'ended-before-cut-out';
}

function isReason(reason: unknown): reason is TooShortReason {
  return typeof reason === 'string' && reason in TOO_SHORT;
}

function mixedSentences(finding: Finding): string[] {
  const outside = numberOf(finding, 'outside');
  const judged = numberOf(finding, 'judged');
  if (outside === null || judged === null) return ['Some judged points lie outside their band.'];
  return [
    `${outside} of ${counted(judged, 'judged point')} outside the band; the others do not agree with them.`,
    'The points together name no fault of the thermostat. Look for what happened at that moment.',
  ];
}

function mixedCauses(): Cause[] {
  return [
    {
      cause: 'Something done during the run',
      why: 'An open door, a moved duct or a moved probe makes one point stand out.',
      settles: 'Marks and notes of the run.',
    },
    {
      cause: 'Contact that comes and goes',
      why: 'One early or late cut-out among steady ones.',
      settles: 'A longer run, and a look at the terminals.',
    },
  ];
}

function tooCloseSentences(finding: Finding): string[] {
  const judged = numberOf(finding, 'judged');
  const close = numberOf(finding, 'tooClose');
  const within = numberOf(finding, 'withinAllowance');
  const said: string[] = [];
  if (judged !== null && close !== null && close > 0) {
    said.push(
      `${close} of ${counted(judged, 'judged point')} cannot be told from the edge of the band with this probe.`,
    );
  }
  if (within !== null && within > 0) {
    const ways = within === 1 ? 'One lies' : `${within} lie`;
    said.push(`${ways} beyond the band, but within what the air may run ahead of the thermostat.`);
  }
  return [...said, 'Nothing lies outside; it is not proven in band either.'];
}

function inBandSentences(finding: Finding, { unit, judgedBy }: About): string[] {
  const said: string[] = [];
  const cutOutC = numberOf(finding, 'meanCutOutC');
  const cutOutUK = numberOf(finding, 'meanCutOutUK');
  const cutOuts = numberOf(finding, 'cutOuts');
  if (cutOutC !== null && cutOutUK !== null && cutOuts !== null) {
    said.push(
      `${counted(cutOuts, 'judged cut-out')}, ${formatWithin(cutOutC, cutOutUK, unit)} on average.`,
    );
  }
  const resetC = numberOf(finding, 'meanResetC');
  const resetUK = numberOf(finding, 'meanResetUK');
  const resets = numberOf(finding, 'resets');
  if (resetC !== null && resetUK !== null && resets !== null) {
    said.push(`${counted(resets, 'reset')}, ${formatWithin(resetC, resetUK, unit)} on average.`);
  }
  if (judgedBy) said.push('Both lie where this machine is specified to have them.');
  return said;
}
