import { appendFile } from 'node:fs/promises';
import { join } from 'node:path';
import { ownServer } from './support/own-server.ts';
import { laidBy, signIn, untilLaidBy } from './support/phone.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ viewport: { width: 390, height: 844 }, serviceWorkers: 'allow' });

test('a visit is worked on with the server dead, and all of it is sent once when it is back', async ({
  page,
}) => {
  const server = await ownServer();
  await server.start();
  try {
    await signIn(page, server.url);
    await untilLaidBy(page);
    await server.kill();

    await page.reload();
    await expect(page.getByText(/^Not connected, as of \d/)).toBeVisible();
    await page.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();
    await expect(page.getByText('not ticked yet')).toBeVisible();
    for (const caution of await page.getByRole('checkbox').all()) await caution.click();
    await expect(page.getByText(/^ticked .*, not sent yet$/)).toBeVisible();
    await page.getByRole('button', { name: /^(Write a note|Change the notes)$/ }).click();
    await page.getByLabel('Notes of this visit').fill('Duct crushed behind the unit.');
    await page.getByRole('button', { name: 'Keep' }).click();
    await expect(page.getByRole('link', { name: '2 not sent yet' })).toBeVisible();

    await page.reload();
    await expect(page.getByText('Duct crushed behind the unit.')).toBeVisible();
    await page.getByRole('link', { name: '2 not sent yet' }).click();
    await expect(page.getByRole('heading', { name: 'On this phone' })).toBeVisible();
    const saving = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Save to a file' }).click();
    expect((await saving).suggestedFilename()).toMatch(/^fusekeeper-not-sent-.*\.json$/);

    await server.start();
    await page.getByRole('button', { name: 'Send now' }).click();
    await expect(page.getByText('Everything is with the shop.')).toBeVisible();

    await page.goBack();
    await expect(page.getByText('Duct crushed behind the unit.')).toBeVisible();
    await expect(page.getByText(/not sent yet/)).toBeHidden();
    const rounds = await (await page.request.get(`${server.url}/api/rounds`)).json();
    const stop = rounds.visits.find(
      (visit: { job: { customer: { name: string } } }) =>
        visit.job.customer.name === 'Rosalind Peake',
    );
    expect(stop).toMatchObject({ notes: 'Duct crushed behind the unit.' });
    expect(stop.safetyTickedAtMs).toBeGreaterThan(0);
  } finally {
    await server.remove();
  }
});

test('signing out is stopped while something is on the phone only', async ({ page, context }) => {
  const server = await ownServer();
  await server.start();
  try {
    await signIn(page, server.url);
    await untilLaidBy(page);
    await context.setOffline(true);
    await page.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();
    await expect(page.getByText('not ticked yet')).toBeVisible();
    for (const caution of await page.getByRole('checkbox').all()) await caution.click();
    await page.getByRole('link', { name: '1 not sent yet' }).click();
    await page.getByRole('link', { name: 'More' }).click();
    await page.getByRole('link', { name: /^Tom Birkett/ }).click();

    await page.getByRole('button', { name: 'Sign out on this device' }).click();
    const slip = page.getByRole('dialog', { name: '1 thing is on this phone only.' });
    await expect(slip.getByRole('button', { name: 'Sign out' })).toBeHidden();

    await context.setOffline(false);
    await expect(page.getByRole('dialog')).toContainText('Everything is with the shop now.');
    await page.getByRole('dialog').getByRole('button', { name: 'Sign out' }).click();
    await expect(page.getByRole('button', { name: 'Sign in' })).toBeVisible();

    // Nothing that was read stays behind on the phone.
    expect(await laidBy(page)).toEqual([]);
  } finally {
    await server.remove();
  }
});

test('a new version waits for a run that is being recorded, and then takes over', async ({
  page,
}) => {
  const server = await ownServer();
  await server.start();
  try {
    await signIn(page, server.url);
    await untilLaidBy(page);
    // Another version: its worker is another file, octet by octet.
    await appendFile(join(server.clientFolder, 'sw.js'), '\n// the next version\n');
    await page.reload();
    await expect(page.getByText('A new version is ready.')).toBeVisible();
    await page.evaluate(() => {
      const held = new Promise<void>((resolve) => addEventListener('run-ended', () => resolve()));
      // As client/device/recording-hold.ts holds it while a run is recorded.
      void navigator.locks.request('fusekeeper-recording', { mode: 'shared' }, () => held);
    });

    await page.getByRole('button', { name: 'Use it now' }).click();
    await expect(page.getByText('A run is being recorded; end it first.')).toBeVisible();

    await page.evaluate(() => dispatchEvent(new Event('run-ended')));
    const reopened = page.waitForEvent('load');
    await page.getByRole('button', { name: 'Use it now' }).click();
    await reopened;
    await expect(page.getByRole('link', { name: 'Rosalind Peake', exact: true })).toBeVisible();
    await expect(page.getByText('A new version is ready.')).toBeHidden();
  } finally {
    await server.remove();
  }
});

test('the customer’s page neither registers a worker nor is opened by one', async ({
  page,
  foresee,
}) => {
  foresee(/\/api\/shared\/open$/, 404);
  await page.goto('/shared#not-a-token');
  await expect(page.getByRole('heading')).toBeVisible();

  expect(await page.evaluate(() => navigator.serviceWorker.getRegistrations())).toEqual([]);
});
