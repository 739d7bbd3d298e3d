import type { Page } from '@playwright/test';
import { expect } from '@playwright/test';
import { byKeyboard, readByKeys } from './run-by-keys.ts';

/** First order from 75 °F towards 215 °F without a cut-out, read every ten seconds from 0:10 on: whole °F. */
export function heatingF(i: number): number {
  return Math.round(215 - 140 * Math.exp(-((i + 1) * 10) / 150));
}

/** Ten seconds later a reading; on a busy machine more time may have passed, and the page asks more. The page's clock is the test's. */
export async function keep(page: Page, tempF: number): Promise<void> {
  await page.clock.runFor(10_000);
  await readByKeys(page, tempF, byKeyboard(page));
  await expect(page.getByRole('status').first()).toContainText(`Kept, ${tempF} at`);
}

/** Heats on until the guard says so. @returns the number of the reading that comes next */
export async function heatUntil(
  page: Page,
  says: 'watch' | 'cut-heat',
  from: number,
): Promise<number> {
  let i = from;
  while (!(await page.locator(`main.sw-says-${says}`).isVisible())) {
    if (i > 40) throw new Error(`the guard never said ${says}`);
    await keep(page, heatingF(i));
    i += 1;
  }
  return i;
}
