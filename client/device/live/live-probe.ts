import type { NoValue } from '#shared/probes/live/live-value.ts';
import type { DisplayUnit } from '#shared/units.ts';

/** A reading in the probe's own unit, at the moment of the page's monotonic clock when it arrived. */
export type LiveReading = { temp: number; unit: DisplayUnit; monoMs: number };

/** Something that only a person can say: which of two numbers, which unit. */
export type LiveQuestion = { words: string; options: { key: string; words: string }[] };

export type LiveState =
  | { is: 'connecting' }
  | { is: 'reading' }
  | { is: 'asks'; question: LiveQuestion }
  /** The link is gone; it is tried again by itself, for as long as the probe is wanted. */
  | { is: 'lost' }
  /** For good. `why` is for the page; null where a person let go of it. */
  | { is: 'ended'; why: string | null };

/** What came since the last reading and held no temperature. */
export type Silence = { count: number; why: NoValue | 'unread' | null };

/** A probe that gives readings by itself, whatever it hangs on. */
export type LiveProbe = {
  name: string;
  /** A cable's speed may be wrong; a radio's cannot. */
  by: 'bluetooth' | 'cable';
  state: () => LiveState;
  silence: () => Silence;
  /** Told of every change of state and silence. @returns stops it */
  subscribe: (tell: () => void) => () => void;
  /** Told of every reading. @returns stops it */
  onReading: (tell: (reading: LiveReading) => void) => () => void;
  /** Answers what it asks. */
  answer: (key: string) => void;
  /** A lost link is tried at once. */
  tryNow: () => void;
  close: () => Promise<void>;
};

/** The clocks that an adaptor goes by. */
export type LiveParts = {
  /** The page's monotonic clock. */
  nowMs: () => number;
  /** Does something later. @returns takes it back */
  after: (ms: number, work: () => void) => () => void;
};

export const pageClock: LiveParts = {
  nowMs: () => performance.now(),
  after(ms, work) {
    const timer = setTimeout(work, ms);
    return () => clearTimeout(timer);
  },
};

const FIRST_RETRY_MS = 1_000;
const LAST_RETRY_MS = 15_000;

/** 1, 2, 4, 8, then every 15 s: somebody stands beside the probe. @param failures from 1 */
export function retryMs(failures: number): number {
  return Math.min(FIRST_RETRY_MS * 2 ** (failures - 1), LAST_RETRY_MS);
}
