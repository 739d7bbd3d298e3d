import type { Locator, Page } from '@playwright/test';
import { expect } from '@playwright/test';

/** Of a machine that is busy with other tests. */
export const PATIENTLY = { timeout: 20_000 };

/** The stopwatch's keys and figures, as a person with a page before them has them. */

/** Opens the stopwatch of a visit and ticks the cautions, where they are not ticked yet. @returns the key that starts */
export async function openToStart(page: Page, stopwatchUrl: string): Promise<Locator> {
  await page.goto(stopwatchUrl);
  const start = page.getByRole('button', { name: 'Start the clock' });
  await expect(start).toBeVisible(PATIENTLY);
  const cautions = page.getByRole('region', { name: 'Safety first' }).getByRole('checkbox');
  for (const caution of await cautions.all()) await caution.click();
  await expect(start).toBeEnabled(PATIENTLY);
  return start;
}

/** The same, and starts the clock. */
export async function startByKeys(page: Page, stopwatchUrl: string): Promise<void> {
  await (await openToStart(page, stopwatchUrl)).click();
  await expect.poll(() => readingsShown(page), PATIENTLY).toBe(0);
}

/** How many readings the page says there are; null: no run goes on on it. */
export function readingsShown(page: Page): Promise<number | null> {
  return page.evaluate(() => {
    const words = document.querySelector('header.sw-top button.sw-what span')?.textContent ?? '';
    const count = /^(\d+) readings?,/.exec(words)?.[1];
    return count === undefined ? null : Number(count);
  });
}

/** What the counter above the keys says. */
function counterSays(page: Page): Promise<string> {
  return page.evaluate(() => document.querySelector('.sw-counter .lab')?.textContent ?? '');
}

export type Tap = (figure: string) => Promise<void>;

/** With a finger. */
export function byKeypad(page: Page): Tap {
  const pad = page.getByRole('group', { name: 'Keypad' });
  return (figure) => pad.getByRole('button', { name: figure, exact: true }).click();
}

/** With a keyboard. */
export function byKeyboard(page: Page): Tap {
  return (figure) => page.keyboard.press(figure);
}

/** The figures that a value is typed with now: all of them, or the last two. */
export async function figuresNow(page: Page, tempF: number): Promise<string[]> {
  const figures = String(tempF).padStart(3, '0');
  return [...((await counterSays(page)).includes('all three') ? figures : figures.slice(-2))];
}

/** Types a value and answers what the page asks about it; resolves once the page shows one reading more. */
export async function readByKeys(page: Page, tempF: number, tap: Tap): Promise<void> {
  const before = await readingsShown(page);
  if (before === null) throw new Error('no run goes on on this page');
  for (const figure of await figuresNow(page, tempF)) await tap(figure);
  const hundreds = String(Math.floor(tempF / 100));
  await expect
    .poll(
      async () => {
        const says = await counterSays(page);
        if (says.includes('Which hundred')) await tap(hundreds);
        if (says.includes('again to keep it')) await tap(String(tempF % 10));
        return readingsShown(page);
      },
      { ...PATIENTLY, intervals: [20, 20, 40, 60, 100] },
    )
    .toBe(before + 1);
}

/** Says what has to be said and ends the run. */
export async function endByKeys(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Finish' }).click();
  await page.getByRole('radio', { name: 'On', exact: true }).check();
  await page.getByRole('radio', { name: 'Empty' }).check();
  await page.getByRole('button', { name: 'End the run' }).click();
}

/** What was kept as last lies at the end of the screen's own words: `Kept, 141 at 7:48`. */
export function lastKeptWords(page: Page): Promise<string> {
  return page.evaluate(() => document.querySelector('main p[role=status]')?.textContent ?? '');
}
