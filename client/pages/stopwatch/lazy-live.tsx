import { lazy, type ComponentType } from 'react';
import type { LiveDesk } from './live/create-live-desk.ts';
import type { ProbeLineProps } from './live/probe-line.tsx';

/** Whether this browser can reach a probe at all; where it cannot, nothing of it is shown or fetched. */
export const canReachProbe =
  typeof navigator !== 'undefined' && ('bluetooth' in navigator || 'serial' in navigator);

const fetchLive = () => import('./live/live-parts.tsx');

type Fetched<Props> = { default: ComponentType<Props> };
/** Not fetched, as without a network on the first visit: the run goes on by hand. */
const Nothing = () => null;

export const ProbePart = lazy((): Promise<Fetched<{ isNamed: boolean }>> =>
  fetchLive().then(
    (chunk) => ({ default: chunk.ProbePart }),
    () => ({ default: Nothing }),
  ),
);
export const ProbeLine = lazy((): Promise<Fetched<ProbeLineProps>> =>
  fetchLive().then(
    (chunk) => ({ default: chunk.ProbeLine }),
    () => ({ default: Nothing }),
  ),
);

/** The run takes the live probe's readings from now on, as soon as its code is there. @returns stops it */
export function followLive(run: Parameters<LiveDesk['follow']>[0]): () => void {
  if (!canReachProbe) return () => {};
  let isOver = false;
  let stop = () => {};
  fetchLive().then(
    ({ liveDesk }) => {
      if (!isOver) stop = liveDesk.follow(run);
    },
    () => {},
  );
  return () => {
    isOver = true;
    stop();
  };
}
