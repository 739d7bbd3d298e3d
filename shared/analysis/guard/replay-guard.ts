import type { Mark, Series } from '../series.ts';
import { emptyState, takeMark, takeReading } from './follow-guard.ts';
import type { GuardSays, GuardSetup, GuardState, GuardWhy } from './guard-state.ts';

/** The guard's words changed at this time of the run. */
export type GuardChange = { timeS: number; says: GuardSays; why: GuardWhy | null };

export type GuardReplay = {
  /** First `cut-heat`; null where it never came. */
  alarmS: number | null;
  /** In order of time; before the first the guard is quiet. */
  changes: GuardChange[];
};

/**
 * What the guard would have said while a record was made: the same steps as guardReading and guardMark, without their
 * copies and forecasts.
 *
 * @param series as read, spikes and all
 */
export function replayGuard(series: Series, marks: Mark[], setup: GuardSetup): GuardReplay {
  const { timesS, tempsC } = series;
  const state = emptyState(setup);
  const changes: GuardChange[] = [];
  const waiting = [...marks].sort((a, b) => a.timeS - b.timeS);
  let nextMark = 0;
  for (let i = 0; i < timesS.length; i++) {
    const timeS = timesS[i]!;
    while (nextMark < waiting.length && waiting[nextMark]!.timeS <= timeS) {
      takeMark(state, waiting[nextMark]!);
      noteChange(changes, state, waiting[nextMark]!.timeS);
      nextMark++;
    }
    takeReading(state, timeS, tempsC[i]!);
    noteChange(changes, state, timeS);
  }
  const alarm = changes.find(({ says }) => says === 'cut-heat');
  return { alarmS: alarm ? alarm.timeS : null, changes };
}

function noteChange(changes: GuardChange[], { says, why }: GuardState, timeS: number): void {
  const last = changes.at(-1);
  if (says === (last?.says ?? 'quiet') && why === (last?.why ?? null)) return;
  changes.push({ timeS, says, why });
}
