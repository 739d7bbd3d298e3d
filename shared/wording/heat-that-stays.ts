import type { Finding } from '../analysis/analysis.ts';
import { boardNeverCutCauses } from './board-causes.ts';
import { formatMoment, formatRated, formatSpan, formatTemp } from './format.ts';
import {
  counted,
  hasBoard,
  isGas,
  numberOf,
  type About,
  type Cause,
  type FindingWords,
} from './finding-words.ts';

/** Words for heat that does not go off when it should. Causes in trade order, common practice. */
export const HEAT_THAT_STAYS: Record<'runaway' | 'heat-stays-on', FindingWords> = {
  runaway: {
    title: ({ evidence }, about) =>
      evidence.afterTrip === true
        ? `Heat kept coming after the ${hasBoard(about) ? 'control cut it' : 'thermostat opened'}`
        : 'Heat ran on with no cut-out',
    sentences: runawaySentences,
    causes: (finding, about) =>
      finding.evidence.afterTrip === true ? afterTripCauses(about) : neverOpenedCauses(about),
    nextChecks: (finding, about) => runawayChecks(finding.evidence.afterTrip === true, about),
  },
  'heat-stays-on': {
    title: () => 'Some heat stays on after the cut-out',
    sentences: staysOnSentences,
    causes: (_, about) => staysOnCauses(about),
    nextChecks: (_, about) => staysOnChecks(about),
  },
};

function runawaySentences(finding: Finding, about: About): string[] {
  const { unit, judgedBy } = about;
  const { evidence } = finding;
  const said: string[] = [];
  const peakC = numberOf(finding, 'peakC');
  const aboveFromS = numberOf(finding, 'aboveFromS');
  const aboveForS = numberOf(finding, 'aboveForS');
  if (aboveFromS !== null && aboveForS !== null && peakC !== null) {
    const span = formatSpan(aboveForS);
    said.push(
      `From ${formatMoment(aboveFromS)} the exhaust was above the opens band for ${span}, up to ${formatTemp(peakC, unit)}, with no cut-out.`,
    );
  }
  const limitAtS = numberOf(finding, 'limitAtS');
  if (limitAtS !== null && judgedBy) {
    said.push(
      `It passed the high limit of ${formatRated(judgedBy.highLimitC, unit)} at ${formatMoment(limitAtS)}.`,
    );
  }
  said.push(...clickSentence(finding, unit));
  const before = numberOf(finding, 'cutOutsBefore') ?? 0;
  if (before > 0) said.push(`Before it the heat cut out by itself in ${counted(before, 'cycle')}.`);
  said.push(meaningOf(evidence.afterTrip, about));
  return said;
}

function meaningOf(afterTrip: unknown, about: About): string {
  const part = hasBoard(about) ? 'control' : 'thermostat';
  if (afterTrip === true)
    return `That is consistent with a ${part} that opened while something else went on feeding the heat.`;
  if (afterTrip === false)
    return `That is consistent with a ${part} that did not open, or a feed that does not pass through it.`;
  return `Whether the ${part} opened cannot be told from this record: mark each click in the next run.`;
}

function clickSentence(finding: Finding, unit: About['unit']): string[] {
  const clickAtS = numberOf(finding, 'clickAtS');
  const clickC = numberOf(finding, 'clickC');
  if (clickAtS === null || clickC === null) return [];
  return [`A click was heard at ${formatMoment(clickAtS)}, at ${formatTemp(clickC, unit)}.`];
}

function afterTripCauses(about: About): Cause[] {
  if (isGas(about)) {
    return [
      {
        cause: 'Gas valve that does not close when its coils lose power',
        why: 'The thermostat cut out before; then the flame went on after it opened.',
        settles: 'Coil volts at cut-out: none while the flame still burns. Close the gas at once.',
      },
      {
        cause: 'Board relay or timer contact that sticks once warm',
        why: 'Heat obeyed the first cycles and then did not.',
        settles: 'Volts at the burner circuit while the thermostat reads open.',
      },
    ];
  }
  const relayAndCoil: Cause[] = [
    {
      cause: 'Heater relay or timer contact that sticks once warm',
      why: 'Heat obeyed the first cycles and then did not; a cold machine behaves.',
      settles: 'Line voltage across the element while the thermostat reads open.',
    },
    {
      cause: 'Heater coil that touches its box when hot',
      why: 'A path to the frame can be open cold and closed hot, and feeds heat that no thermostat stops.',
      settles: 'Element terminal to frame, plug out, at once after a hot run: open or closed.',
    },
  ];
  if (hasBoard(about)) return relayAndCoil;
  return [
    ...relayAndCoil,
    {
      cause: 'Thermostat contacts that weld after opening',
      why: 'Possible; a clean fall after each earlier cut-out speaks against it.',
      settles: 'Volts across the thermostat above its mark: about 0 V would mean it is closed.',
    },
  ];
}

