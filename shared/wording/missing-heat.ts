import type { Finding } from '../analysis/analysis.ts';
import { formatBand, formatSpan, formatStep, formatTemp } from './format.ts';
import { isGas, numberOf, type About, type Cause, type FindingWords } from './finding-words.ts';

/** Words for heat that is weak or never comes. Causes in trade order, common practice. */
export const MISSING_HEAT: Record<'below-cut-out' | 'no-heat', FindingWords> = {
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
