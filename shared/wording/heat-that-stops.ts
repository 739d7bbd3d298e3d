import type { Finding } from '../analysis/analysis.ts';
import { formatBand, formatMoment, formatSpan, formatStep, formatTemp } from './format.ts';
import {
  counted,
  isGas,
  numberOf,
  type About,
  type Cause,
  type FindingWords,
} from './finding-words.ts';

type Code = 'heat-lost' | 'limit-cycling' | 'below-cut-out' | 'no-heat';

/** Words for heat that stops early, stays away, or never gets there. Causes in trade order, common practice. */
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
    nextChecks: () => [
      'The same run with the duct off: short bursts that stop point to the duct',
      'Duct: crushed, long, full of lint, or a flap that does not open',
      'Lint chute, screen film and blower wheel',
      'Back pressure at the outlet, no heat, against the service sheet',
      'Drum seals and the heater-box limit',
    ],
  },
  'below-cut-out': {
    title: () => 'Levels off below the cut-out',
    sentences: belowCutOutSentences,
    causes: (_, about) => belowCutOutCauses(about),
    nextChecks: (_, about) =>
      isGas(about)
        ? [
            'Was the drum empty? If not, run it empty',
            'Gas supply, by a licensed person',
            'Flame size and colour at the port',
            'Drum seals and leaks of room air',
          ]
        : [
            'Was the drum empty? If not, run it empty',
            'Supply volts under load, by a qualified person',
            'Element ohms against its rated watts',
            'Amps in each leg with heat on',
          ],
  },
  'no-heat': {
    title: () => 'No heat',
    sentences: noHeatSentences,
    causes: (_, about) => noHeatCauses(about),
    nextChecks: (_, about) => [
      'Heat setting and timer: was heat asked for?',
      isGas(about)
        ? 'Gas shut-off open, igniter glow, flame'
        : 'Both legs of the supply, by a qualified person',
      'Power off: continuity along fuse, cut-off, limit, thermostat' +
        (isGas(about) ? '' : ' and element'),
      'Why the open part opened, before a new one goes in',
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
      why: 'Room air bypasses the drum: the exhaust reads low while the heater side is hot.',
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

function belowCutOutSentences(finding: Finding, { unit, judgedBy }: About): string[] {
  const said: string[] = [];
  const asymptoteC = numberOf(finding, 'asymptoteC');
  if (asymptoteC !== null)
    said.push(`The exhaust heads for ${formatTemp(asymptoteC, unit)} and no higher.`);
  if (judgedBy) {
    const band = formatBand(judgedBy.opensC, judgedBy.opensTolK, unit);
    said.push(`That is below ${band}, where the thermostat opens, so no cut-out came.`);
  }
  said.push(
    'That is consistent with too little heat for the air that moves. It says nothing of the thermostat.',
  );
  return said;
}

function belowCutOutCauses(about: About): Cause[] {
  const leak: Cause = {
    cause: 'Room air leaks in past seals, door or a missing screen',
    why: 'It cools the exhaust with no loss of heat.',
    settles: 'Look at felt, gasket and screen.',
  };
  const wet: Cause = {
    cause: 'A load that was still wet',
    why: 'Drying holds the exhaust down.',
    settles: 'The same run with an empty drum.',
  };
  if (isGas(about)) {
    return [
      {
        cause: 'Low gas pressure or a fouled orifice',
        why: 'A small flame gives little heat.',
        settles: 'Manifold pressure, by a licensed person.',
      },
      leak,
      wet,
    ];
  }
  return [
    {
      cause: 'Low supply: 208 V where 240 V is expected, or a weak connection',
      why: 'Heat goes with the square of the voltage: 208 V gives 75\u00a0% of it.',
      settles: 'Volts under load, by a qualified person.',
    },
    {
      cause: 'Part of the element open, or one coil of two',
      why: 'Half a heater reaches half the rise.',
      settles: 'Element ohms against its rated watts; amps with heat on.',
    },
    leak,
    wet,
  ];
}

function noHeatSentences(finding: Finding, { unit }: About): string[] {
  const riseK = numberOf(finding, 'riseK');
  const durationS = numberOf(finding, 'durationS');
  if (riseK === null || durationS === null) return ['The exhaust stayed near the room.'];
  return [
    `The exhaust rose by ${formatStep(riseK, unit)} in ${formatSpan(durationS)}: motor and friction alone can do that.`,
    'That is consistent with a heater that never had power, or a burner that never lit.',
  ];
}

function noHeatCauses(about: About): Cause[] {
  const chain: Cause = {
    cause: 'One-shot fuse or thermal cut-off open',
    why: 'The most frequent open part in the chain, and it has a cause of its own.',
    settles: 'Continuity, power off.',
  };
  if (isGas(about)) {
    return [
      chain,
      {
        cause: 'Igniter open, or flame sensor stuck',
        why: 'No glow, or glow for ever.',
        settles: 'Watch the port for a minute; igniter ohms, power off.',
      },
      {
        cause: 'Gas valve coils open',
        why: 'The igniter glows and no flame follows.',
        settles: 'Coil ohms, power off.',
      },
      {
        cause: 'Gas shut off',
        why: 'The simplest reason.',
        settles: 'The handle across the pipe means closed.',
      },
    ];
  }
  return [
    chain,
    {
      cause: 'One leg of the supply lost',
      why: 'The motor runs on the other leg.',
      settles: 'Each leg to neutral, by a qualified person.',
    },
    { cause: 'Element open', why: 'No current, no heat.', settles: 'Element ohms, plug out.' },
    {
      cause: 'Limit, thermostat or motor switch open',
      why: 'Any one of them breaks the chain.',
      settles: 'Continuity one by one, power off.',
    },
  ];
}
