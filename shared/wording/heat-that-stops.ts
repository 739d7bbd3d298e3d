import type { Finding } from '../analysis/analysis.ts';
import { formatBand, formatMoment, formatSpan, formatStep, formatTemp } from './format.ts';
import {
  counted,
  isGas,
  numberOf,
  type About,
  type Cause,
  type FindingWords,
  unlessRun,
} from './finding-words.ts';

type Code = 'heat-lost' | 'limit-cycling';

/** Words for heat that stops early or goes away. Causes in trade order, common practice. */
export const HEAT_THAT_STOPS: Record<Code, FindingWords> = {
  'heat-lost': {
    title: () => 'Heat went away and did not come back',
    sentences: heatLostSentences,
    causes: (_, about) => heatLostCauses(about),
    nextChecks: (_, about) => [
      'Ask first: did the timer end the heat, or did somebody turn it off?',
      'Power off, then continuity of the one-shot fuse and the thermal cut-off',
      ...(isGas(about) ? ['Igniter and flame at the port: glow with no flame, or no glow'] : []),
      'Why it opened: airflow and the thermostat, before a new part goes in',
    ],
  },
  'limit-cycling': {
    title: () => 'Heat is cut short before the thermostat’s band',
    sentences: limitCyclingSentences,
    causes: (_, about) => limitCyclingCauses(about),
    nextChecks: (_, about) => [
      ...unlessRun(
        about,
        'off',
        'The same run with the duct off: short bursts that stop point to the duct',
      ),
      'Duct: crushed, long, full of lint, or a flap that does not open',
      'Lint chute, screen film and blower wheel',
      'Back pressure at the outlet, no heat, against the service sheet',
      'Drum seals and the heater-box limit',
    ],
  },
};

function heatLostSentences(finding: Finding, { unit, judgedBy }: About): string[] {
  const fromC = numberOf(finding, 'fallFromC');
  const lastC = numberOf(finding, 'lastC');
  const said: string[] = [];
  if (fromC !== null && lastC !== null) {
    said.push(
      `From ${formatMoment(finding.fromS)} the exhaust fell from ${formatTemp(fromC, unit)} to ${formatTemp(lastC, unit)} with no reset.`,
    );
  }
  if (judgedBy) {
    said.push(
      `Heat was to come back within ${formatBand(judgedBy.closesC, judgedBy.closesTolK, unit)}. No mark says that somebody turned it off.`,
    );
  }
  said.push(
    'That is consistent with a part that opened for good, or with a timer that ended the heat: ask.',
  );
  return said;
}

function heatLostCauses(about: About): Cause[] {
  const fuse: Cause = {
    cause: 'One-shot fuse or thermal cut-off opened',
    why: isGas(about)
      ? 'The drum may go on turning while the heat is gone.'
      : 'Many electric machines stop as a whole; some lose only the heat.',
    settles: 'Continuity, power off. An open one-shot part has a cause: find it.',
  };
  const timer: Cause = {
    cause: 'Timer or dryness control ended the heat',
    why: 'A cool-down looks the same from the outlet.',
    settles: 'Run timed dry with enough time left on the dial.',
  };
  if (isGas(about)) {
    const coils: Cause = {
      cause: 'Gas valve coils weak when hot',
      why: 'The first flame lights, and later ones do not until the machine has cooled.',
      settles: 'Igniter glows, then goes out with no flame.',
    };
    return [coils, fuse, timer];
  }
  const element: Cause = {
    cause: 'Element broke while hot, or a terminal burnt off',
    why: 'Heat goes at once and for good.',
    settles: 'Element ohms, plug out; look at the terminals.',
  };
  return [fuse, element, timer];
}

function limitCyclingSentences(finding: Finding, { unit, judgedBy }: About): string[] {
  const said: string[] = [];
  const cuts = numberOf(finding, 'cutOuts');
  const peakC = numberOf(finding, 'meanCutOutC');
  if (cuts !== null && peakC !== null && judgedBy) {
    const band = formatBand(judgedBy.opensC, judgedBy.opensTolK, unit);
    said.push(
      `Heat was cut ${counted(cuts, 'time')}, at ${formatTemp(peakC, unit)} on average; the thermostat opens at ${band}.`,
    );
  }
  const swingK = numberOf(finding, 'meanSwingK');
  const ratedK = numberOf(finding, 'ratedDifferentialK');
  if (swingK !== null && ratedK !== null) {
    said.push(
      `The swings are ${formatStep(swingK, unit)} where the rated differential is ${formatStep(ratedK, unit)}.`,
    );
  }
  const onS = numberOf(finding, 'medianOnS');
  if (onS !== null) said.push(`Heat was on for ${formatSpan(onS)} at a time.`);
  said.push(
    'That is consistent with a limit upstream of the drum that cuts the heat: think of airflow first.',
  );
  return said;
}

function limitCyclingCauses(about: About): Cause[] {
  return [
    {
      cause: 'Restricted house duct',
      why: 'Little air carries little heat out, so the heater’s own housing gets hot first.',
      settles: 'The same run with the duct off: the bursts stop.',
    },
    {
      cause: 'Lint in the chute, on the screen or in the cabinet; weak blower',
      why: 'The same sign, and it stays with the duct off.',
      settles: 'Look, clean, and feel the air at the outlet.',
    },
    {
      cause: 'Worn drum seal or missing lint screen',
      why: 'Room air slips past the drum: the exhaust reads low while the heater side is hot.',
      settles: 'Look at felt and screen; lint trails show the way of the air.',
    },
    {
      cause: isGas(about)
        ? 'Burner limit weak, or flame too large'
        : 'Heater-box limit weak from frequent work',
      why: 'A worn limit opens below its mark.',
      settles: 'Airflow proven good, and the limit still opens: read its mark and compare.',
    },
  ];
}
