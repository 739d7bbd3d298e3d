import { chromium, type Browser, type Page } from '@playwright/test';
import { HOW_TO_GET_CADDY, hasCaddy, ownCaddy } from './support/own-caddy.ts';
import { ownServer } from './support/own-server.ts';
import { signIn, untilLaidBy } from './support/phone.ts';
import {
  byKeypad,
  endByKeys,
  readByKeys,
  readingsShown,
  startByKeys,
} from './support/run-by-keys.ts';
import { expect, test } from './support/watched-test.ts';

test.skip(!hasCaddy(), `caddy or certutil is not installed: ${HOW_TO_GET_CADDY}`);

const PHONE = { viewport: { width: 390, height: 844 }, serviceWorkers: 'allow' } as const;

const TAKEN_F = [75, 84, 92, 99, 105, 112];

/** What the server holds of the run that this page shows, as it was typed. */
function tempsOnServer(page: Page): Promise<number[]> {
  return page.evaluate(async () => {
    const runId = location.pathname.split('/')[2];
    const answer = await fetch(`/api/runs/${runId}/samples?channel=0`);
    const octets = new Float64Array(await answer.arrayBuffer());
    return [...octets.slice(octets.length / 2)].map((tempC) => Math.round(tempC * 1.8 + 32));
  });
}

/** The runs of a visit, as the server has them. */
function runsOnServer(page: Page, visitId: string): Promise<string[]> {
  return page.evaluate(async (id) => {
    const visit = await (await fetch(`/api/visits/${id}`)).json();
    return visit.runs.map((run: { id: string }) => run.id);
  }, visitId);
}

test('behind a proxy with a certificate a phone works on with proxy and server dead, and sends all of it once', async ({
  watch,
  foresee,
  launchOptions,
}) => {
  test.setTimeout(240_000);
  const server = await ownServer();
  const proxy = await ownCaddy(server.url);
  let browser: Browser | undefined;
  // Named as README.md says.
  const settings = { PUBLIC_URL: proxy.url, TRUSTED_PROXY: 'loopback' };
  try {
    await server.start(settings);
    await proxy.start();
    await proxy.trustRoot();
    browser = await chromium.launch({
      ...launchOptions,
      args: [...(launchOptions.args ?? []), `--host-resolver-rules=${proxy.hostRule}`],
      // Its store of certificates lies at home. None is let pass unproven: over such a one Chromium
      // would register no service worker.
      env: { ...process.env, HOME: proxy.home },
    });
    const context = await browser.newContext(PHONE);
    await watch.over(context);
    const page = await context.newPage();

    await signIn(page, proxy.url);
    expect(await context.cookies()).toEqual([
      expect.objectContaining({
        name: '__Host-fusekeeper',
        secure: true,
        httpOnly: true,
        sameSite: 'Lax',
        path: '/',
        domain: new URL(proxy.url).hostname,
      }),
    ]);
    const [visitId = ''] = await untilLaidBy(page);
    const before = await runsOnServer(page, visitId);
    await startByKeys(page, `${proxy.url}/visits/${visitId}/stopwatch`);
    const tap = byKeypad(page);
    for (const tempF of TAKEN_F.slice(0, 3)) await readByKeys(page, tempF, tap);

    // The proxy says for the server that it is away.
    foresee(/^\//, 502);
    await server.kill();
    await page.reload();
    await expect.poll(() => readingsShown(page)).toBe(3);
    for (const tempF of TAKEN_F.slice(3, 4)) await readByKeys(page, tempF, tap);
    // Now nobody answers.
    await proxy.stop();
    await page.reload();
    await expect.poll(() => readingsShown(page)).toBe(4);
    for (const tempF of TAKEN_F.slice(4)) await readByKeys(page, tempF, tap);
    await expect(page.getByRole('button', { name: /to send/ })).toBeVisible();
    await page.goto(`${proxy.url}/rounds`);
    await expect(page.getByRole('link', { name: /Run going on/ })).toBeVisible();
    await page.goBack();
    await expect.poll(() => readingsShown(page)).toBe(6);

    await server.start(settings);
    await proxy.start();
    await endByKeys(page);
    await expect(page.getByText('The shop’s analysis agrees.')).toBeVisible({
      timeout: 60_000,
    });
    await page.getByRole('link', { name: 'See the run there' }).click();
    await page.waitForURL(/\/runs\/[\w-]+$/);
    expect(await tempsOnServer(page)).toEqual(TAKEN_F);
    expect(await runsOnServer(page, visitId)).toHaveLength(before.length + 1);
  } finally {
    await browser?.close();
    await proxy.remove();
    await server.remove();
  }
});
