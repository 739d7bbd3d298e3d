import { gapAfterS, lastOfProbe, openGap } from '#shared/recorder/probe-gap.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { formatMoment } from '#shared/wording/format.ts';
import type { Silence } from '../../../device/live/live-probe.ts';
import type { DeskView } from './create-live-desk.ts';

/** What stands on the deck while a live probe is wanted and does not simply read; `does`: what its word does. */
export type ProbeTrouble = {
  words: string;
  /** The same without a running count, for a screen reader. */
  said: string;
  does: { words: string; act: 'answer' | 'try-now' | 'reconnect' } | null;
};

const BY_HAND = 'Readings by hand go on counting.';

/** @returns null where the probe reads, or none is wanted */
export function probeTrouble(
  { probe, problem, isLetGo }: DeskView,
  run: Pick<HandRun, 'readings'>,
  nowS: number,
): ProbeTrouble | null {
  const last = lastOfProbe(run);
  if (problem !== null && !probe) return plain(problem, 'Try again', 'reconnect');
  if (!probe || probe.state.is === 'ended') {
    const why = probe?.state.is === 'ended' ? probe.state.why : null;
    if (why) return plain(why, 'Reconnect', 'reconnect');
    return last && openGap(run, nowS) && !isLetGo ? lostWords(nowS - last.atS, 'reconnect') : null;
  }
  if (probe.state.is === 'asks') return plain('The probe needs an answer.', 'Answer', 'answer');
  if (probe.state.is === 'connecting') return plain(`Connecting to ${probe.name}…`);
  if (probe.state.is === 'lost') {
    return last
      ? lostWords(nowS - last.atS, 'try-now')
      : plain(`${probe.name} is out of reach; it is tried again.`, 'Try now', 'try-now');
  }
  const isSilent = last === null ? nowS > gapAfterS(run) : openGap(run, nowS) !== null;
  if (!isSilent) return null;
  return plain(`${silenceWords(probe.silence)} ${BY_HAND}`);
}

/** What came, and held no temperature. */
export function silenceWords({ count, why }: Silence): string {
  switch (count === 0 ? null : why) {
    case 'not-known':
      return 'The probe says that it knows no temperature: look at its sensor.';
    case 'out-of-range':
      return 'The probe reads beyond what it can measure.';
    case 'implausible':
      return 'What the probe says can be no exhaust: look at its sensor.';
    case 'malformed':
      return 'What the probe says cannot be read.';
    case 'unread':
      return 'Lines come that hold no temperature.';
    case null:
      return 'The probe is silent.';
  }
}

function lostWords(sinceS: number, act: 'try-now' | 'reconnect'): ProbeTrouble {
  return {
    words: `Probe lost ${formatMoment(Math.floor(sinceS))} ago. ${BY_HAND}`,
    said: `Probe lost. ${BY_HAND}`,
    does: { words: act === 'try-now' ? 'Try now' : 'Reconnect', act },
  };
}

type Act = NonNullable<ProbeTrouble['does']>['act'];

function plain(words: string, does?: string, act?: Act): ProbeTrouble {
  return { words, said: words, does: does && act ? { words: does, act } : null };
}
