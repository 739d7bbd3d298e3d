import { isRunEvent, type RunEvent } from '#shared/recorder/run-event.ts';
import { replayRun } from '#shared/recorder/replay-run.ts';
import type { KeptThing } from './device-db.ts';
import { keepThing, letGoOfChain, thingsOfChain, thisDevice } from './this-device.ts';

const CHAIN = 'run:';

/** Resolves once the event would survive a power cut. @throws {KeepError} it was not kept */
export async function keepRunEvent(event: RunEvent): Promise<void> {
  await keepThing('run-event', event, { chain: CHAIN + event.runId });
}

/** Everything of one run that lies here, sent or not, in order. */
export function thingsOfRun(runId: string): Promise<KeptThing[]> {
  return thingsOfChain(CHAIN + runId);
}

/** Lets go of a run that the server has whole; one with something unsent stays. */
export function letGoOfRun(runId: string): Promise<boolean> {
  return letGoOfChain(CHAIN + runId);
}

/** The runs of this person that lie on the device, sent or not, each as its events in order. */
export async function listKeptRuns(): Promise<RunEvent[][]> {
  const person = thisDevice.person();
  if (!person) return [];
  const things = await thisDevice.things.listChains(person.id, CHAIN);
  const byRun = new Map<string, RunEvent[]>();
  for (const { payload } of things) {
    if (!isRunEvent(payload)) continue;
    const events = byRun.get(payload.runId);
    if (events) events.push(payload);
    else byRun.set(payload.runId, [payload]);
  }
  return [...byRun.values()];
}

/** The one that was begun and not ended; the newest, should there be two. */
export function findRunning(runs: RunEvent[][]): RunEvent[] | null {
  const going = runs.filter((events) => {
    const run = replayRun(events);
    return run !== null && run.end === null && !run.isThrownAway;
  });
  const startedAtMs = (events: RunEvent[]) => events[0]?.wallMs ?? 0;
  return going.sort((a, b) => startedAtMs(b) - startedAtMs(a))[0] ?? null;
}
