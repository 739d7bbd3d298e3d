import { cp, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import type { Page } from '@playwright/test';
import { expect } from '@playwright/test';
import type { ownServer } from './own-server.ts';
import { openBrowser, type OwnBrowser } from './own-browser.ts';
import { layByPhone, lookAway, storeOf } from './phone.ts';
import { openRelay, type Fate, type Relay } from './relay.ts';
import { createServerRecord, type ServerRecord } from './server-record.ts';
import {
  byKeyboard,
  byKeypad,
  endByKeys,
  figuresNow,
  PATIENTLY,
  readByKeys,
  readingsShown,
  startByKeys,
} from './run-by-keys.ts';

type OwnServer = Awaited<ReturnType<typeof ownServer>>;

/** A server, the bad line before it, and a profile in which the visits of the day lie ready. */
export type BadLine = {
  server: OwnServer;
  relay: Relay;
  record: ServerRecord;
  profile: string;
  visits: string[];
};

export async function openBadLine(server: OwnServer): Promise<BadLine> {
  const relay = await openRelay({ to: server.url, killServer: server.kill });
  const profile = await mkdtemp(join(tmpdir(), 'fusekeeper-phone-'));
  const visits = await layByPhone(profile, relay.url);
  return { server, relay, record: createServerRecord(server), profile, visits };
}

export async function closeBadLine({ relay, profile, server }: BadLine): Promise<void> {
  await relay.close();
  await rm(profile, { recursive: true, force: true });
  await server.remove();
}

/** What was being done when page or process went: it may be on the device, and may not. */
type Doubt = { tempF: number } | null;

export type BadDay = Awaited<ReturnType<typeof beginBadDay>>;

/**
 * A run on a phone of its own on which things go wrong. It keeps count of every reading that the page has shown; after
 * each return of the page they are held against what it shows then.
 */
export async function beginBadDay(line: BadLine, visitId: string) {
  const { server, relay } = line;
  const profile = await mkdtemp(join(tmpdir(), 'fusekeeper-day-'));
  await cp(line.profile, profile, { recursive: true });
  const stopwatch = `${relay.url}/visits/${visitId}/stopwatch`;
  const known = new Set(await line.record.runsOf(visitId));
  const linesBefore = new Set(line.record.linesOf(visitId).map(({ id }) => id));
  const faults: string[] = [];
  const shown: number[] = [];
  let isOffline = false;
  let browser: OwnBrowser = await openBrowser(profile);
  let page: Page = await browser.firstPage();
  let tempF = 75;

  await startByKeys(page, stopwatch);

  async function openAgain(): Promise<void> {
    faults.push(...browser.faults);
    browser = await openBrowser(profile);
    page = await browser.firstPage();
    await browser.context.setOffline(isOffline);
    await page.goto(stopwatch);
  }

  /** The page shows what it showed before, and at most what was in doubt besides. */
  async function stands(doubt: Doubt): Promise<void> {
    await expect.poll(() => readingsShown(page), PATIENTLY).not.toBeNull();
    const count = await readingsShown(page);
    if (doubt && count === shown.length + 1) shown.push(doubt.tempF);
    expect(count, 'readings on the page that came back').toBe(shown.length);
  }

  /** The end was tapped a moment ago: it is kept and the run is over, or it goes on and is ended again. */
  async function killEnding(): Promise<void> {
    await browser.kill();
    await openAgain();
    const start = page.getByRole('button', { name: 'Start the clock' });
    await expect(start.or(page.getByRole('timer'))).toBeVisible(PATIENTLY);
    if (await start.isVisible()) return;
    await stands(null);
    await endByKeys(page);
  }

  const tap = (isByHand: boolean) => (isByHand ? byKeypad(page) : byKeyboard(page));

  return {
    shown,
    page: () => page,

    async read(isByHand: boolean): Promise<void> {
      tempF += 1;
      await readByKeys(page, tempF, tap(isByHand));
      shown.push(tempF);
    },

    async undo(): Promise<void> {
      if (shown.length === 0) return;
      await page.keyboard.press('Backspace');
      await expect.poll(() => readingsShown(page), PATIENTLY).toBe(shown.length - 1);
      shown.pop();
    },

    async mark(letter: 'c' | 'h'): Promise<void> {
      await page.keyboard.press(letter);
    },

    /** All figures of a reading but for the last `untyped`, and nothing is waited for. */
    async typeInHaste(untyped: number): Promise<Doubt> {
      tempF += 1;
      const figures = await figuresNow(page, tempF);
      const typed = figures.slice(0, figures.length - untyped);
      for (const figure of typed) await page.keyboard.press(figure);
      return untyped === 0 ? { tempF } : null;
    },

    async reload(doubt: Doubt = null): Promise<void> {
      await page.reload();
      await stands(doubt);
    },

    /** The browser's every process is killed. */
    async kill(doubt: Doubt = null): Promise<void> {
      await browser.kill();
      await openAgain();
      await stands(doubt);
    },

    async setOffline(next: boolean): Promise<void> {
      isOffline = next;
      await browser.context.setOffline(next);
    },

    /** The page is hidden for a moment; on its return it sends. */
    lookAway: () => lookAway(browser.context, page, () => pause(100)),

    /** Another tab of the application sends as well. */
    async sendElsewhere(): Promise<void> {
      await lookAway(browser.context, page, async (other) => {
        await other.goto(`${relay.url}/unsent`);
        const send = other.getByRole('button', { name: 'Send now' });
        const over = other.getByText('Everything is with the shop.');
        await expect(send.or(over).first()).toBeVisible(PATIENTLY);
        if (await send.isVisible()) await send.click({ timeout: 2_000 }).catch(() => {});
        await pause(150);
      });
    },

    /** A second tab on the stopwatch takes no readings; the first one closed, it goes on with the run. */
    async moveToSecondTab(): Promise<void> {
      const second = await browser.context.newPage();
      await second.setViewportSize({ width: 390, height: 844 });
      await second.goto(stopwatch);
      await expect(second.getByText('A run is being taken in another tab.')).toBeVisible(PATIENTLY);
      await page.close();
      page = second;
      await stands(null);
    },

    async serverUp(): Promise<void> {
      if (!server.isUp()) await server.start();
    },
    serverDown: () => server.kill(),
    meets: (...fates: Fate[]) => void relay.fates.push(...fates),

    /** All is well again: the run is ended and sent, and what the server has is held against what was shown. */
    async end(isKilled: boolean): Promise<Verdict> {
      relay.fates.length = 0;
      if (!server.isUp()) await server.start();
      isOffline = false;
      await browser.context.setOffline(false);
      await endByKeys(page);
      if (isKilled) await killEnding();
      else
        await expect(page.getByText(/^Judged on this phone by engine version/)).toBeVisible(
          PATIENTLY,
        );
      await expect
        .poll(
          async () => {
            await lookAway(browser.context, page, () => pause(50));
            return (await thingsOf(page)).filter(({ state }) => state === 'unsent').length;
          },
          { timeout: 60_000, intervals: [200, 500, 1000, 2000] },
        )
        .toBe(0);
      const kept = await thingsOf(page);
      faults.push(...browser.faults);
      const made = (await line.record.runsOf(visitId)).filter((id) => !known.has(id));
      const lines = line.record.linesOf(visitId).filter(({ id }) => !linesBefore.has(id));
      const received = made[0] === undefined ? [] : await line.record.readingsOf(made[0]);
      return verdictOf({ shown, received, made, lines, kept, faults });
    },

    async close(): Promise<void> {
      relay.fates.length = 0;
      await browser.kill();
      await rm(profile, { recursive: true, force: true });
    },
  };
}

type KeptHere = { id: string; kind: string; state: string; payload: { id?: string; n?: number } };

function thingsOf(page: Page): Promise<KeptHere[]> {
  return storeOf(page, 'things') as Promise<KeptHere[]>;
}

export type Verdict = {
  /** The run that the server made; '' where it made none. */
  runId: string;
  shown: number;
  /** Readings that were on the screen and are not with the server. */
  lost: number[];
  /** Readings that the server has more often than they were taken. */
  doubled: number[];
  /** Everything else that is not as it must be. */
  problems: string[];
};

type Found = {
  shown: number[];
  received: number[];
  made: string[];
  lines: ReturnType<ServerRecord['linesOf']>;
  kept: KeptHere[];
  faults: string[];
};

function verdictOf({ shown, received, made, lines, kept, faults }: Found): Verdict {
  const problems = faults.map((fault) => `page: ${fault}`);
  if (made.length !== 1) problems.push(`${made.length} runs were made`);
  if (new Set(lines.map(({ runId }) => runId)).size !== 1) problems.push('lines of several runs');
  if (lines.some(({ n }, at) => n !== at)) problems.push('lines with a hole or out of order');
  const onDevice = kept.filter(({ kind }) => kind === 'run-event').map(({ payload }) => payload.id);
  const there = new Set(lines.map(({ id }) => id));
  // Opened again after its end, the page lets go of a run that was sent whole.
  const isHere = onDevice.length > 0;
  if (isHere && (onDevice.length !== there.size || onDevice.some((id) => !there.has(id ?? '')))) {
    problems.push(`${onDevice.length} lines on the device, ${there.size} with the server`);
  }
  const stuck = kept.filter(({ state }) => state !== 'applied');
  if (stuck.length > 0) problems.push(`${stuck.length} things: ${stuck[0]?.state}`);
  if (received.some((tempF, at) => at > 0 && tempF < received[at - 1]!)) problems.push('disorder');
  return { runId: made[0] ?? '', shown: shown.length, ...heldAgainst(shown, received), problems };
}

/** Every reading of a day is another figure, so that one too few and one too many cannot make up for each other. */
function heldAgainst(shown: number[], received: number[]): Pick<Verdict, 'lost' | 'doubled'> {
  const left = [...received];
  const lost = shown.filter((tempF) => {
    const at = left.indexOf(tempF);
    if (at >= 0) left.splice(at, 1);
    return at < 0;
  });
  return { lost, doubled: left };
}
