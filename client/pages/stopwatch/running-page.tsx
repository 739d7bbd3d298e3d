import { Suspense, useEffect, useState, useSyncExternalStore } from 'react';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { MarkKind } from '#shared/analysis/series.ts';
import type { EndSetup } from '#shared/recorder/run-event.ts';
import { celsiusOf } from '#shared/recorder/celsius-of.ts';
import { isProbeReading } from '#shared/recorder/probe-gap.ts';
import { Announcer } from './announcer.tsx';
import { ClockFace } from './clock-face.tsx';
import { Counter } from './counter.tsx';
import { counterWords } from './counter-words.ts';
import { asByHand, formatAt, formatReading, formatTyped } from './format-elapsed.ts';
import { FocusedHeading } from './focused-heading.tsx';
import { GuardPanel, type GuardFacts } from './guard-panel.tsx';
import { HaltPanel } from './halt-panel.tsx';
import { Keypad } from './keypad.tsx';
import { canReachProbe, followLive, ProbeLine } from './lazy-live.tsx';
import { EndPanel, RunPanel } from './lazy-panels.tsx';
import { LiveStrip } from './live-strip.tsx';
import { useLiveStrip } from './use-live-strip.ts';
import { MarksPanel } from './marks-panel.tsx';
import type { Preferences } from './preferences.ts';
import type { Recorder } from './recorder.ts';
import { RunTop } from './run-top.tsx';
import type { Sources } from './sources.ts';
import { vibrate, VIBRATIONS, type Sounds } from './sounds.ts';
import { useAlarm, useBeat } from './use-alarm.ts';
import { useEntry } from './use-entry.ts';
import { useKeyboard } from './use-keyboard.ts';
import { useTicking } from './use-ticking.ts';

export type RunningPageProps = {
  recorder: Recorder;
  sources: Sources;
  sounds: Sounds;
  preferences: Preferences;
  onPrefer: (preferences: Preferences) => void;
};

type Slip = { kind: 'marks'; atS: number } | { kind: 'run' } | { kind: 'end' } | null;

