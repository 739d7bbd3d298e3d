import { guardAt } from '#shared/analysis/guard/guard.ts';
import type { GuardSetup, GuardView } from '#shared/analysis/guard/guard-state.ts';
import type { MarkKind } from '#shared/analysis/series.ts';
import {
  compareClocks,
  elapsedS,
  reopenClock,
  startClock,
  type Now,
  type RunClock,
} from '#shared/recorder/clock.ts';
import { guardAfter, guardOfRun, type GuardSoFar } from '#shared/recorder/guard-run.ts';
import { isWorthKeeping } from '#shared/recorder/keep-rate.ts';
import { measuredInRun } from '#shared/recorder/measured-in-run.ts';
import { lastOfProbe, openGap } from '#shared/recorder/probe-gap.ts';
import { lastToTakeBack, replayRun, type HandRun } from '#shared/recorder/replay-run.ts';
import type { EndSetup, Measured, RunEvent, RunEventOf } from '#shared/recorder/run-event.ts';

type StampName = 'id' | 'runId' | 'n' | 'atS' | 'wallMs';
type WithoutStamp<Event> = Event extends RunEvent ? Omit<Event, StampName> : never;
/** What happened, without the stamp that the recorder gives it. */
export type Happening = WithoutStamp<RunEvent>;

export type RecorderParts = {
  /** Resolves once the event would survive a power cut. */
  keep: (event: RunEvent) => Promise<void>;
  newId: () => string;
  now: () => Now;
  guardSetup: (run: HandRun) => GuardSetup;
};

/** What the screen shows: only what already lies on the device. */
export type Recording = {
  run: HandRun;
  events: readonly RunEvent[];
  guard: GuardSoFar;
  /** Why the last thing was not kept, in words; null where it was. */
  problem: string | null;
};

export type Recorder = ReturnType<typeof openRecorder>;

/** The first event of a new run, kept before the recorder opens. */
export async function beginRun(
  { keep, newId, now }: Pick<RecorderParts, 'keep' | 'newId' | 'now'>,
  start: Omit<RunEventOf<'start'>, StampName | 'kind'>,
  downMonoMs: number,
): Promise<RunEvent> {
  const { monoMs, wallMs } = now();
  const event: RunEvent = {
    ...start,
    kind: 'start',
    id: newId(),
    runId: newId(),
    n: 0,
    atS: 0,
    wallMs: Math.round(wallMs - (monoMs - downMonoMs)),
  };
  await keep(event);
  return event;
}

/**
 * A run as it goes on. Events are kept one after the other; each is on the device before it is in `recording`.
 *
 * @param kept the run's events as they lie on the device, beginning with its start
 * @param isNew its start was kept by this page a moment ago: the run's time is that of this page's own clock
 * @throws {RangeError} the events make no run
 */
