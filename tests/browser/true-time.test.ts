import { cp, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from '@playwright/test';
import { undergo } from './support/clock-course.ts';
import { openBrowser, type OwnBrowser } from './support/own-browser.ts';
import { ownServer } from './support/own-server.ts';
import { layByPhone, lookAway } from './support/phone.ts';
import { byKeypad, endByKeys, openToStart, PATIENTLY, readByKeys } from './support/run-by-keys.ts';
import { createServerRecord } from './support/server-record.ts';
import {
  errorOfLast,
  eventsOnDevice,
  firstDown,
  forgetFinger,
  noteFingers,
} from './support/true-time.ts';
import { expect, test } from './support/watched-test.ts';

/** Issue 4: how far the run's time may be off, ms. */
const MOST_MS = 50;

let server: Awaited<ReturnType<typeof ownServer>>;
/** Signed in, the day laid by. */
let laidByProfile: string;
/** Of one test: with no run going on. */
let profile: string;
let visits: string[];
let browser: OwnBrowser;
let page: Page;

test.beforeAll(async () => {
  server = await ownServer();
  await server.start();
  laidByProfile = await mkdtemp(join(tmpdir(), 'fusekeeper-clock-'));
  visits = await layByPhone(laidByProfile, server.url);
});

test.beforeEach(async () => {
  profile = await mkdtemp(join(tmpdir(), 'fusekeeper-clock-'));
  await cp(laidByProfile, profile, { recursive: true });
  browser = await openBrowser(profile);
  page = await browser.firstPage();
  await noteFingers(browser.context);
});

test.afterEach(async () => {
  await browser.kill();
  await rm(profile, { recursive: true, force: true });
});

test.afterAll(async () => {
  await server.remove();
  await rm(laidByProfile, { recursive: true, force: true });
});

async function begin(visitId: string) {
  const key = await openToStart(page, `${server.url}/visits/${visitId}/stopwatch`);
  await forgetFinger(page);
  await key.click();
  await page.getByRole('timer').waitFor();
  return firstDown(page);
}

async function read(tempF: number): Promise<void> {
  await page.getByRole('timer').waitFor();
  await forgetFinger(page);
  await readByKeys(page, tempF, byKeypad(page));
}

function eventsOf(kind: string) {
  return eventsOnDevice(page).then((events) => events.filter((event) => event['kind'] === kind));
}

// `npm run bench -- clock 60` does it for an hour each.
test('the run’s time is true after the page was hidden, frozen, reloaded, and killed', async () => {
  const start = await begin(visits[0] ?? '');
  await read(75);
  let tempF = 75;

  for (const manner of ['hidden', 'frozen', 'reloaded', 'killed'] as const) {
    ({ browser, page } = await undergo({ browser, page, profile }, manner, 1.5));
    await read((tempF += 2));

    const { errorMs, uMs } = await errorOfLast(page, start);
    expect(Math.abs(errorMs), `after it was ${manner}`).toBeLessThanOrEqual(MOST_MS + uMs);
  }

  // Those two alone were measured by the phone's clock.
  expect(await eventsOf('asleep')).toHaveLength(2);
});

test('the phone’s clock set while the page lives is flagged and not added; a nap is added and held against the server', async () => {
  const visitId = visits[1] ?? '';
  const record = createServerRecord(server);
  const known = await record.runsOf(visitId);
  const start = await begin(visitId);
  await read(75);
  await expect.poll(() => eventsOf('clock-check'), PATIENTLY).toHaveLength(1);

  await setPhoneClock(3_600_000);
  await expect.poll(() => eventsOf('clock-step'), PATIENTLY).toHaveLength(1);
  await read(77);

  const { errorMs, uMs } = await errorOfLast(page, start);
  expect(Math.abs(errorMs)).toBeLessThanOrEqual(MOST_MS + uMs);
  expect((await eventsOf('clock-step'))[0]?.['stepS']).toBeCloseTo(3600, 0);

  // As a phone asleep, whose monotonic clock stands still; the server's, which did not sleep, says otherwise.
  await lookAway(browser.context, page, () => setPhoneClock(3_600_000 + 60_000));
  await expect.poll(() => eventsOf('asleep'), PATIENTLY).toHaveLength(1);
  await read(79);
  await expect.poll(() => eventsOf('clock-check'), PATIENTLY).toHaveLength(2);
  const napped = await errorOfLast(page, start);
  expect(Math.abs(napped.errorMs - 60_000)).toBeLessThanOrEqual(MOST_MS + napped.uMs);

  await endByKeys(page);
  const made = async () => (await record.runsOf(visitId)).filter((id) => !known.includes(id));
  await expect.poll(made, PATIENTLY).toHaveLength(1);
  const [runId = ''] = await made();
  const told = (await record.warningsOf(runId)).join(' ');
  expect(told).toMatch(/The phone’s clock was set by .* the run’s time did not follow\./);
  expect(told).toMatch(/time is from the phone’s clock; the server’s clock differs by/);
});

/** Ahead by so much of what it was at first. */
function setPhoneClock(aheadMs: number): Promise<void> {
  return page.evaluate((ms) => {
    window.trueNow ??= Date.now;
    const { trueNow } = window;
    Date.now = () => trueNow() + ms;
  }, aheadMs);
}

declare global {
  interface Window {
    trueNow?: () => number;
  }
}
