import type { BrowserContext, Page } from '@playwright/test';
import { storeOf } from './phone.ts';

/** The run's time held against this process's own monotonic clock. */

declare global {
  interface Window {
    /** When a finger first went down since this was deleted, ms of the page's monotonic clock. */
    downMs?: number | undefined;
  }
}

/** A moment on this process's clock, ms, and how well it is known. */
export type Moment = { atMs: number; uMs: number };

const TRIES = 15;

/** From now on pages of this browser note when a finger first goes down. */
export async function noteFingers(context: BrowserContext): Promise<void> {
  await context.addInitScript(() => {
    window.addEventListener('pointerdown', ({ timeStamp }) => (window.downMs ??= timeStamp), true);
  });
}

/** What follows is measured anew. */
export async function forgetFinger(page: Page): Promise<void> {
  await page.evaluate(() => (window.downMs = undefined));
}

/** When the finger first went down. The two clocks are compared by the quickest of several questions. */
export async function firstDown(page: Page): Promise<Moment> {
  let best = { offsetMs: NaN, uMs: Infinity };
  for (let i = 0; i < TRIES; i++) {
    const askedMs = hereMs();
    const pageMs = await page.evaluate(() => performance.now());
    const uMs = (hereMs() - askedMs) / 2;
    if (uMs < best.uMs) best = { offsetMs: askedMs + uMs - pageMs, uMs };
  }
  const downMs = await page.evaluate(() => window.downMs ?? NaN);
  return { atMs: downMs + best.offsetMs, uMs: best.uMs };
}

/** Does not follow a clock that is set. */
function hereMs(): number {
  return Number(process.hrtime.bigint()) / 1e6;
}

/** Seconds of the run that the newest reading on the device was stamped with. */
export async function lastReadingS(page: Page): Promise<number> {
  const events = await eventsOnDevice(page);
  const readings = events.filter(({ kind }) => kind === 'reading');
  return Number(readings.at(-1)?.['atS'] ?? NaN);
}

/** Events of the runs on the device, in the order in which they were kept. */
export async function eventsOnDevice(page: Page): Promise<Record<string, unknown>[]> {
  const things = (await storeOf(page, 'things')) as {
    kind: string;
    order: number;
    payload: Record<string, unknown>;
  }[];
  return things
    .filter(({ kind }) => kind === 'run-event')
    .sort((a, b) => a.order - b.order)
    .map(({ payload }) => payload);
}

/** The newest reading: by how much the run's time is off, ms, since the start at `start`. */
export async function errorOfLast(
  page: Page,
  start: Moment,
): Promise<{ errorMs: number; uMs: number }> {
  const down = await firstDown(page);
  const runMs = (await lastReadingS(page)) * 1000;
  return { errorMs: runMs - (down.atMs - start.atMs), uMs: down.uMs + start.uMs };
}
