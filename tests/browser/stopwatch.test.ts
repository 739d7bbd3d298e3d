import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 390, height: 844 }, hasTouch: true });

/** On an hour of its own, so that ten seconds between readings take none. */
async function openStopwatch(page: Page): Promise<string> {
  const rounds = await (await page.request.get('/api/rounds')).json();
  const visit = rounds.visits.find((each: { job: { machine: { fuel: string } } }) => {
    return each.job.machine.fuel === 'electric';
  });
  await page.clock.install({ time: new Date() });
  await page.goto(`/visits/${visit.id}/stopwatch`);
  const start = page.getByRole('button', { name: 'Start the clock' });
  await expect(start).toBeVisible();
  const cautions = page.getByRole('region', { name: 'Safety first' }).getByRole('checkbox');
  for (const caution of await cautions.all()) await caution.click();
  await expect(start).toBeEnabled();
  return visit.id;
}

function keyOf(page: Page, name: string) {
  return page.getByRole('group', { name: 'Keypad' }).getByRole('button', { name, exact: true });
}

async function type(page: Page, figures: string): Promise<void> {
  for (const figure of figures) await keyOf(page, figure).click();
}

/** Ten seconds later: all figures for the first reading, two for those after it. */
async function read(page: Page, tempsF: number[], isFirst = false): Promise<void> {
  for (const [i, tempF] of tempsF.entries()) {
    await page.clock.runFor(10_000);
    const figures = String(tempF).padStart(3, '0');
    await type(page, isFirst && i === 0 ? figures : figures.slice(-2));
    await expect(page.getByRole('status').first()).toContainText(`Kept, ${tempF} at`);
  }
}

async function expectNoAxe(page: Page): Promise<void> {
  const found = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  expect(found.violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}

/** Heated without a cut-out: first order from 75 °F towards 215 °F. */
const RUNAWAY = Array.from({ length: 28 }, (_, i) =>
  Math.round(215 - 140 * Math.exp(-((i + 1) * 10) / 150)),
);

test('a runaway is taken by hand without signal, the guard calls it, and the outcome stands at once', async ({
  page,
  context,
}) => {
  test.setTimeout(240_000);
  const visitId = await openStopwatch(page);
  await expectNoAxe(page);
  await page.waitForLoadState('networkidle');
  await context.setOffline(true);
  await page.getByRole('button', { name: 'Start the clock' }).click();
  await expect(page.getByText('Type all three figures')).toBeVisible();

  const cut = page.getByText('Cut the heat', { exact: true });
  let reached = 0;
  for (const [i, tempF] of RUNAWAY.entries()) {
    await read(page, [tempF], i === 0);
    reached = tempF;
    if (i === 12) await expectNoAxe(page);
    if (await cut.isVisible()) break;
  }
  await expect(cut).toBeVisible();
  expect(reached).toBeLessThan(196);
  await expect(page.getByRole('alert')).toContainText('Turn the selector to no-heat');
  await expectNoAxe(page);

  await keyOf(page, 'Heat off').click();
  await read(page, [reached, reached - 4, reached - 10, reached - 16, reached - 22]);
  await expect(page.getByText('Guard is watching.')).toBeVisible();
  await expect(page.getByRole('button', { name: /to send/ })).toBeVisible();

  await page.getByRole('button', { name: 'Finish' }).click();
  await page.getByRole('button', { name: 'End the run' }).click();
  await expect(page.getByText('Say whether the duct was on')).toBeVisible();
  await page.getByRole('radio', { name: 'On', exact: true }).check();
  await page.getByRole('radio', { name: 'Empty' }).check();
  await expectNoAxe(page);
  await page.getByRole('button', { name: 'End the run' }).click();
  await expect(page.getByText('Stop. Do not leave this machine heating.')).toBeVisible();
  await expect(page.getByText(/to send\. It goes when the network is back/)).toBeVisible();
  await expectNoAxe(page);

  await context.setOffline(false);
  await page.clock.runFor(20_000);
  await expect(page.getByText('The shop’s analysis agrees.')).toBeVisible();
  await page.getByRole('link', { name: 'See the run there' }).click();
  await expect(page.getByText('Do not leave this machine heating.')).toBeVisible();
  await page.goto(`/visits/${visitId}`);
  await expect(page.getByRole('link', { name: /Run \d/ }).first()).toBeVisible();
});

test('a reload in mid-run loses nothing, and a second tab takes no readings', async ({
  page,
  context,
}) => {
  test.setTimeout(180_000);
  await page.setViewportSize({ width: 320, height: 640 });
  const visitId = await openStopwatch(page);
  await page.getByRole('button', { name: 'Start the clock' }).click();
  await read(page, [75, 84, 92, 99], true);
  await keyOf(page, 'Click heard').click();
  await keyOf(page, 'Undo').click();
  await read(page, [107, 113]);
  await page.getByRole('button', { name: /^Same/ }).click();
  await expect(page.getByRole('button', { name: /7 readings/ })).toBeVisible();

  await page.getByRole('button', { name: /7 readings/ }).click();
  await page.getByRole('button', { name: /^Correct 92 at 0:3/ }).click();
  await page.getByLabel(/Right value at 0:3/).fill('91');
  await page.getByRole('button', { name: 'Keep both' }).click();
  await expect(page.getByText('was 92')).toBeVisible();
  await expectNoAxe(page);

  await page.reload();

  await expect(page.getByRole('button', { name: /7 readings/ })).toBeVisible();
  await expect(page.getByRole('timer')).toHaveText(/^01:\d\d$/);
  await page.keyboard.type('16');
  await expect(page.getByRole('button', { name: /8 readings/ })).toBeVisible();

  const second = await context.newPage();
  await second.goto(`/visits/${visitId}/stopwatch`);
  await expect(second.getByText('A run is being taken in another tab.')).toBeVisible();
  await second.goto('/rounds');
  await expect(second.getByRole('link', { name: /Run going on: [12]:/ })).toBeVisible();
  await second.close();

  await page.getByRole('button', { name: /8 readings/ }).click();
  await page.getByRole('button', { name: 'Throw this run away' }).click();
  await page.getByRole('button', { name: 'Throw the run away' }).click();
  await expect(page.getByText('The run was thrown away.')).toBeVisible();
});

test('at night every key of the stopwatch can be reached and none is under 64 px', async ({
  page,
}) => {
  await page.emulateMedia({ colorScheme: 'dark' });
  await page.setViewportSize({ width: 320, height: 640 });
  await openStopwatch(page);
  await page.getByRole('button', { name: 'Start the clock' }).press('Enter');
  await read(page, [75, 84], true);

  const keys = await page.getByRole('group', { name: 'Keypad' }).getByRole('button').all();
  for (const key of keys) {
    const box = await key.boundingBox();
    expect(Math.min(box?.width ?? 0, box?.height ?? 0)).toBeGreaterThanOrEqual(64);
  }
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
  await expectNoAxe(page);
  await page.keyboard.press('h');
  await expect(page.getByRole('status').first()).toContainText('Marked');
  await page.getByRole('button', { name: /2 readings/ }).click();
  await page.getByRole('button', { name: 'Throw this run away' }).click();
  await page.getByRole('button', { name: 'Throw the run away' }).click();
});
