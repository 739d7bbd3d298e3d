import { chromium, type BrowserContext, type CDPSession, type Page } from '@playwright/test';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';

const PATIENCE_MS = 60_000;
const START = 'Start the clock';

/** Until a key of the page can be pressed. */
export type Opening = {
  /** Since the navigation began. */
  ms: number;
  /** Of it on the page's own thread, which a busy machine does not stretch as it does the clock. */
  threadMs: number;
};
/** In a browser just started, and once more in it. */
export type Openings = { first: Opening; again: Opening };

declare global {
  interface Window {
    /** ms since the navigation began; absent until the first key is there and drawn. */
    firstKeyAtMs?: number;
  }
}

/** Visits the stopwatch once with the server there, as the morning in the shop does. @returns its address */
export async function prepare(profile: string, origin: string): Promise<string> {
  return withPhone(profile, async (context) => {
    const email = DEMO_PEOPLE.find(({ key }) => key === 'tom')?.email;
    const signedIn = await context.request.post(`${origin}/api/session`, {
      data: { email, password: DEMO_PASSWORD },
    });
    if (!signedIn.ok()) throw new Error(`sign-in answered ${signedIn.status()}`);
    const rounds = await (await context.request.get(`${origin}/api/rounds`)).json();
    const url = `${origin}/visits/${rounds.visits[0].id}/stopwatch`;
    const page = await context.newPage();
    await page.goto(url);
    await page.waitForFunction(() => navigator.serviceWorker.controller !== null);
    await tickCautions(page);
    await page.getByRole('link', { name: 'Visit', exact: true }).click();
    await page.getByRole('heading', { level: 1 }).waitFor();
    await page.getByText('not sent yet').first().waitFor({ state: 'hidden' });
    return url;
  });
}

async function tickCautions(page: Page): Promise<void> {
  await page.getByRole('button', { name: START }).waitFor();
  const cautions = page.getByRole('region', { name: 'Safety first' }).getByRole('checkbox');
  for (const caution of await cautions.all()) await caution.click();
  await page.waitForFunction(
    (words) =>
      [...document.querySelectorAll('button')].some(
        (key) => key.textContent?.includes(words) && !key.disabled,
      ),
    START,
  );
}

/** From here on the stopwatch opens on a run that goes on. */
export async function beginRun(profile: string, url: string): Promise<void> {
  await withPhone(profile, async (context) => {
    const page = await context.newPage();
    await page.goto(url);
    await page.getByRole('button', { name: START }).click();
    const keypad = page.getByRole('group', { name: 'Keypad' });
    for (const figure of '075')
      await keypad.getByRole('button', { name: figure, exact: true }).click();
    await page.getByRole('button', { name: /\b1 reading/ }).waitFor();
  });
}

export async function timeOpenings(
  profile: string,
  url: string,
  throttle: number,
): Promise<Openings> {
  return withPhone(profile, async (context) => {
    await context.addInitScript(watchForFirstKey, START);
    const page = await context.newPage();
    const session = await context.newCDPSession(page);
    await session.send('Emulation.setCPUThrottlingRate', { rate: throttle });
    await session.send('Performance.enable', { timeDomain: 'threadTicks' });
    const first = await openOnce(page, session, url);
    return { first, again: await openOnce(page, session, url) };
  });
}

async function openOnce(page: Page, session: CDPSession, url: string): Promise<Opening> {
  const before = await threadMsOf(session);
  await page.goto(url);
  const handle = await page.waitForFunction(() => window.firstKeyAtMs, null, {
    timeout: PATIENCE_MS,
  });
  const ms = await handle.jsonValue();
  if (ms === undefined) throw new Error('no key was drawn');
  const after = await threadMsOf(session);
  // Another site is another process, which begins to count anew.
  return { ms, threadMs: after < before ? after : after - before };
}

async function threadMsOf(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics');
  return (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN) * 1000;
}

/**
 * Runs in the page: a key of the keypad, or the one that starts the clock, is there, in reach, and on the screen.
 * Without a named function in it, since the runner would call a helper that no page has.
 */
function watchForFirstKey(startWords: string): void {
  new MutationObserver((_changes, watch) => {
    const isReady = [...document.querySelectorAll('button')].some(
      (key) =>
        !key.disabled &&
        key.getClientRects().length > 0 &&
        (key.textContent?.includes(startWords) || key.closest('[aria-label="Keypad"]') !== null),
    );
    if (!isReady) return;
    watch.disconnect();
    // The frame after the next begins once this one is drawn.
    requestAnimationFrame(() =>
      requestAnimationFrame(() => {
        window.firstKeyAtMs = performance.now();
      }),
    );
  }).observe(document, { childList: true, subtree: true, attributes: true });
}

/** The same phone each time: its profile outlives the browser. */
async function withPhone<T>(
  profile: string,
  use: (context: BrowserContext) => Promise<T>,
): Promise<T> {
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu'],
    viewport: { width: 390, height: 844 },
    hasTouch: true,
  });
  context.setDefaultTimeout(PATIENCE_MS);
  try {
    return await use(context);
  } finally {
    await context.close();
  }
}
