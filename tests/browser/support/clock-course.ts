import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import type { BrowserContext, Page } from '@playwright/test';
import { openBrowser, type OwnBrowser } from './own-browser.ts';
import { layByPhone } from './phone.ts';
import { byKeypad, openToStart, readByKeys } from './run-by-keys.ts';
import { errorOfLast, eventsOnDevice, firstDown, forgetFinger, noteFingers } from './true-time.ts';

export const MANNERS = ['seen', 'hidden', 'frozen', 'reloaded', 'killed'] as const;
/** What the page goes through while the time passes. */
export type Manner = (typeof MANNERS)[number];

export type Course = {
  manner: Manner;
  /** How long it lasted, s. */
  lastedS: number;
  /** Of the reading before and the one after, ms. */
  before: { errorMs: number; uMs: number };
  after: { errorMs: number; uMs: number };
  /** Spans that the run says are from the phone's clock, s. */
  asleepS: number[];
};

/** Plays one run in a browser of its own, in which the page goes through something for so long. */
export async function playCourse(url: string, manner: Manner, lastsS: number): Promise<Course> {
  const profile = await mkdtemp(join(tmpdir(), 'fusekeeper-clock-'));
  const [visitId = ''] = await layByPhone(profile, url);
  let browser = await openBrowser(profile);
  try {
    let page = await browser.firstPage();
    await noteFingers(browser.context);
    const stopwatch = `${url}/visits/${visitId}/stopwatch`;
    const key = await openToStart(page, stopwatch);
    await forgetFinger(page);
    await key.click();
    await page.getByRole('timer').waitFor();
    const start = await firstDown(page);
    await forgetFinger(page);
    await readByKeys(page, 75, byKeypad(page));
    const before = await errorOfLast(page, start);
    const began = performance.now();

    ({ browser, page } = await undergo({ browser, page, profile }, manner, lastsS));
    await page.getByRole('timer').waitFor();
    await forgetFinger(page);
    await readByKeys(page, 96, byKeypad(page));
    const lastedS = (performance.now() - began) / 1000;
    const after = await errorOfLast(page, start);
    const events = await eventsOnDevice(page);
    const asleep = events.filter(({ kind }) => kind === 'asleep');
    const asleepS = asleep.map(({ atS, fromS }) => Number(atS) - Number(fromS));
    return { manner, lastedS, before, after, asleepS };
  } finally {
    await browser.kill();
    await rm(profile, { recursive: true, force: true });
  }
}

type OpenRun = { browser: OwnBrowser; page: Page; profile: string };

/** So long in that manner. @returns the browser and page on which the run goes on */
export async function undergo(
  { browser, page, profile }: OpenRun,
  manner: Manner,
  lastsS: number,
): Promise<OpenRun> {
  if (manner === 'hidden' || manner === 'frozen') {
    await beHidden(browser.context, page, manner, lastsS);
    return { browser, page, profile };
  }
  const url = page.url();
  if (manner === 'killed') await browser.kill();
  await pause(lastsS * 1000);
  if (manner === 'reloaded') await page.reload();
  if (manner !== 'killed') return { browser, page, profile };
  const next = await openBrowser(profile);
  await noteFingers(next.context);
  const nextPage = await next.firstPage();
  await nextPage.goto(url);
  return { browser: next, page: nextPage, profile };
}

async function beHidden(
  context: BrowserContext,
  page: Page,
  manner: 'hidden' | 'frozen',
  lastsS: number,
): Promise<void> {
  const other = await context.newPage();
  await other.bringToFront();
  const session = await context.newCDPSession(page);
  if (manner === 'frozen') await session.send('Page.setWebLifecycleState', { state: 'frozen' });
  await pause(lastsS * 1000);
  if (manner === 'frozen') await session.send('Page.setWebLifecycleState', { state: 'active' });
  await other.close();
  await page.bringToFront();
}
