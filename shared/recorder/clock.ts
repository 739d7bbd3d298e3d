/**
 * The run's clock. While the page lives, time is that of the monotonic clock, so that a phone that is set to another
 * hour changes nothing. A span in which the page slept or was gone is measured by the phone's clock, and said to be.
 */

/** Two clocks read at one moment. */
export type Now = {
  /** Of this page's monotonic clock, ms from an origin of its own. */
  monoMs: number;
  /** Of the phone's clock, ms since 1970. */
  wallMs: number;
};

/** A moment of the run that outlives the page. */
export type Anchor = { atS: number; wallMs: number };

export type RunClock = {
  /** Seconds of the run at `baseMonoMs`. */
  baseS: number;
  baseMonoMs: number;
  /** When the clocks were last compared. */
  last: Now;
};

/** What comparing the clocks brought to light. */
export type ClockFinding =
  /** The phone's clock was set by so much; the run's time did not follow. */
  | { kind: 'clock-step'; stepS: number }
  /** Nothing ran from `fromS` to `toS`; the length is that of the phone's clock. */
  | { kind: 'asleep'; fromS: number; toS: number };

/** In view: from here on somebody set the phone's clock. */
const STEP_MS = 2000;
/** Out of view: from here on the phone slept; clocks that are steered drift by half a part in a thousand at most. */
const NAP_MS = 50;
const DRIFT_SHARE = 0.001;

/** The run begins: 0 s is now. */
export function startClock(now: Now): RunClock {
  return { baseS: 0, baseMonoMs: now.monoMs, last: now };
}

/** Seconds of the run at a moment of this page's monotonic clock. */
export function elapsedS({ baseS, baseMonoMs }: RunClock, monoMs: number): number {
  return baseS + (monoMs - baseMonoMs) / 1000;
}

/**
 * Compares the clocks. Called a few times a second, and each time that the page comes back.
 *
 * @param wasSeen the page was in view and running the whole time since the last comparison: then the phone's clock
 *   going ahead is somebody setting it. Out of view it is a phone asleep, whose monotonic clock stood still.
 */
export function compareClocks(
  clock: RunClock,
  now: Now,
  wasSeen: boolean,
): { clock: RunClock; found: ClockFinding | null } {
  const aheadMs = now.wallMs - clock.last.wallMs - (now.monoMs - clock.last.monoMs);
  const compared = { ...clock, last: now };
  const isNap = !wasSeen && aheadMs > NAP_MS + DRIFT_SHARE * (now.monoMs - clock.last.monoMs);
  if (!isNap && Math.abs(aheadMs) <= STEP_MS) return { clock: compared, found: null };
  if (!isNap) return { clock: compared, found: { kind: 'clock-step', stepS: aheadMs / 1000 } };
  const fromS = elapsedS(clock, clock.last.monoMs);
  const toS = fromS + (now.wallMs - clock.last.wallMs) / 1000;
  return {
    clock: { baseS: toS, baseMonoMs: now.monoMs, last: now },
    found: { kind: 'asleep', fromS, toS },
  };
}

/**
 * Goes on with a run after the page was reloaded or gone: from its last moment that lies on the device, by the phone's
 * clock. A clock that was set back meanwhile cannot take time away from the run: it stands still then.
 */
export function reopenClock(
  anchor: Anchor,
  now: Now,
): { clock: RunClock; found: Extract<ClockFinding, { kind: 'asleep' }> } {
  const toS = anchor.atS + Math.max(0, now.wallMs - anchor.wallMs) / 1000;
  return {
    clock: { baseS: toS, baseMonoMs: now.monoMs, last: now },
    found: { kind: 'asleep', fromS: anchor.atS, toS },
  };
}
