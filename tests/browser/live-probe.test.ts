import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { layFakeProbe } from './support/fake-probe.ts';
import { endByKeys, openToStart, readingsShown } from './support/run-by-keys.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 390, height: 844 }, hasTouch: true });

async function electricVisit(page: Page): Promise<string> {
  const rounds = await (await page.request.get('/api/rounds')).json();
  const visit = rounds.visits.find((each: { job: { machine: { fuel: string } } }) => {
    return each.job.machine.fuel === 'electric';
  });
  return `/visits/${visit.id}/stopwatch`;
}

async function expectNoAxe(page: Page): Promise<void> {
  const found = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(found.violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}

/** Heated without a cut-out, first order from 24 °C towards 103 °C, as quick as a small empty machine. */
const climbC = (timeS: number) => 103 - 79 * Math.exp(-timeS / 100);

test('a live probe takes a run with a lost link and a reload in it; the guard heeds it, and the gap is told and drawn', async ({
  page,
}) => {
  test.setTimeout(240_000);
  const probe = await layFakeProbe(page);
  const stopwatchUrl = await electricVisit(page);
  await page.clock.install({ time: new Date() });
  const start = await openToStart(page, stopwatchUrl);
  await page.getByRole('button', { name: 'Connect a probe by Bluetooth' }).click();
  await expect(page.getByText('Linked. No reading has come yet.')).toBeVisible();
  await probe.say(24);
  await expect(page.getByText('24.0 °C')).toBeVisible();
  await expect(page.getByText('It reads.')).toBeVisible();
  await page.getByLabel('Probe', { exact: true }).selectOption({ index: 1 });
  await expect(page.getByText('Choose under Probe which')).toHaveCount(0);
  await expectNoAxe(page);
  await start.click();
  await expect.poll(() => readingsShown(page)).toBe(0);

  let timeS = 0;
  /** A second goes by and the probe says where the exhaust is; on the screen it is once it is kept. */
  async function second(tempC = climbC(timeS + 1)): Promise<void> {
    const before = await readingsShown(page);
    timeS++;
    await page.clock.runFor(1_000);
    await probe.say(tempC);
    await expect.poll(() => readingsShown(page)).toBe((before ?? 0) + 1);
  }

  for (let i = 0; i < 20; i++) await second();
  await expect(page.getByText('The probe reads; keys go on')).toBeVisible();
  // Nobody is asked for a reading.
  await expect(page.getByText(/^read in/)).toHaveCount(0);
  await expect(page.getByRole('img', { name: /20 readings/ })).toBeVisible();

  await probe.setNear(false);
  timeS += 12;
  await page.clock.runFor(12_000);
  await expect(
    page.getByText(/^Probe lost 0:[1-5]\d ago\. Readings by hand go on counting\.$/),
  ).toBeVisible();
  await expect(page.getByText(/^read in/)).toBeVisible();
  await expectNoAxe(page);
  const byHandF = Math.round(climbC(timeS) * 1.8 + 32);
  const pad = page.getByRole('group', { name: 'Keypad' });
  for (const figure of String(byHandF).slice(-2)) {
    await pad.getByRole('button', { name: figure, exact: true }).click();
  }
  await expect.poll(() => readingsShown(page)).toBe(21);

  await probe.setNear(true);
  await page.getByRole('button', { name: 'Try now' }).click();
  await second();
  await second();
  await expect(page.getByText(/Probe lost/)).toHaveCount(0);

  await page.reload();
  await page.clock.runFor(20_000);
  timeS += 20;
  await expect(page.getByText(/^Probe lost \d:\d\d ago/)).toBeVisible();
  expect(await readingsShown(page)).toBe(23);
  await page.getByRole('button', { name: 'Reconnect' }).click();
  await expect.poll(() => probe.links()).toBe(1);
  const cut = page.getByText('Cut the heat', { exact: true });
  while (timeS < 200 && !(await cut.isVisible())) await second();
  await expect(cut).toBeVisible();
  // The high limit is 196 °F, 91.1 °C: this machine gets there at 189 s.
  expect(climbC(timeS)).toBeLessThan(91.1);
  await expectNoAxe(page);

  await pad.getByRole('button', { name: 'Heat off' }).click();
  const topC = climbC(timeS);
  for (let i = 0; i < 25; i++) await second(topC - 0.8 * i);
  await expect(page.getByText('Guard is watching.')).toBeVisible();
  // A probe that says that it knows nothing is silent.
  for (let i = 0; i < 8; i++) {
    await page.clock.runFor(1_000);
    await probe.say(null);
  }
  await expect(page.getByText(/The probe says that it knows no temperature/).first()).toBeVisible();

  await endByKeys(page);
  await page.clock.runFor(20_000);
  await page.getByRole('link', { name: 'See the run there' }).click();
  await expect(page.getByText(/from the column “Live probe and by hand”/)).toBeVisible();
  await expect(
    page.getByText(/The live probe was out of reach from \d:\d\d to \d:\d\d\./).first(),
  ).toBeVisible();
  await expect(page.getByText(/The live probe was out of reach/).nth(2)).toBeVisible();
  // The chart lifts its pen where the analysis has a gap: over the lost link and over the reload at least.
  const run = await (await page.request.get(`/api${new URL(page.url()).pathname}`)).json();
  const { gaps } = run.analysis.analysis;
  expect(
    gaps.filter((gap: { fromS: number; toS: number }) => gap.toS - gap.fromS >= 5).length,
  ).toBeGreaterThanOrEqual(2);
});

test('where a browser can reach no probe, no key offers one', async ({ page }) => {
  await page.addInitScript(() => {
    for (const name of ['bluetooth', 'serial']) Reflect.deleteProperty(Navigator.prototype, name);
  });
  await openToStart(page, await electricVisit(page));
  await page.waitForLoadState('networkidle');

  await expect(page.getByText('Live probe')).toHaveCount(0);
  await expect(page.getByRole('button', { name: /Connect a probe/ })).toHaveCount(0);
});

test('at 320 px, at night, a lost probe leaves every key 64 px and the page its width', async ({
  page,
}) => {
  const probe = await layFakeProbe(page);
  await page.emulateMedia({ colorScheme: 'dark' });
  await page.setViewportSize({ width: 320, height: 640 });
  const stopwatchUrl = await electricVisit(page);
  await page.clock.install({ time: new Date() });
  const start = await openToStart(page, stopwatchUrl);
  await page.getByRole('button', { name: 'Connect a probe by Bluetooth' }).click();
  await expect(page.getByText('Linked. No reading has come yet.')).toBeVisible();
  await start.click();
  await expect.poll(() => readingsShown(page)).toBe(0);
  for (let i = 0; i < 3; i++) {
    await page.clock.runFor(1_000);
    await probe.say(24 + i);
    await expect.poll(() => readingsShown(page)).toBe(i + 1);
  }
  await probe.setNear(false);
  await page.clock.runFor(8_000);
  await expect(page.getByText(/^Probe lost \d:\d\d ago/)).toBeVisible();

  const pad = page.getByRole('group', { name: 'Keypad' });
  for (const key of await pad.getByRole('button').all()) {
    const box = await key.boundingBox();
    expect(Math.min(box?.width ?? 0, box?.height ?? 0)).toBeGreaterThanOrEqual(64);
    expect((box?.y ?? 0) + (box?.height ?? 0)).toBeLessThanOrEqual(640);
  }
  const again = await page.getByRole('button', { name: 'Try now' }).boundingBox();
  expect(again?.height).toBeGreaterThanOrEqual(48);
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
  await expectNoAxe(page);
  await page.getByRole('button', { name: /3 readings/ }).click();
  await page.getByRole('button', { name: 'Throw this run away' }).click();
  await page.getByRole('button', { name: 'Throw the run away' }).click();
});
