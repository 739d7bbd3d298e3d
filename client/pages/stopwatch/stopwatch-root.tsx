import { useEffect, useRef, useState, type ComponentType } from 'react';
import { replayRun } from '#shared/recorder/replay-run.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { ApiError } from '../../api/http.ts';
import { Key } from '../../components/key.tsx';
import { findRunning, letGoOfRun, listKeptRuns } from '../../device/kept-runs.ts';
import { startDevice } from '../../device/start-device.ts';
import { keepThing, thisDevice } from '../../device/this-device.ts';
import { PlainPage } from './plain-page.tsx';
import { loadPreferences, keepPreferences } from './preferences.ts';
import type { Recorder } from './recorder.ts';
import { createSounds } from './sounds.ts';
import { findSession, findSources, type Sources } from './sources.ts';
import { StartPage, type NewRun } from './start-page.tsx';
import type { TakeRunProps } from './take-run.tsx';
import { useOnlyTab } from './use-only-tab.ts';
import './stopwatch.css';

/** What a run needs comes behind the page that begins one: the cautions can be read meanwhile. */
const fetchTaking = () => import('./take-run.tsx');

startDevice();
const sounds = createSounds();

/** A run, and the page that takes it. */
type Taking = { recorder: Recorder; TakeRun: ComponentType<TakeRunProps> };

/** What is known once the page is open. */
type Opened = {
  sources: Sources;
  /** The run that goes on, if there is one. */
  taking: Taking | null;
  isTicked: boolean;
  /** How many runs of this visit are known: the next one is named by it. */
  runs: number;
};
type Opening =
  { state: 'opening' } | { state: 'failed'; words: string } | { state: 'open'; opened: Opened };

/** The stopwatch, by itself: no router and no schema library come with it. */
export function StopwatchRoot() {
  const tab = useOnlyTab();
  const [page, setPage] = useState<Opening>({ state: 'opening' });
  useEffect(() => {
    document.title = 'Stopwatch – Fusekeeper';
  }, []);
  useEffect(() => {
    if (tab !== 'mine') return;
    opening ??= open();
    opening
      .then((opened) => setPage({ state: 'open', opened }))
      .catch((error: unknown) => setPage({ state: 'failed', words: wordsOf(error) }));
  }, [tab]);

  if (tab === 'taken') {
    return (
      <PlainPage head="A run is being taken in another tab.">
        <p className="pb-4 text-say">
          Readings are taken in one place only, so that nothing is doubled. Close the other tab, and
          this one goes on.
        </p>
      </PlainPage>
    );
  }
  if (page.state === 'failed') {
    return (
      <PlainPage head="The stopwatch did not open." isAlert>
        <p className="pb-4 text-say">{page.words}</p>
        <Key size="site" onClick={() => window.location.reload()}>
          Try again
        </Key>
      </PlainPage>
    );
  }
  if (page.state === 'opening') return <PlainPage head="Opening the stopwatch…" />;
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
  const taking = running && (await goOn(sources, running));
  const isTicked = sources.visit.safetyTickedAtMs !== null || (await wasTicked(visitId));
  return { sources, taking, isTicked, runs: countRuns(sources.visit, runs) };
}

/** Those that the shop has, and those that lie here and have not come to it yet. */
function countRuns(visit: Sources['visit'], kept: RunEvent[][]): number {
  const ids = new Set(visit.runs.map(({ id }) => id));
  for (const events of kept) {
    const [start] = events;
    const isOfVisit = start?.kind === 'start' && start.visitId === visit.id;
    const isThrownAway = events.some(({ kind }) => kind === 'thrown-away');
    if (isOfVisit && !isThrownAway) ids.add(start.runId);
  }
  return ids.size;
}

async function goOn(sources: Sources, events: RunEvent[]): Promise<Taking> {
  const { TakeRun, goOnWithRun } = await fetchTaking();
  return { TakeRun, recorder: goOnWithRun(sources, events) };
}

/** @throws {Error} in words for the page: nothing was begun */
async function begin(sources: Sources, run: NewRun, downMonoMs: number): Promise<Taking> {
  const { TakeRun, startRun } = await fetchTaking().catch((error: unknown) => {
    const words = 'The stopwatch was not fetched whole. Reload the page where there is a network.';
    throw new Error(words, { cause: error });
  });
  return { TakeRun, recorder: await startRun(sources, run, downMonoMs) };
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
  const [taking, setTaking] = useState(opened.taking);
  const [runs, setRuns] = useState(opened.runs);
  const isStarting = useRef(false);
  useEffect(fetchTheRest, []);

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
    if (isStarting.current) return;
    isStarting.current = true;
    begin(sources, run, downMonoMs)
      .then((begun) => {
        setTaking(begun);
        setRuns(runs + 1);
      })
      .catch((error: unknown) => setProblem(wordsOf(error)))
      .finally(() => (isStarting.current = false));
  }

  const preferring = { preferences, onPrefer: handlePrefer };
  if (taking) {
    const { TakeRun, recorder } = taking;
    const onAnother = () => setTaking(null);
    return <TakeRun {...preferring} {...{ recorder, sources, sounds, onAnother }} />;
  }
  return (
    <StartPage
      {...preferring}
      sources={sources}
      isTicked={isTicked}
      runs={runs}
      problem={problem}
      onTick={handleTick}
      onStart={handleStart}
    />
  );
}

/** As soon as the page stands, so that a run can be taken without a network. A failure is told at the start. */
function fetchTheRest(): void {
  fetchTaking()
    .then(({ fetchWhatComesLater }) => fetchWhatComesLater())
    .catch(() => {});
}

function wordsOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
