import type { Page } from '@playwright/test';
import { beginBadDay, closeBadLine, openBadLine, type BadLine } from './support/bad-day.ts';
import { layNextVersion } from './support/next-version.ts';
import { ownServer } from './support/own-server.ts';
import { lookAway } from './support/phone.ts';
import { PATIENTLY } from './support/run-by-keys.ts';
import { expect, test } from './support/watched-test.ts';

declare global {
  interface Window {
    /** Said by the files of the next version; undefined in this one. */
    fusekeeperVersion?: string;
    isSamePage?: boolean;
  }
}

let line: BadLine;

test.beforeEach(async () => {
  const server = await ownServer();
  await server.start();
  line = await openBadLine(server);
});

test.afterEach(() => closeBadLine(line));

test('a run that goes on while a new version comes is ended and sent by the old one; then the new one is offered', async () => {
  const day = await beginBadDay(line, line.visits[0] ?? '');
  try {
    await day.read(true);
    await day.page().evaluate(() => (window.isSamePage = true));
    await layNextVersion(line.server.clientFolder);
    await untilNewVersionWaits(day.page());

    // Another tab is offered it, and may not take it.
    await lookAway(day.page().context(), day.page(), async (other) => {
      await other.goto(`${line.relay.url}/rounds`);
      await other.getByRole('button', { name: 'Use it now' }).click(PATIENTLY);
      await expect(other.getByText('A run is being recorded; end it first.')).toBeVisible();
    });
    await day.read(true);
    await day.read(true);
    // The old version's panels and its engine are on the phone; the server has them no more.
    expect(await day.end(false)).toMatchObject({ shown: 3, lost: [], doubled: [], problems: [] });
    expect(await day.page().evaluate(() => window.isSamePage)).toBe(true);

    await day.page().getByRole('link', { name: 'Back to the visit' }).click();
    await expect(day.page().getByText('A new version is ready.')).toBeVisible(PATIENTLY);
    await day.page().getByRole('button', { name: 'Use it now' }).click();
    await expect.poll(() => version(day.page()), PATIENTLY).toBe('next');
    await expect(day.page().getByText('A new version is ready.')).toBeHidden();
  } finally {
    await day.close();
  }
});

test('a run that the old version began is gone on with by the new one after the phone was off', async () => {
  const day = await beginBadDay(line, line.visits[0] ?? '');
  try {
    await day.read(true);
    await day.read(true);
    await layNextVersion(line.server.clientFolder);
    await untilNewVersionWaits(day.page());

    await day.kill();
    // With no page of the old one left, the new one takes over by itself; a page that was quicker is reloaded once.
    await day.reload();

    expect(await version(day.page())).toBe('next');
    await day.read(true);
    expect(await day.end(false)).toMatchObject({ shown: 3, lost: [], doubled: [], problems: [] });
  } finally {
    await day.close();
  }
});

/** As the page looks each hour. */
async function untilNewVersionWaits(page: Page): Promise<void> {
  await page.evaluate(async () => (await navigator.serviceWorker.getRegistration())?.update());
  const isWaiting = () =>
    page.evaluate(async () => (await navigator.serviceWorker.getRegistration())?.waiting !== null);
  await expect.poll(isWaiting, PATIENTLY).toBe(true);
}

function version(page: Page): Promise<string | undefined> {
  return page.evaluate(() => window.fusekeeperVersion).catch(() => undefined);
}
