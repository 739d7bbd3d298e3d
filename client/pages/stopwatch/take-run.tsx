import { lazy, Suspense, useEffect, useSyncExternalStore } from 'react';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { Key } from '../../components/key.tsx';
import { keepRunEvent } from '../../device/kept-runs.ts';
import { newId } from '../../device/new-id.ts';
import { holdUpdates } from '../../device/recording-hold.ts';
import { onAnswers, serverClock } from '../../device/this-device.ts';
import { deviceEngine } from '../../device/engine/analyse-on-device.ts';
import { guardSetupOf } from './judge-run.ts';
import { fetchPanels } from './lazy-panels.tsx';
import { PlainPage } from './plain-page.tsx';
import type { Preferences } from './preferences.ts';
import { beginRun, openRecorder, type Recorder } from './recorder.ts';
import { RunningPage } from './running-page.tsx';
import type { Sounds } from './sounds.ts';
import type { Sources } from './sources.ts';
import type { NewRun } from './start-page.tsx';

const OutcomePage = lazy(async () => ({
  default: (await import('./outcome-page.tsx')).OutcomePage,
}));

const now = () => ({ monoMs: performance.now(), wallMs: Date.now() });

/** A new run: it is on the device before its clock is shown. @throws {KeepError} it was not kept */
export async function startRun(
  sources: Sources,
  run: NewRun,
  downMonoMs: number,
): Promise<Recorder> {
  const start = await beginRun({ keep: keepRunEvent, newId, now }, run, downMonoMs);
  return recorderOf([start], true, sources);
}

/** A run that was begun before this page was opened, which is written down in it. */
export function goOnWithRun(sources: Sources, events: RunEvent[]): Recorder {
  const recorder = recorderOf(events, false, sources);
  recorder.noteReopened();
  return recorder;
}

function recorderOf(events: RunEvent[], isNew: boolean, sources: Sources): Recorder {
  const guardSetup = (run: Parameters<typeof guardSetupOf>[1]) => guardSetupOf(sources, run);
  return openRecorder({ keep: keepRunEvent, newId, now, guardSetup }, events, isNew);
}

export type TakeRunProps = {
  recorder: Recorder;
  sources: Sources;
  sounds: Sounds;
  preferences: Preferences;
  onPrefer: (next: Preferences) => void;
  onAnother: () => void;
};

/** A run from its first second to its outcome. */
export function TakeRun(props: TakeRunProps) {
  const { recorder, sources, onAnother } = props;
  const { run } = useSyncExternalStore(recorder.subscribe, recorder.recording);
  const isOver = run.end !== null || run.isThrownAway;
  useEffect(() => (isOver ? undefined : holdUpdates()), [isOver]);
  useEffect(() => (isOver ? undefined : checkClock(recorder)), [isOver, recorder]);

  if (run.isThrownAway) {
    return (
      <PlainPage head="The run was thrown away.">
        <Key size="site" onClick={onAnother}>
          Take another
        </Key>
      </PlainPage>
    );
  }
  if (run.end) {
    return (
      <Suspense fallback={<PlainPage head="Looking at the run…" />}>
        <OutcomePage run={run} sources={sources} onAnother={onAnother} />
      </Suspense>
    );
  }
  return <RunningPage {...props} />;
}

/** As soon as the page stands, so that neither the run nor its end needs a network. */
export function fetchWhatComesLater(): void {
  const quietly = () => {};
  fetchPanels();
  import('./outcome-page.tsx').catch(quietly);
  deviceEngine.warmUp();
}

const CHECK_EVERY_MS = 60_000;
/** An answer that took longer says too little of the server's clock. */
const CHECK_WITHIN_MS = 1_000;

/** What the server's clock says is put beside the run's own, a minute apart at least, and after each span asleep. */
function checkClock(recorder: Recorder): () => void {
  let lastMs = -Infinity;
  return onAnswers(() => {
    const server = serverClock.last();
    const { events } = recorder.recording();
    const isToCheck = events.findLast(isOfClock)?.kind === 'asleep';
    if (!server || server.uMs > CHECK_WITHIN_MS) return;
    if (!isToCheck && server.monotonicMs - lastMs < CHECK_EVERY_MS) return;
    lastMs = server.monotonicMs;
    const atS = recorder.at(server.monotonicMs);
    void recorder.record({ kind: 'clock-check', serverMs: Math.round(server.serverMs) }, atS);
  });
}

function isOfClock({ kind }: RunEvent): boolean {
  return kind === 'asleep' || kind === 'clock-check';
}