/** A run being taken: paper above, keys below. */
export function RunningPage({
  recorder,
  sources,
  sounds,
  preferences,
  onPrefer,
}: RunningPageProps) {
  const { run, problem } = useSyncExternalStore(recorder.subscribe, recorder.recording);
  const nowS = useTicking(recorder);
  const [slip, setSlip] = useState<Slip>(null);
  const [said, setSaid] = useState('');
  const view = recorder.guardAt(nowS);
  const isHalt = view.says === 'cut-heat' || view.says === 'unplug';
  const isLive = isProbeReading(run, nowS);
  const wallAtS = view.says === 'quiet' ? null : (view.forecast?.highLimit?.likelyS ?? null);
  const strip = useLiveStrip(run, wallAtS, sources.machine);
  const facts = guardFacts(recorder, sources, nowS);
  const entry = useEntry({ recorder, run, onKept: handleKept, onTakenBack: setSaid });
  useAlarm(view.says, sounds, preferences);
  // While the probe reads, nobody is asked to.
  const rhythm = isLive ? null : preferences.rhythm;
  useBeat(nowS, rhythm, sounds, preferences);
  useEffect(() => followLive(recorder), [recorder]);
  const shown = isHalt && slip?.kind !== 'end' ? null : slip;

  function handleKept(): void {
    if (preferences.hasSound) sounds.kept();
    if (preferences.hasVibration) vibrate(VIBRATIONS.kept);
    const last = recorder.recording().run.readings.findLast(({ from }) => from === 'hand');
    if (last) setSaid(keptWords(last.temp, last.atS, recorder.recording().run.readings.length));
  }

  function mark(kind: MarkKind, atS: number, text: string | null = null): void {
    sounds.wake();
    void recorder.mark(kind, atS, text).then((isKept) => {
      if (isKept) setSaid(`Marked, ${formatAt(atS)}`);
      if (isKept && preferences.hasVibration) vibrate(VIBRATIONS.kept);
    });
  }

  const keys = {
    figure(figure: string, downMonoMs: number) {
      sounds.wake();
      entry.figure(figure, downMonoMs);
    },
    same: entry.same,
    other: entry.other,
    click: (downMonoMs: number) => mark('click', recorder.at(downMonoMs)),
    heatOff: (downMonoMs: number) => mark('heat-off', recorder.at(downMonoMs)),
    undo() {
      if (entry.undo()) return;
      void recorder.undo().then((taken) => {
        if (taken) setSaid(`Taken back, ${formatAt(taken.atS)}`);
      });
    },
    marks: (downMonoMs: number) => setSlip({ kind: 'marks', atS: recorder.at(downMonoMs) }),
  };
  useKeyboard(preferences.hasKeyboard, {
    figure: keys.figure,
    byLetter: {
      ...{ c: keys.click, h: keys.heatOff, s: keys.same, o: keys.other, m: keys.marks },
      ...{ backspace: keys.undo, '-': keys.same, '.': keys.same },
    },
  });

  const words = counterWords({ entry: entry.entry, run, nowS, view, isLive });
  const last = run.readings.at(-1);
  const { free } = entry.entry;
  return (
    <main
      id="main"
      className={`sw sw-says-${view.says} ${preferences.hand === 'left' ? 'sw-left' : ''} ${run.start.hasTenths ? 'sw-tenths' : ''}`}
    >
      <FocusedHeading className="sr-only">
        {`${sources.machine.make} ${sources.machine.model}: a run is being taken`}
      </FocusedHeading>
      <RunTop
        run={run}
        machine={`${sources.machine.make} ${sources.machine.model}`}
        visitId={run.start.visitId}
        onRun={() => setSlip({ kind: 'run' })}
        onFinish={() => setSlip({ kind: 'end' })}
      />
      {isHalt ? <HaltPanel {...facts} /> : <ClockFace timeS={nowS} rhythm={rhythm} />}
      <LiveStrip
        strip={strip}
        unit={run.start.unit}
        figure={last ? formatReading(last, run.start.hasTenths) : null}
      />
      {!isHalt && <GuardPanel {...facts} />}
      <section className="sw-deck" aria-label="Keys">
        {problem && (
          <p role="alert" className="sw-problem">
            {problem}
          </p>
        )}
        {canReachProbe && (
          <Suspense>
            <ProbeLine
              {...{ run, nowS }}
              onAnswer={() => setSlip({ kind: 'run' })}
              onSay={setSaid}
            />
          </Suspense>
        )}
        <Counter {...words} onMark={keys.marks} />
        <Keypad
          same={last ? formatTyped(asByHand(last, run.start), run.start.hasTenths) : null}
          free={
            free && {
              canMinus: free.text === '',
              canPoint: /^-?[0-9]+$/.test(free.text),
              canKeep: /[0-9]$/.test(free.text),
            }
          }
          isHot={isHalt}
          onFigure={keys.figure}
          onSame={keys.same}
          onOther={keys.other}
          onClickHeard={keys.click}
          onHeatOff={keys.heatOff}
          onUndo={keys.undo}
        />
      </section>
      <Announcer said={said} facts={facts} />
      {shown?.kind === 'marks' && (
        <MarksPanel
          atS={shown.atS}
          onClose={() => setSlip(null)}
          onMark={(kind, text) => {
            mark(kind, shown.atS, text);
            setSlip(null);
          }}
        />
      )}
      <Suspense>
        {shown?.kind === 'run' && (
          <RunPanel
            run={run}
            preferences={preferences}
            onPrefer={onPrefer}
            onCorrect={(id, temp) => void recorder.correct(id, temp)}
            onThrowAway={() => void recorder.record({ kind: 'thrown-away' })}
            onClose={() => setSlip(null)}
          />
        )}
        {shown?.kind === 'end' && (
          <EndPanel
            run={run}
            probes={sources.probes}
            onClose={() => setSlip(null)}
            onEnd={(label: string, setup: EndSetup) => void recorder.end(label, setup)}
          />
        )}
      </Suspense>
    </main>
  );
}

function keptWords(temp: number, atS: number, count: number): string {
  return `Kept, ${formatTyped(temp)} at ${formatAt(atS)}, ${count === 1 ? '1 reading' : `${count} readings`}`;
}

function guardFacts(recorder: Recorder, { machine }: Sources, nowS: number): GuardFacts {
  const { run, guard } = recorder.recording();
  const last = run.readings.at(-1);
  return {
    view: recorder.guardAt(nowS),
    nowS,
    unit: run.start.unit,
    highLimitC: (guard.state.setup.rating ?? DEFAULT_RATING).highLimitC,
    ceilingC: (guard.state.setup.rating ?? DEFAULT_RATING).ceilingC,
    lastC: last ? celsiusOf(last, run.start.unit) : null,
    isGas: machine.fuel === 'gas',
    isHeatOff: guard.state.off !== null,
  };
}
