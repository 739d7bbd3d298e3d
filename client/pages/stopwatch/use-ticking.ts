import { useEffect, useRef, useState } from 'react';
import type { Recorder } from './recorder.ts';
import { holdScreen } from './wake-lock.ts';

const TICK_MS = 100;

/** Seconds of the run, ten times a second; the clocks are compared on the way, and the screen is kept on. */
export function useTicking(recorder: Recorder): number {
  const [nowS, setNowS] = useState(() => recorder.at());
  const wasSeen = useRef(true);
  useEffect(() => {
    const tick = () => {
      recorder.compare(wasSeen.current);
      wasSeen.current = document.visibilityState === 'visible';
      setNowS(Math.floor(recorder.at() * 10) / 10);
    };
    // The screen going dark takes the wake lock first, whatever the page is told of it.
    const loseSight = () => (wasSeen.current = false);
    const handleVisibility = () => {
      if (document.visibilityState !== 'visible') loseSight();
      else tick();
    };
    const release = holdScreen(loseSight);
    const timer = setInterval(tick, TICK_MS);
    document.addEventListener('visibilitychange', handleVisibility);
    document.addEventListener('freeze', loseSight);
    window.addEventListener('pagehide', loseSight);
    window.addEventListener('pageshow', tick);
    return () => {
      release();
      clearInterval(timer);
      document.removeEventListener('visibilitychange', handleVisibility);
      document.removeEventListener('freeze', loseSight);
      window.removeEventListener('pagehide', loseSight);
      window.removeEventListener('pageshow', tick);
    };
  }, [recorder]);
  return nowS;
}
