import type { Finding } from '../analysis/analysis.ts';
import { formatStep } from './format.ts';
import { isGas, numberOf, type About, type Cause, type FindingWords } from './finding-words.ts';

/** Words for cut-outs that do not repeat. Causes in trade order, common practice. */
export const UNSTEADY: Record<'drifting' | 'scattered', FindingWords> = {
  drifting: {
    title: (finding) =>
      (numberOf(finding, 'totalK') ?? 0) < 0 ? 'The cut-outs sink' : 'The cut-outs climb',
    sentences: driftingSentences,
    causes: (_, about) => driftingCauses(about),
    nextChecks: (_, about) => [
      'Next run: mark every click',
      isGas(about)
        ? 'Burner circuit: time from click to flame out'
        : 'Heater relay: time from click to peak, cycle by cycle',
      'Thermostat: a heated bench check, several times over',
      'Airflow: does it fall off as the machine warms?',
    ],
  },
  scattered: {
    title: () => 'The cut-outs scatter',
    sentences: scatteredSentences,
    causes: (_, about) => scatteredCauses(about),
    nextChecks: (_, about) => [
      'Power off: terminals and spades, loose or discoloured',
      'Thermostat contacts: volts across it while closed, by a qualified person',
      isGas(about)
        ? 'Flame: does it drop out in a heating leg?'
        : 'House voltage while the machine heats',
      'Probe: fixed in the centre of the outlet?',
    ],
  },
};

function driftingSentences(finding: Finding, { unit }: About): string[] {
  const said: string[] = [];
  const slopeK = numberOf(finding, 'slopePerCycleK');
  const slopeUK = numberOf(finding, 'slopePerCycleUK');
  if (slopeK !== null && slopeUK !== null) {
    said.push(
      `They move by ${formatStep(slopeK, unit)} a cycle, give or take ${formatStep(slopeUK, unit)}.`,
    );
  }
  const totalK = numberOf(finding, 'totalK');
  const toleranceK = numberOf(finding, 'toleranceK');
  if (totalK !== null && toleranceK !== null) {
    said.push(
      `${formatStep(Math.abs(totalK), unit)} in all, where the tolerance is ${formatStep(toleranceK, unit)}.`,
    );
  }
  said.push(
    'A sound thermostat repeats. This is consistent with something that changes as it warms.',
  );
  return said;
}

function driftingCauses(about: About): Cause[] {
  return [
    {
      cause: isGas(about)
        ? 'Relay or valve that lets go later each time'
        : 'Heater relay that opens later each time',
      why: 'Its delay grows as it warms; heat runs on past the thermostat’s click.',
      settles: 'Time from click to peak, cycle by cycle.',
    },
    {
      cause: 'Thermostat disc that tires or creeps',
      why: 'The opening point moves with each cycle.',
      settles: 'A heated bench check, several times over.',
    },
    {
      cause: 'Airflow that changes during the run',
      why: 'Lint that moves, or a blower wheel that slips when warm, changes how far the air runs ahead.',
      settles: 'Air at the outlet at the start and at the end.',
    },
  ];
}

function scatteredSentences(finding: Finding, { unit }: About): string[] {
  const sdK = numberOf(finding, 'sdK');
  const allowedK = numberOf(finding, 'allowedK');
  const numbers =
    sdK === null || allowedK === null
      ? []
      : [
          `They vary by ${formatStep(sdK, unit)} (standard deviation), where ${formatStep(allowedK, unit)} is allowed.`,
        ];
  return [
    ...numbers,
    'A sound thermostat repeats. This is consistent with a contact that comes and goes.',
  ];
}

function scatteredCauses(about: About): Cause[] {
  return [
    {
      cause: 'Loose or burnt terminal in the heat circuit',
      why: 'Heat drops out on its own and comes back.',
      settles: 'Discoloured spade; volt drop under load, by a qualified person.',
    },
    {
      cause: 'Pitted thermostat contacts',
      why: 'The disc snaps at one temperature, the contacts part at another.',
      settles: 'A heated bench check, several times over.',
    },
    isGas(about)
      ? {
          cause: 'Flame that drops out',
          why: 'The burner stops before the thermostat asks.',
          settles: 'Watch the port through a heating leg.',
        }
      : {
          cause: 'House voltage that dips',
          why: 'Heat goes with the square of the voltage.',
          settles: 'Log the supply while it heats.',
        },
    {
      cause: 'Probe that moved',
      why: 'The outlet is hotter in the middle than at its edge.',
      settles: 'Fix the probe and run again.',
    },
  ];
}
