import { guardMark, guardReading, startGuard } from '../analysis/guard/guard.ts';
import type { GuardSetup, GuardState } from '../analysis/guard/guard-state.ts';
import { celsiusOf } from './celsius-of.ts';
import type { HandRun } from './replay-run.ts';
import type { RunEvent } from './run-event.ts';

/** The guard as it stands at the end of a run, and the last moment that it was told of. */
export type GuardSoFar = { state: GuardState; toldS: number };

/** The guard told of everything that stands in the run, in order of time. */
export function guardOfRun(run: HandRun, setup: GuardSetup): GuardSoFar {
  const told = [...run.readings, ...run.marks].sort((a, b) => a.atS - b.atS);
  let soFar: GuardSoFar = { state: startGuard(setup), toldS: -Infinity };
  for (const each of told) {
    soFar =
      'kind' in each
        ? tellMark(soFar, each)
        : tellReading(soFar, each.atS, celsiusOf(each, run.start.unit));
  }
  return soFar;
}

/**
 * The guard after one more event: constant work for a reading or a mark that comes last, all over again where the past
 * was changed.
 *
 * @param run with the event in it
 */
export function guardAfter(soFar: GuardSoFar, event: RunEvent, run: HandRun): GuardSoFar {
  const isLast = event.atS >= soFar.toldS;
  if (event.kind === 'reading' && isLast) {
    return tellReading(soFar, event.atS, celsiusOf(event, run.start.unit));
  }
  if (event.kind === 'mark' && isLast) return tellMark(soFar, { atS: event.atS, kind: event.mark });
  const changesPast = ['reading', 'mark', 'undo', 'correction'].includes(event.kind);
  return changesPast ? guardOfRun(run, soFar.state.setup) : soFar;
}

/** Two readings of one moment: the first stands. */
function tellReading({ state, toldS }: GuardSoFar, atS: number, tempC: number): GuardSoFar {
  const { track } = state;
  const lastS = track ? (track.doubted?.timeS ?? track.timeS) : -Infinity;
  if (atS <= lastS) return { state, toldS };
  return { state: guardReading(state, { timeS: atS, tempC }), toldS: atS };
}

function tellMark(
  { state }: GuardSoFar,
  { atS, kind }: Pick<HandRun['marks'][number], 'atS' | 'kind'>,
): GuardSoFar {
  return { state: guardMark(state, { timeS: atS, kind }), toldS: atS };
}
