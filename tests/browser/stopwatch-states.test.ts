import type { Page } from '@playwright/test';
import { lookAt, TWO_SIGHTS } from './support/look-at.ts';
import { heatingF, heatUntil, keep } from './support/read-until.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 390, height: 844 } });
test.setTimeout(300_000);

const briefly = { sights: TWO_SIGHTS };

/** A visit of today, with the clock in the test's hand. @returns its id */
async function openStopwatch(page: Page, fuel = 'electric'): Promise<string> {
  const { visits } = await (await page.request.get('/api/rounds')).json();
  const visit = visits.find(
    (each: { job: { machine: { fuel: string } } }) => each.job.machine.fuel === fuel,
  );
  await page.clock.install({ time: new Date() });
  await page.goto(`/visits/${visit.id}/stopwatch`);
  await expect(page.getByRole('button', { name: 'Start the clock' })).toBeVisible();
  return visit.id;
}

async function tick(page: Page): Promise<void> {
  const cautions = page.getByRole('region', { name: 'Safety first' }).getByRole('checkbox');
  for (const caution of await cautions.all()) await caution.click();
  await expect(page.getByRole('button', { name: 'Start the clock' })).toBeEnabled();
}

/** Some seconds later, on the keyboard. */
async function type(page: Page, figures: string, afterS = 10): Promise<void> {
  await page.clock.runFor(afterS * 1000);
  await page.keyboard.type(figures);
}

const says = (page: Page, what: string) =>
  expect(page.locator(`main.sw-says-${what}`)).toBeVisible();

test('no state of a run has anything that axe finds, a sideways scroll or a small key', async ({
  page,
}) => {
  await openStopwatch(page);
  await lookAt(page, 'cautions not ticked');
  await tick(page);
  await lookAt(page, 'cautions ticked', briefly);
  await page.getByRole('button', { name: 'Start the clock' }).click();
  await expect(page.getByText('Type all three figures')).toBeVisible();
  await lookAt(page, 'before the first reading', briefly);

  await keep(page, 75);
  await keep(page, 84);
  await keep(page, 92);
  await lookAt(page, 'quiet');
  await type(page, '9');
  await lookAt(page, 'half a reading', briefly);
  await page.keyboard.press('Backspace');
  await keep(page, 98);
  await keep(page, 102);
  // About 108 °F by its slope, after 30 s within 55 °F of that: 58 and 158 could both be.
  await type(page, '58', 30);
  await expect(page.getByText('Which hundred')).toBeVisible();
  await lookAt(page, 'asked which of two', briefly);
  await page.keyboard.press('Backspace');
  await page.keyboard.press('o');
  await page.keyboard.type('101');
  await lookAt(page, 'another value', briefly);
  await page.keyboard.press('o');
  await expect(page.getByRole('status').first()).toContainText('Kept, 101 at');
  await page.keyboard.press('c');
  await page.keyboard.press('Backspace');
  await expect(page.getByRole('status').first()).toContainText('Taken back');
  await lookAt(page, 'taken back', briefly);

  await page.keyboard.press('m');
  await lookAt(page, 'slip of marks', briefly);
  await page.getByRole('button', { name: 'Note', exact: true }).click();
  await lookAt(page, 'slip of a note', briefly);
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: /6 readings/ }).click();
  await lookAt(page, 'slip of the run', briefly);
  await page.getByRole('button', { name: /^Correct 92 at/ }).click();
  await lookAt(page, 'correcting', briefly);
  await page.getByLabel(/^Right value at/).fill('91');
  await page.getByRole('button', { name: 'Keep both' }).click();
  await expect(page.getByText('was 92')).toBeVisible();
  await lookAt(page, 'corrected', briefly);
  await page.keyboard.press('Escape');

  let i = await heatUntil(page, 'watch', 8);
  await lookAt(page, 'watch');
  i = await heatUntil(page, 'cut-heat', i);
  await lookAt(page, 'cut-heat');
  await page.keyboard.press('h');
  await keep(page, heatingF(i));
  await keep(page, heatingF(i) + 4);
  await keep(page, heatingF(i) + 8);
  await says(page, 'unplug');
  await lookAt(page, 'climbing with the heat off', briefly);
  for (const by of [6, 0, -8, -16, -24]) await keep(page, heatingF(i) + by);
  await says(page, 'quiet');

  await page.getByRole('button', { name: 'Finish' }).click();
  await page.getByRole('button', { name: 'End the run' }).click();
  await expect(page.getByText('Say whether the duct was on')).toBeVisible();
  await lookAt(page, 'end of the run, with faults', briefly);
  await page.getByRole('radio', { name: 'On', exact: true }).check();
  await page.getByRole('radio', { name: 'Empty' }).check();
  await page.getByRole('button', { name: 'End the run' }).click();
  await expect(page.getByText('Stop. Do not leave this machine heating.')).toBeVisible();
  await lookAt(page, 'outcome of a runaway');
});

test('no page beside a run has anything that axe finds: tenths, left hand, another tab, too short, thrown away, not opened', async ({
  page,
  context,
  foresee,
}) => {
  const visitId = await openStopwatch(page);
  await tick(page);
  for (const name of ['°C', 'With tenths', 'Left hand']) {
    await page.getByRole('radio', { name }).check();
  }
  await page.getByRole('button', { name: 'Start the clock' }).click();
  await expect(page.getByRole('group', { name: 'Keypad' })).toBeVisible();
  await type(page, '0212');
  await expect(page.getByRole('status').first()).toContainText('Kept, 21.2 at');
  await lookAt(page, 'tenths of a degree, left hand', briefly);

  const other = await context.newPage();
  await other.goto(`/visits/${visitId}/stopwatch`);
  await expect(other.getByText('A run is being taken in another tab.')).toBeVisible();
  await lookAt(other, 'another tab', briefly);
  await other.close();

  await page.getByRole('button', { name: 'Finish' }).click();
  await page.getByRole('radio', { name: 'Off' }).check();
  await page.getByRole('radio', { name: 'Empty' }).check();
  await page.getByRole('button', { name: 'End the run' }).click();
  await expect(page.getByRole('heading', { name: 'Too few readings' })).toBeVisible();
  await lookAt(page, 'too few readings', briefly);

  await page.getByRole('button', { name: 'Take another run' }).click();
  await page.getByRole('button', { name: 'Start the clock' }).click();
  await page.getByRole('button', { name: /0 readings/ }).click();
  await page.getByRole('button', { name: 'Throw this run away' }).click();
  await lookAt(page, 'asked whether to throw it away', briefly);
  await page.getByRole('button', { name: 'Throw the run away' }).click();
  await expect(page.getByText('The run was thrown away.')).toBeVisible();
  await lookAt(page, 'thrown away', briefly);

  foresee(/\/api\/visits\/00000000/, 404);
  await page.goto('/visits/00000000-0000-4000-8000-000000000000/stopwatch');
  await expect(page.getByText('The stopwatch did not open.')).toBeVisible();
  await lookAt(page, 'not opened', briefly);
});
