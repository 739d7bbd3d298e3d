import { useEffect, useState } from 'react';
import { replayRun, type HandRun } from '#shared/recorder/replay-run.ts';
import { KeyLink } from '../components/key-link.tsx';
import { findRunning, listKeptRuns } from '../device/kept-runs.ts';
import { thisDevice } from '../device/this-device.ts';
import { spanWords } from '../format/when.ts';

/** A run that was begun on this device and goes on, with one tap back to it. */
export function RunningRun({ visitId }: { visitId?: string }) {
  const run = useRunning();
  const nowMs = useSecondsMs(run !== null);
  if (!run || (visitId !== undefined && run.start.visitId !== visitId)) return null;
  const elapsedS = run.last.atS + Math.max(0, nowMs - run.last.wallMs) / 1000;
  return (
    <div className="py-3">
      <KeyLink
        to={`/visits/${run.start.visitId}/stopwatch`}
        reloadDocument
        face="main"
        size="site"
        className="fig w-full"
      >
        Run going on: {spanWords(Math.floor(elapsedS))}
      </KeyLink>
    </div>
  );
}

function useRunning(): HandRun | null {
  const [run, setRun] = useState<HandRun | null>(null);
  useEffect(() => {
    let isHere = true;
    const look = () =>
      void listKeptRuns().then((runs) => {
        const running = findRunning(runs);
        if (isHere) setRun(running && replayRun(running));
      });
    look();
    const stop = thisDevice.subscribe(look);
    return () => {
      isHere = false;
      stop();
    };
  }, []);
  return run;
}

function useSecondsMs(isOn: boolean): number {
  const [nowMs, setNowMs] = useState(() => Date.now());
  useEffect(() => {
    if (!isOn) return;
    const timer = setInterval(() => setNowMs(Date.now()), 1000);
    return () => clearInterval(timer);
  }, [isOn]);
  return nowMs;
}