export function openRecorder(parts: RecorderParts, kept: readonly RunEvent[], isNew: boolean) {
  let recording = recordingOf(kept, parts);
  let clock = openClock();
  let queue: Promise<unknown> = Promise.resolve();
  let said = recording.run.guard.at(-1)?.says ?? 'quiet';
  const listeners = new Set<() => void>();

  function openClock(): RunClock {
    const now = parts.now();
    const { last } = recording.run;
    if (!isNew) return reopenClock(last, now).clock;
    const sinceStartMs = now.wallMs - last.wallMs;
    return startClockAt(now, sinceStartMs);
  }

  function show(next: Recording): void {
    recording = next;
    for (const tell of listeners) tell();
  }

  function atNow(): number {
    return elapsedS(clock, parts.now().monoMs);
  }

  /** What the phone's clock said at that second: a run that is opened again goes on from both. */
  function wallAt(atS: number): number {
    const { monoMs, wallMs } = parts.now();
    return wallMs - (elapsedS(clock, monoMs) - atS) * 1000;
  }

  /** @returns whether it was kept */
  function record(happening: Happening, atS = atNow()): Promise<boolean> {
    return inTurn(() => keepNext(happening, atS));
  }

  /** Once all that was asked for before is kept or refused. */
  function inTurn<Kept>(keep: () => Promise<Kept>): Promise<Kept> {
    const kept = queue.then(keep);
    queue = kept;
    return kept;
  }

  /** A silence of the live probe is written down when it is over: when the probe reads again, or the run ends. */
  async function closeGap(atS: number): Promise<void> {
    const gap = openGap(recording.run, atS);
    if (gap) await keepNext({ kind: 'probe-gap', ...gap }, atS);
  }

  async function keepLive(measured: Measured, atS: number): Promise<boolean> {
    const { run } = recording;
    const lastS = lastOfProbe(run)?.atS ?? -Infinity;
    if (run.end !== null || run.isThrownAway) return false;
    if (!isWorthKeeping(atS - lastS, run.last.n)) return false;
    await closeGap(atS);
    const reading = measuredInRun(measured, run.start.unit);
    return keepNext({ kind: 'reading', from: 'probe', ...reading }, atS);
  }

  async function keepNext(happening: Happening, atS: number): Promise<boolean> {
    const { run } = recording;
    // Nothing follows a run's end: the shop would turn it down, and the run could not be let go of here.
    if (run.end !== null || run.isThrownAway) return false;
    const event: RunEvent = {
      ...happening,
      id: parts.newId(),
      runId: run.start.runId,
      n: run.last.n + 1,
      atS,
      wallMs: wallAt(atS),
    };
    try {
      await parts.keep(event);
    } catch (error) {
      show({ ...recording, problem: error instanceof Error ? error.message : String(error) });
      return false;
    }
    show(grown(recording, event));
    if (event.kind !== 'guard') noteGuard(recording.guard.state, atS);
    return true;
  }

  /** What the guard began to say is part of the run. */
  function noteGuard({ says, why }: GuardView, atS: number): void {
    if (says === said) return;
    said = says;
    void record({ kind: 'guard', says, why: why ?? '' }, atS);
  }

  return {
    recording: () => recording,
    subscribe(tell: () => void): () => void {
      listeners.add(tell);
      return () => void listeners.delete(tell);
    },
    record,

    /** Seconds of the run at a moment of the page's monotonic clock; now, where none is given. */
    at: (monoMs: number = parts.now().monoMs) => Math.max(0, elapsedS(clock, monoMs)),

    /** What the guard says as time goes on without a reading. */
    guardAt: (atS: number): GuardView => guardAt(recording.guard.state, atS),

    /** Compares the clocks, and heeds the guard; called a few times a second and whenever the page comes back. */
    compare(wasSeen: boolean): void {
      const compared = compareClocks(clock, parts.now(), wasSeen);
      clock = compared.clock;
      const { found } = compared;
      if (found?.kind === 'clock-step') void record(found);
      if (found?.kind === 'asleep') void record({ kind: 'asleep', fromS: found.fromS }, found.toS);
      noteGuard(guardAt(recording.guard.state, atNow()), atNow());
    },

    /** Said once after a reload: from the last event on only the phone's clock measured. */
    noteReopened(): void {
      if (!isNew) void record({ kind: 'asleep', fromS: recording.run.last.atS });
    },

    read: (temp: number, atS: number) => record({ kind: 'reading', temp, from: 'hand' }, atS),
    /** A live probe's reading, at the moment that it arrived. @returns whether it was kept: of a fast probe not all are */
    readLive: (measured: Measured, atS: number) => inTurn(() => keepLive(measured, atS)),
    mark: (mark: MarkKind, atS: number, text: string | null = null) =>
      record({ kind: 'mark', mark, text }, atS),
    correct: (of: string, temp: number) => record({ kind: 'correction', of, temp }),
    end(label: string, setup: EndSetup): Promise<boolean> {
      const atS = atNow();
      return inTurn(async () => {
        await closeGap(atS);
        return keepNext({ kind: 'end', label, setup }, atS);
      });
    },

    /** Takes the newest thing back, also one that is being kept just now. @returns what it was; null: nothing was */
    undo(): Promise<RunEvent | null> {
      const atS = atNow();
      return inTurn(async () => {
        const last = lastToTakeBack(recording.events);
        return last && (await keepNext({ kind: 'undo', takes: last.id }, atS)) ? last : null;
      });
    },

    /** Everything that was asked for so far is on the device, or was refused. */
    settled: () => queue.then(() => undefined),
  };
}

function startClockAt(now: Now, sinceStartMs: number): RunClock {
  const { baseMonoMs, last } = startClock(now);
  return { baseS: sinceStartMs / 1000, baseMonoMs, last };
}

function recordingOf(events: readonly RunEvent[], { guardSetup }: RecorderParts): Recording {
  const run = replayRun(events);
  if (!run) throw new RangeError('these events make no run');
  return { run, events, guard: guardOfRun(run, guardSetup(run)), problem: null };
}

function grown(recording: Recording, event: RunEvent): Recording {
  const events = [...recording.events, event];
  const run = replayRun(events);
  if (!run) throw new RangeError('these events make no run');
  return { run, events, guard: guardAfter(recording.guard, event, run), problem: null };
}
