import { dayBounds, dayOf } from '#server/jobs/shop-day.ts';
import { wallClockMs } from '#server/runs/wall-clock.ts';
import type { DemoTime } from './demo-story.ts';

const HALF_DAY_MS = 43_200_000;
const DAY_MS = 86_400_000;

export type DemoClock = ReturnType<typeof createDemoClock>;

/** Tells the instants of a story whose days follow today, and stands at the one that is being told. */
export function createDemoClock(startMs: number, zone: string) {
  const { fromMs: midnightMs } = dayBounds(dayOf(startMs, zone), zone);
  let nowMs = startMs;

  /** ms since 1970 of a time on the shop's clock. */
  function at({ day, at: time }: DemoTime): number {
    // From noon to noon, so that a clock change does not skip or double a day.
    const date = dayOf(midnightMs + HALF_DAY_MS + day * DAY_MS, zone);
    const instantMs = wallClockMs(`${date} ${time}:00`, zone);
    if (instantMs === undefined) throw new RangeError(`${time} is no time`);
    return instantMs;
  }

  return {
    at,
    now: () => new Date(nowMs),
    setTo(instantMs: number): void {
      nowMs = instantMs;
    },
  };
}
