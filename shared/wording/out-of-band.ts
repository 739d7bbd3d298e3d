import type { Finding, FindingCode } from '../analysis/analysis.ts';
import { formatBand, formatStep, formatWithin } from './format.ts';
import {
  counted,
  isGas,
  numberOf,
  type About,
  type Cause,
  type FindingWords,
  unlessRun,
} from './finding-words.ts';

type Code = Extract<FindingCode, `opens-${string}` | `closes-${string}`>;

/** Words for a thermostat that works cleanly at the wrong temperature. Causes in trade order, common practice. */
export const OUT_OF_BAND: Record<Code, FindingWords> = {
  'opens-high': {
    title: () => 'Cuts out too high',
    sentences: (finding, about) => bandSentences(finding, about, 'cut-out', 'above'),
    causes: () => opensHighCauses(),
    nextChecks: (_, about) => [
      'Read the mark on the thermostat against the service sheet',
      'Its seat: flat in the air stream, no lint under it',
      'Where a bias heater is fitted: its ohms, and its volts on low',
      ...unlessRun(
        about,
        'off',
        'The same run with the duct off, to tell overshoot from set-point',
      ),
    ],
  },
  'opens-low': {
    title: () => 'Cuts out too low',
    sentences: (finding, about) => bandSentences(finding, about, 'cut-out', 'below'),
    causes: () => opensLowCauses(),
    nextChecks: () => [
      'Heat setting: was it high?',
      'Read the mark on the thermostat against the service sheet',
      'Bias heater: no volts on high',
      'Airflow, so that a limit is not mistaken for the thermostat',
    ],
  },
  'closes-high': {
    title: () => 'Comes back too early',
    sentences: (finding, about) => bandSentences(finding, about, 'reset', 'above'),
    causes: () => closesHighCauses(),
    nextChecks: () => [
      'Read the mark on the thermostat: its differential too',
      'Bias heater: no volts on high',
      'A heated bench check: where it opens, and where it closes',
    ],
  },
  'closes-low': {
    title: () => 'Comes back too late',
    sentences: (finding, about) => bandSentences(finding, about, 'reset', 'below'),
    causes: (_, about) => closesLowCauses(about),
    nextChecks: (_, about) => [
      ...(isGas(about) ? ['Time from igniter glow to flame: about 30\u00a0s is usual'] : []),
      'Read the mark on the thermostat: its differential too',
      'A heated bench check: where it opens, and where it closes',
      'Relay and terminals: does heat follow the thermostat at once?',
    ],
  },
};

function bandSentences(
  finding: Finding,
  { unit, judgedBy }: About,
  kind: 'cut-out' | 'reset',
  side: 'above' | 'below',
): string[] {
  const said: string[] = [];
  const points = numberOf(finding, 'points');
  const meanC = numberOf(finding, 'meanC');
  const uK = numberOf(finding, 'meanUK');
  if (points !== null && meanC !== null && uK !== null) {
    said.push(
      `${sentenceCase(counted(points, kind))} at ${formatWithin(meanC, uK, unit)} on average.`,
    );
  }
  if (judgedBy) {
    const opens = kind === 'cut-out';
    const middleC = opens ? judgedBy.opensC : judgedBy.closesC;
    const tolK = opens ? judgedBy.opensTolK : judgedBy.closesTolK;
    const allowanceK = numberOf(finding, 'allowanceK') ?? 0;
    const allowance =
      allowanceK > 0 ? `, and ${formatStep(allowanceK, unit)} more is allowed for the air` : '';
    said.push(
      `Rated to ${opens ? 'open' : 'close'} at ${formatBand(middleC, tolK, unit)}${allowance}: this lies ${side} it.`,
    );
  }
  if (finding.evidence.by === 'switches') {
    said.push('The moments at which the heater really switched say the same.');
  }
  return said;
}

function sentenceCase(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function opensHighCauses(): Cause[] {
  return [
    {
      cause: 'Thermostat of another rating fitted',
      why: 'Clean, repeatable cycles at the wrong number are consistent with a part that does what its own mark says.',
      settles: 'Read the mark; a part that fits the sheet brings the points back.',
    },
    {
      cause: 'Thermostat badly seated, or lint under it',
      why: 'The disc feels the air late, so the air runs ahead of it.',
      settles: 'Reseat it and run again.',
    },
    {
      cause: 'Thermostat drifted with age',
      why: 'Less frequent than drift downwards.',
      settles: 'A heated bench check.',
    },
    {
      cause: 'Bias heater open, on a low setting',
      why: 'Without it the low setting behaves as the high one.',
      settles: 'Bias ohms, power off; two runs on two settings.',
    },
  ];
}

function opensLowCauses(): Cause[] {
  return [
    {
      cause: 'Thermostat drifted down with age',
      why: 'Old discs have been seen to open early; they still pass a cold ohmmeter test.',
      settles: 'A heated bench check, or a new part that brings the points back.',
    },
    {
      cause: 'Thermostat of another rating fitted',
      why: 'Clean, repeatable cycles at the wrong number.',
      settles: 'Read the mark on the part.',
    },
    {
      cause: 'Bias heater fed on the high setting',
      why: 'It makes the disc open about 15\u00a0°F lower and narrows the differential.',
      settles: 'Bias volts on high: none are to be there.',
    },
    {
      cause: 'Thermistor that reads hot',
      why: 'On a machine with a board the control would stop the heat early.',
      settles: 'Its resistance at a known temperature against the service sheet.',
    },
  ];
}

function closesHighCauses(): Cause[] {
  return [
    {
      cause: 'Thermostat with a narrower differential fitted',
      why: 'It opens where it is to, and closes too soon.',
      settles: 'Read the mark: the differential is often part of it.',
    },
    {
      cause: 'Bias heater fed when it is not to be',
      why: 'It narrows the differential.',
      settles: 'Bias volts on high.',
    },
    {
      cause: 'Worn disc in the thermostat',
      why: 'Open and close each have a tolerance of their own.',
      settles: 'A heated bench check.',
    },
  ];
}

function closesLowCauses(about: About): Cause[] {
  const wide: Cause = {
    cause: 'Thermostat with a wider differential fitted',
    why: 'It opens where it is to, and closes too late.',
    settles: 'Read the mark: the differential is often part of it.',
  };
  const late: Cause = isGas(about)
    ? {
        cause: 'Igniter or flame slow to come',
        why: 'The exhaust goes on falling until the flame is there; about 30\u00a0s is usual.',
        settles: 'Mark igniter glow and flame in the next run.',
      }
    : {
        cause: 'Relay or loose terminal that brings the heat back late',
        why: 'The thermostat may close in time while the heater waits.',
        settles: 'Mark the click and the return of heat in the next run.',
      };
  return isGas(about) ? [late, wide] : [wide, late];
}
