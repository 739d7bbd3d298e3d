import type { Page } from '@playwright/test';
import { ownServer } from './support/own-server.ts';
import { signIn, untilLaidBy } from './support/phone.ts';
import { byKeypad, endByKeys, readByKeys, startByKeys } from './support/run-by-keys.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ viewport: { width: 390, height: 844 }, hasTouch: true, serviceWorkers: 'allow' });

const READINGS = [75, 82, 90, 97, 104];

/** A short run on the first visit of the day, from its start to its outcome. */
async function takeRun(page: Page, url: string): Promise<void> {
  await signIn(page, url);
  const [visitId] = await untilLaidBy(page);
  await startByKeys(page, `${url}/visits/${visitId}/stopwatch`);
  for (const tempF of READINGS) await readByKeys(page, tempF, byKeypad(page));
}

const engines = (page: Page) =>
  page.workers().filter((worker) => worker.url().includes('/analysis-worker'));

test('a run is judged beside the page, and the shop’s answer stands under the phone’s', async ({
  page,
}) => {
  test.setTimeout(180_000);
  const server = await ownServer();
  await server.start();
  try {
    await takeRun(page, server.url);
    await expect.poll(() => engines(page).length).toBe(1);
    await server.kill();

    await endByKeys(page);
    await expect(page.getByText('Judged on this phone by engine version')).toBeVisible();
    await page.getByLabel('Note', { exact: true }).fill('Belt squeals');
    await page.getByRole('button', { name: 'Keep the note' }).click();
    await expect(page.getByText('Not sent yet')).toBeVisible();
    await expect(page.getByText(/On this phone, \d+ to send/)).toBeVisible();

    await server.start();
    await page.evaluate(() => window.dispatchEvent(new Event('online')));
    await expect(page.getByText('The shop’s analysis agrees.')).toBeVisible();
    await expect(page.getByText('Not sent yet')).toBeHidden();
    await expect(page.getByText('Judged on this phone by engine version')).toBeVisible();

    await page.getByRole('link', { name: 'See the run there' }).click();
    await expect(page.getByText('Belt squeals').first()).toBeVisible();
  } finally {
    await server.remove();
  }
});

test('where the browser gives no worker the page judges by itself', async ({ page }) => {
  test.setTimeout(180_000);
  const server = await ownServer();
  await server.start();
  try {
    await page.addInitScript(() => {
      Reflect.set(
        window,
        'Worker',
        class {
          constructor() {
            throw new Error('no workers here');
          }
        },
      );
    });
    await takeRun(page, server.url);
    await endByKeys(page);

    await expect(page.getByText('Judged on this phone by engine version')).toBeVisible();
    expect(engines(page)).toEqual([]);
  } finally {
    await server.remove();
  }
});
