import { useMemo } from 'react';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { LiveStrip } from '../../chart/draw-live.ts';
import { liveStripOf } from './live-strip-of.ts';
import type { StopwatchMachine } from './sources.ts';

/** The strip, made anew when something was kept, and not ten times a second: a live probe's run has thousands of readings. */
export function useLiveStrip(
  run: HandRun,
  wallAtS: number | null,
  machine: StopwatchMachine,
): LiveStrip {
  return useMemo(() => liveStripOf(run, wallAtS, machine), [run, wallAtS, machine]);
}
