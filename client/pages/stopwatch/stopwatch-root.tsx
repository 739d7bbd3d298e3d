import { lazy, Suspense, useEffect, useState, useSyncExternalStore } from 'react';
import { replayRun } from '#shared/recorder/replay-run.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { ApiError } from '../../api/http.ts';
import { Key } from '../../components/key.tsx';
import { holdUpdates } from '../../device/recording-hold.ts';
import { newId } from '../../device/new-id.ts';
import { startDevice } from '../../device/start-device.ts';
import { keepThing, onAnswers, serverClock, thisDevice } from '../../device/this-device.ts';
import { guardSetupOf } from './judge-run.ts';
import { findRunning, keepRunEvent, letGoOfRun, listKeptRuns } from '../../device/kept-runs.ts';
import { loadPreferences, keepPreferences } from './preferences.ts';
import { fetchPanels } from './lazy-panels.tsx';
import { beginRun, openRecorder, type Recorder } from './recorder.ts';
import { RunningPage } from './running-page.tsx';
import { createSounds } from './sounds.ts';
import { findSession, findSources, type Sources } from './sources.ts';
import { StartPage, type NewRun } from './start-page.tsx';
import { useOnlyTab } from './use-only-tab.ts';
import './stopwatch.css';

const OutcomePage = lazy(async () => ({
  default: (await import('./outcome-page.tsx')).OutcomePage,
}));

startDevice();
const sounds = createSounds();
const now = () => ({ monoMs: performance.now(), wallMs: Date.now() });

/** What is known once the page is open. */
type Opened = {
  sources: Sources;
  /** The run that goes on, if there is one. */
  recorder: Recorder | null;
  isTicked: boolean;
};
type Opening =
  { state: 'opening' } | { state: 'failed'; words: string } | { state: 'open'; opened: Opened };

/** The stopwatch, by itself: no router and no schema library come with it. */
export function StopwatchRoot() {
  const tab = useOnlyTab();
  const [page, setPage] = useState<Opening>({ state: 'opening' });
  useEffect(() => {
    if (tab !== 'mine') return;
    opening ??= open();
    opening
      .then((opened) => setPage({ state: 'open', opened }))
      .catch((error: unknown) => setPage({ state: 'failed', words: wordsOf(error) }));
  }, [tab]);

  if (tab === 'taken') {
    return (
      <Plain head="A run is being taken in another tab.">
        <p className="pb-4 text-say">
          Readings are taken in one place only, so that nothing is doubled. Close the other tab, and
          this one goes on.
        </p>
      </Plain>
    );
  }
  if (page.state === 'failed') {
    return (
      <Plain head="The stopwatch did not open." isAlert>
        <p className="pb-4 text-say">{page.words}</p>
        <Key size="site" onClick={() => window.location.reload()}>
          Try again
        </Key>
      </Plain>
    );
  }
  if (page.state === 'opening') return <Plain head="Opening the stopwatch…" />;
  return <Stopwatch opened={page.opened} />;
}

/** Once a page: opening a run writes down that it was opened again. */
let opening: Promise<Opened> | null = null;

async function open(): Promise<Opened> {
  const visitId = window.location.pathname.split('/')[2] ?? '';
  const session = await findSession().catch(signInFirst);
  const runs = await listKeptRuns();
  const running = findRunning(runs);
  letGoOfOver(runs);
  const [start] = running ?? [];
  // A run that goes on is opened wherever it was begun.
  const sources = await findSources(session, start?.kind === 'start' ? start.visitId : visitId);
  const recorder = running && recorderOf(running, false, sources);
  recorder?.noteReopened();
  const { safetyTickedAtMs } = sources.visit;
  return { sources, recorder, isTicked: safetyTickedAtMs !== null || (await wasTicked(visitId)) };
}

/** The server knows this session no longer: the sign-in leads back here. */
function signInFirst(error: unknown): never {
  if (error instanceof ApiError && error.status === 401) {
    window.location.replace(`/sign-in?to=${encodeURIComponent(window.location.pathname)}`);
  }
  throw error;
}

/** Runs that are over and sent whole need no room here any more. */
function letGoOfOver(runs: RunEvent[][]): void {
  for (const events of runs) {
    const run = replayRun(events);
    if (run && (run.end ?? run.isThrownAway)) void letGoOfRun(run.start.runId);
  }
}

/** Ticked on this device and not sent yet. */
async function wasTicked(visitId: string): Promise<boolean> {
  const person = thisDevice.person();
  const unsent = person ? await thisDevice.things.list(person.id, 'unsent') : [];
  return unsent.some(
    ({ kind, payload }) =>
      kind === 'safety-ticks' &&
      typeof payload === 'object' &&
      payload !== null &&
      'visitId' in payload &&
      payload.visitId === visitId,
  );
}

