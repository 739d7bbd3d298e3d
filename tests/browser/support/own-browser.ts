import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { chromium, type BrowserContext, type Page } from '@playwright/test';
import { CHROMIUM_ARGS, CHROMIUM_PATH } from './debians-chromium.ts';

export type OwnBrowser = Awaited<ReturnType<typeof openBrowser>>;

const ARGS = [
  '--headless=new',
  ...CHROMIUM_ARGS,
  '--password-store=basic',
  // After a crash it would ask whether to restore.
  '--hide-crash-restore-bubble',
  '--remote-debugging-port=0',
  '--window-size=500,900',
];

/**
 * A browser process of the test's own on a profile that outlives it: it may be killed as a phone's battery would, and a
 * tab that is behind another is hidden as on a phone, which a browser that Playwright starts itself keeps from happening.
 */
export async function openBrowser(profile: string) {
  const faults: string[] = [];
  const child = spawn(
    CHROMIUM_PATH,
    [...ARGS, `--user-data-dir=${profile}`, 'about:blank'],
    // A process group of its own, so that all of it can be ended at once.
    { detached: true, stdio: ['ignore', 'ignore', 'pipe'] },
  );
  // Not left behind, whatever ends the test.
  process.once('exit', killAll);
  let said = '';
  child.stderr.on('data', (chunk: Buffer) => (said += chunk.toString()));
  const address = () => /DevTools listening on (ws:\S+)/.exec(said)?.[1];
  for (let at = address(); at === undefined; at = address()) {
    if (child.exitCode !== null) throw new Error(`the browser did not open: ${said}`);
    await once(child.stderr, 'data');
  }
  const browser = await chromium.connectOverCDP(address() ?? '', { noDefaults: true });
  const [context] = browser.contexts();
  if (!context) throw new Error('the browser has no window');
  for (const page of context.pages()) watch(page);
  context.on('page', watch);

  function watch(page: Page): void {
    page.on('pageerror', (error) => faults.push(error.stack ?? error.message));
  }

  async function end(ask: () => void | Promise<void>): Promise<void> {
    if (child.exitCode !== null || child.signalCode !== null) return;
    const gone = once(child, 'exit');
    await ask();
    await gone;
    process.off('exit', killAll);
  }

  /** Every process of its group. */
  function killAll(): void {
    const isGone = child.exitCode !== null || child.signalCode !== null;
    if (child.pid !== undefined && !isGone) process.kill(-child.pid, 'SIGKILL');
  }

  async function askToClose(): Promise<void> {
    const session = await browser.newBrowserCDPSession();
    await session.send('Browser.close');
  }

  return {
    context,
    /** What no script of the page caught. */
    faults,
    firstPage: (): Promise<Page> => firstPage(context),
    /** Every process of it at once; nothing is written any more. */
    kill: () => end(killAll),
    close: () => end(askToClose),
  };
}

async function firstPage(context: BrowserContext): Promise<Page> {
  const page = context.pages()[0] ?? (await context.newPage());
  await page.setViewportSize({ width: 390, height: 844 });
  return page;
}
