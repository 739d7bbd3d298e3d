import type { BrowserContext, Page } from '@playwright/test';
import { expect } from '@playwright/test';
import { openBrowser } from './own-browser.ts';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';

/** What lies on a phone, and how it comes to lie there. */

const TOM = DEMO_PEOPLE.find(({ key }) => key === 'tom');

export async function signIn(page: Page, url: string): Promise<void> {
  await page.goto(`${url}/`);
  await page.getByLabel('E-mail').fill(TOM?.email ?? '');
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('link', { name: 'Rosalind Peake', exact: true })).toBeVisible({
    timeout: 20_000,
  });
}

/** Addresses whose answers lie on the phone. */
export async function laidBy(page: Page): Promise<string[]> {
  const answers = await storeOf(page, 'answers');
  return answers.map((each) => String(Reflect.get(each, 'url')));
}

/** Everything of one store of the device, as it lies there. */
export function storeOf(page: Page, store: 'answers' | 'things'): Promise<object[]> {
  return page.evaluate(async (name) => {
    const open = indexedDB.open('fusekeeper');
    await new Promise((resolve) => (open.onsuccess = resolve));
    const all = open.result.transaction(name).objectStore(name).getAll();
    await new Promise((resolve) => (all.onsuccess = resolve));
    open.result.close();
    return all.result as object[];
  }, store);
}

/** The application and every visit of the day lie on the phone. @returns the visits' ids */
export async function untilLaidBy(page: Page): Promise<string[]> {
  await page.waitForFunction(() => navigator.serviceWorker.controller !== null);
  const rounds = await page.evaluate(async () => (await fetch('/api/rounds')).json());
  const ids: string[] = rounds.visits.map(({ id }: { id: string }) => id);
  const visits = ids.map((id) => `/api/visits/${id}`);
  await expect
    .poll(() => laidBy(page), { timeout: 20_000 })
    .toEqual(expect.arrayContaining(visits));
  return ids;
}

/**
 * A profile in which Tom signed in and looked at the visits of the day. The browser was closed in good order after
 * that: it writes its cookies half a minute late.
 *
 * @returns the visits' ids
 */
export async function layByPhone(profile: string, url: string): Promise<string[]> {
  const browser = await openBrowser(profile);
  const page = await browser.firstPage();
  await signIn(page, url);
  const visits = await untilLaidBy(page);
  await browser.close();
  return visits;
}

/** Another page comes before this one, which is hidden meanwhile, as a phone's other application would. */
export async function lookAway<T>(
  context: BrowserContext,
  page: Page,
  meanwhile: (other: Page) => Promise<T>,
): Promise<T> {
  const other = await context.newPage();
  try {
    return await meanwhile(other);
  } finally {
    await other.close();
    await page.bringToFront();
  }
}