function neverOpenedCauses(about: About): Cause[] {
  const shared = hasBoard(about) ? boardNeverCutCauses(about) : thermostatNeverCutCauses(about);
  if (isGas(about)) return shared;
  return [
    ...shared,
    {
      cause: 'Heater coil grounded on the leg that nothing switches',
      why: 'It feeds heat that no thermostat stops; often some heat on the no-heat setting too.',
      settles: 'Element terminal to frame, cold and hot, plug out.',
    },
  ];
}

function thermostatNeverCutCauses(about: About): Cause[] {
  const thermistor: Cause = {
    cause: 'Thermistor open, unplugged or reading cold',
    why: 'On a machine with a board the control would wait for a temperature that never shows.',
    settles: 'Thermistor resistance at a known temperature against the service sheet.',
  };
  return [
    {
      cause: 'Cycling thermostat stuck closed, or not in the air stream',
      why: 'The exhaust went past its band with no break in the rise.',
      settles: 'Volts across it above its mark: about 0 V means closed. Look at how it is seated.',
    },
    {
      cause: isGas(about)
        ? 'Board relay or timer contact welded'
        : 'Heater relay or timer contact welded',
      why: 'Heat that is fed past the thermostat ignores it from the first cycle.',
      settles: 'Heat on the no-heat setting, or relay output live when the control calls for none.',
    },
    // A machine known to have a disc has no thermistor to blame.
    ...(about.control === undefined ? [thermistor] : []),
    {
      cause: 'Part of another rating fitted',
      why: 'It may open, but above what this record reached.',
      settles: 'Read the mark on the part against the service sheet.',
    },
  ];
}

function runawayChecks(afterTrip: boolean, about: About): string[] {
  const checks = isGas(about)
    ? ['Volts at the valve coils at cut-out, hot, by a qualified person; then shut the gas off']
    : [
        'Volts across the element at cut-out, hot, by a qualified person',
        'Element to frame, cold and hot, plug out',
      ];
  const thermostat = hasBoard(about)
    ? 'Thermistor: its plug, its seat, and its ohms at a known temperature'
    : 'Thermostat: its mark, its seat, and whether it opens when heated';
  return [
    ...(afterTrip ? [...checks, thermostat] : [thermostat, ...checks]),
    'One-shot fuse and thermal cut-off: continuity after this run',
    'Airflow: lint, blower, duct',
  ];
}

function staysOnSentences(finding: Finding, { unit }: About): string[] {
  const said: string[] = [];
  const shareOfUsual = numberOf(finding, 'shareOfUsualRate');
  if (shareOfUsual !== null) {
    said.push(
      `After the cut-out the exhaust fell at ${Math.round(shareOfUsual * 100)}\u00a0% of the rate to be expected at that temperature.`,
    );
  }
  const hangS = numberOf(finding, 'hangS');
  const usualOffS = numberOf(finding, 'usualOffS');
  if (hangS !== null && usualOffS !== null) {
    said.push(
      `It stayed above the reset band for ${formatSpan(hangS)}; a clean fall would take about ${formatSpan(usualOffS)}.`,
    );
  }
  const asymptoteC = numberOf(finding, 'asymptoteC');
  const roomC = numberOf(finding, 'roomC');
  if (asymptoteC !== null) {
    const room = roomC === null ? '' : `, with the room at ${formatTemp(roomC, unit)}`;
    said.push(`The fall heads for ${formatTemp(asymptoteC, unit)}${room}.`);
  }
  said.push('That is consistent with some heat that the thermostat does not switch.');
  return said;
}

function staysOnCauses(about: About): Cause[] {
  if (isGas(about)) {
    return [
      {
        cause: 'Gas valve that leaks past its seat, with a small flame left',
        why: 'Part of the heat stays on after the coils lose power.',
        settles: 'Look at the burner port after cut-out. Any flame: close the gas.',
      },
      {
        cause: 'Restricted airflow that holds the heat',
        why: 'Stored heat leaves slowly where little air moves.',
        settles: 'The same run with the duct off.',
      },
    ];
  }
  return [
    {
      cause: 'Heater coil that touches its box, often only when hot',
      why: 'A path to the frame leaves part of the coil fed from one leg, past the thermostat.',
      settles: 'Element terminal to frame, plug out: cold, then at once after a hot run.',
    },
    {
      cause: 'Second coil of a dual element left on',
      why: 'Half the heat goes on after the thermostat opened.',
      settles: 'Clamp each leg with the heat off: only the motor is to draw.',
    },
    {
      cause: 'Relay that leaks or lets go of one leg only',
      why: 'Current goes on in one leg after cut-out.',
      settles: 'Volts across the element while the thermostat reads open.',
    },
    {
      cause: 'Very hot room or a slow probe',
      why: 'Both make a fall look slow with no fault in the machine.',
      settles: 'Room temperature, and the probe in moving air of known temperature.',
    },
  ];
}

function staysOnChecks(about: About): string[] {
  if (isGas(about))
    return [
      'Flame at the burner port after cut-out',
      'Gas shut-off, then the valve',
      'Airflow with the duct off',
    ];
  return [
    'Element to frame, cold and hot, plug out',
    'Run on no-heat: the exhaust is to stay near the room',
    'Clamp each leg with the heat off, by a qualified person',
    'Look for a bright bead or a dark spot on coil and box',
  ];
}
