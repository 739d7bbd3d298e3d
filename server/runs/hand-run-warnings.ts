import type { HandRun } from '#shared/recorder/replay-run.ts';
import { formatMoment, formatSpan } from '#shared/wording/format.ts';
import type { Run } from './run.ts';

type Warning = Run['reading']['warnings'][number];

const GUARD_WORDS = {
  quiet: 'The guard was quiet again',
  watch: 'The guard said: watch',
  'cut-heat': 'The guard said: cut the heat',
  unplug: 'The guard said: pull the plug',
} as const;

/** What the run page tells of how a run was taken by hand: both values of a correction, the guard, the clock. */
export function warningsOf(run: HandRun): Warning[] {
  const unit = `°${run.start.unit}`;
  return [
    ...run.corrections.map(({ atS, was, now }) =>
      told(
        'corrected',
        `The reading at ${formatMoment(atS)} was typed as ${was} and put right to ${now} ${unit}`,
      ),
    ),
    ...(run.takenBack > 0 ? [told('taken-back', `${run.takenBack} taken back by Undo`)] : []),
    ...run.guard.map(({ atS, says }) =>
      told('guard', `${GUARD_WORDS[says]} at ${formatMoment(atS)}`),
    ),
    ...run.clock.map(clockWarning),
    ...run.steps.map(({ atS, stepS }) =>
      told(
        'clock-step',
        `The phone’s clock was set by ${formatSpan(Math.abs(stepS))} at ${formatMoment(atS)}; the run’s time did not follow`,
      ),
    ),
    ...run.probeGaps.map(({ fromS, toS }) =>
      told(
        'probe-gap',
        `The live probe was out of reach from ${formatMoment(fromS)} to ${formatMoment(toS)}`,
      ),
    ),
  ];
}

function clockWarning({ fromS, toS, check, longerS }: HandRun['clock'][number]): Warning {
  const span = `From ${formatMoment(fromS)} to ${formatMoment(toS)} time is from the phone’s clock`;
  const checked = {
    unchecked: 'not checked',
    agrees:
      longerS === null
        ? 'it agreed with the server’s clock when the run was sent'
        : 'the server’s clock agrees',
    differs: `the server’s clock differs by ${formatSpan(Math.abs(longerS ?? 0))}`,
  };
  return told('phone-clock', `${span}; ${checked[check]}`);
}

function told(code: string, message: string): Warning {
  return { code, row: null, message: `${message}.` };
}