function Stopwatch({ opened }: { opened: Opened }) {
  const { sources } = opened;
  const [isTicked, setIsTicked] = useState(opened.isTicked);
  const [problem, setProblem] = useState<string | null>(null);
  const [preferences, setPreferences] = useState(loadPreferences);
  const [recorder, setRecorder] = useState(opened.recorder);
  useEffect(fetchWhatComesLater, []);

  function handlePrefer(next: typeof preferences): void {
    keepPreferences(next);
    setPreferences(next);
  }
  function handleTick(): void {
    const tick = { visitId: sources.visit.id, tickedAtMs: Date.now() };
    keepThing('safety-ticks', tick)
      .then(() => setIsTicked(true))
      .catch((error: unknown) => setProblem(wordsOf(error)));
  }
  function handleStart(run: NewRun, downMonoMs: number): void {
    sounds.wake();
    beginRun({ keep: keepRunEvent, newId, now }, run, downMonoMs)
      .then((start) => setRecorder(recorderOf([start], true, sources)))
      .catch((error: unknown) => setProblem(wordsOf(error)));
  }

  if (recorder) {
    return (
      <OfRun
        recorder={recorder}
        sources={sources}
        preferences={preferences}
        onPrefer={handlePrefer}
        onAnother={() => setRecorder(null)}
      />
    );
  }
  return (
    <StartPage
      sources={sources}
      isTicked={isTicked}
      runs={sources.visit.runs.length}
      problem={problem}
      preferences={preferences}
      onPrefer={handlePrefer}
      onTick={handleTick}
      onStart={handleStart}
    />
  );
}

function recorderOf(events: RunEvent[], isNew: boolean, sources: Sources): Recorder {
  const guardSetup = (run: Parameters<typeof guardSetupOf>[1]) => guardSetupOf(sources, run);
  return openRecorder({ keep: keepRunEvent, newId, now, guardSetup }, events, isNew);
}

type OfRunProps = {
  recorder: Recorder;
  sources: Sources;
  preferences: ReturnType<typeof loadPreferences>;
  onPrefer: (next: ReturnType<typeof loadPreferences>) => void;
  onAnother: () => void;
};

function OfRun({ recorder, sources, preferences, onPrefer, onAnother }: OfRunProps) {
  const { run } = useSyncExternalStore(recorder.subscribe, recorder.recording);
  const isOver = run.end !== null || run.isThrownAway;
  useEffect(() => (isOver ? undefined : holdUpdates()), [isOver]);
  useEffect(() => (isOver ? undefined : checkClock(recorder)), [isOver, recorder]);

  if (run.isThrownAway) {
    return (
      <Plain head="The run was thrown away.">
        <Key size="site" onClick={onAnother}>
          Take another
        </Key>
      </Plain>
    );
  }
  if (run.end) {
    return (
      <Suspense fallback={<Plain head="Looking at the run…" />}>
        <OutcomePage run={run} sources={sources} onAnother={onAnother} />
      </Suspense>
    );
  }
  return (
    <RunningPage
      recorder={recorder}
      sources={sources}
      sounds={sounds}
      preferences={preferences}
      onPrefer={onPrefer}
    />
  );
}

/** As soon as the page stands, so that neither the run nor its end needs a network. */
function fetchWhatComesLater(): void {
  const quietly = () => {};
  fetchPanels();
  import('./outcome-page.tsx').catch(quietly);
  import('#shared/analysis/analyse-run.ts').catch(quietly);
}

const CHECK_EVERY_MS = 60_000;

/** What the server's clock says is put beside the run's own, a minute apart at least. */
function checkClock(recorder: Recorder): () => void {
  let lastMs = -Infinity;
  return onAnswers(() => {
    const server = serverClock.last();
    if (!server || server.monotonicMs - lastMs < CHECK_EVERY_MS) return;
    lastMs = server.monotonicMs;
    const atS = recorder.at(server.monotonicMs);
    void recorder.record({ kind: 'clock-check', serverMs: Math.round(server.serverMs) }, atS);
  });
}

type PlainProps = { head: string; isAlert?: boolean; children?: React.ReactNode };

function Plain({ head, isAlert = false, children }: PlainProps) {
  const visit = window.location.pathname.split('/').slice(0, 3).join('/');
  return (
    <main id="main" className="mx-auto min-h-dvh max-w-site px-4 pt-6">
      <h1 role={isAlert ? 'alert' : 'status'} className="pb-3 font-serif text-page">
        {head}
      </h1>
      {children}
      <a className="word" href={visit}>
        Back to the visit
      </a>
    </main>
  );
}

function wordsOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
