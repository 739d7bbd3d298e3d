import type { Locator, Page } from '@playwright/test';
import { sidewaysPx } from './support/look-at.ts';
import { heatUntil } from './support/read-until.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 390, height: 844 } });
test.setTimeout(240_000);

/** As far as the Tab key takes to get there; it never goes behind anything on the way (WCAG 2.2, 2.4.11). */
async function tabTo(page: Page, target: Locator): Promise<void> {
  for (let presses = 0; presses < 60; presses++) {
    await page.keyboard.press('Tab');
    expect(
      await isInSight(page),
      await page.evaluate(() => document.activeElement?.outerHTML),
    ).toBe(true);
    if (await target.evaluate((element) => element === document.activeElement)) return;
  }
  throw new Error('the Tab key does not get there');
}

/** What has the focus is seen: some of it lies on top, at its middle or at an edge. */
async function isInSight(page: Page): Promise<boolean> {
  return page.evaluate(() => {
    const held = document.activeElement;
    if (!held || held === document.body) return true;
    const target = held.closest('label') ?? held;
    const { left, top, width, height } = target.getBoundingClientRect();
    return [0.15, 0.5, 0.85].some((share) => {
      const onTop = document.elementFromPoint(left + width / 2, top + height * share);
      return onTop !== null && (target.contains(onTop) || onTop.contains(target));
    });
  });
}

const held = (page: Page) => page.locator(':focus');
const kept = (page: Page) => page.getByRole('status').first();

test('a run is taken from the visit to its outcome by the keyboard alone, and said aloud', async ({
  page,
}) => {
  const { visits } = await (await page.request.get('/api/rounds')).json();
  const visit = visits.find(
    (each: { job: { machine: { fuel: string } } }) => each.job.machine.fuel === 'electric',
  );
  await page.clock.install({ time: new Date() });
  await page.goto(`/visits/${visit.id}`);
  await tabTo(page, page.getByRole('link', { name: /stopwatch/i }).first());
  await page.keyboard.press('Enter');
  const start = page.getByRole('button', { name: 'Start the clock' });
  await expect(start).toBeVisible();
  for (const caution of await page
    .getByRole('region', { name: 'Safety first' })
    .getByRole('checkbox')
    .all()) {
    await tabTo(page, caution);
    await page.keyboard.press('Space');
  }
  await expect(start).toBeEnabled();
  await tabTo(page, start);
  await page.keyboard.press('Enter');

  await expect(page.getByRole('heading', { level: 1 })).toBeFocused();
  await page.clock.runFor(10_000);
  await page.keyboard.type('075');
  await expect(kept(page)).toContainText(/^Kept, 75 at 0:1\d, 1 reading$/);
  await expect(page.getByRole('group', { name: 'Keypad' })).toMatchAriaSnapshot(`
    - group "Keypad":
      - button "1"
      - button "2"
      - button "3"
      - button "4"
      - button "5"
      - button "6"
      - button "7"
      - button "8"
      - button "9"
      - button "0"
      - button "Click heard"
      - button "Heat off"
      - button "Same 75"
      - button "Other value"
      - button "Undo"
  `);
  await page.clock.runFor(10_000);
  const pad = page.getByRole('group', { name: 'Keypad' });
  await tabTo(page, pad.getByRole('button', { name: '8', exact: true }));
  await page.keyboard.press('Enter');
  await page.keyboard.press('Space');
  await expect(kept(page)).toContainText('Kept, 88 at');
  await expect(page.getByRole('img', { name: '2 readings; the last is 88.0 °F.' })).toBeVisible();

  const mark = page.getByRole('button', { name: 'Mark', exact: true });
  await mark.focus();
  await page.keyboard.press('Enter');
  const slip = page.getByRole('dialog', { name: /^Mark / });
  await expect(slip.getByRole('button', { name: 'Flame on' })).toBeFocused();
  await page.keyboard.press('5');
  await tabTo(page, slip.getByRole('button', { name: 'Note' }));
  await page.keyboard.press('Enter');
  await tabTo(page, slip.getByLabel('Note'));
  await page.keyboard.type('door 10 cm open, c h s o m 5');
  await page.keyboard.press('Enter');
  await expect(slip).toBeHidden();
  await expect(mark).toBeFocused();
  await expect(kept(page)).toContainText('Marked');
  await page.keyboard.press('m');
  await expect(page.getByRole('dialog')).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(page.getByRole('dialog')).toBeHidden();
  await expect(mark).toBeFocused();
  await page.clock.runFor(10_000);
  await page.keyboard.press('s');
  await expect(kept(page)).toContainText(/^Kept, 88 at .*, 3 readings$/);

  await page.getByRole('button', { name: /3 readings/ }).focus();
  await page.keyboard.press('Enter');
  const run = page.getByRole('dialog', { name: 'This run' });
  await expect(run.getByText('door 10 cm open, c h s o m 5')).toBeVisible();
  await expect(run.getByRole('button', { name: /^Correct / })).toHaveCount(3);
  await page.keyboard.press('Escape');
  await expect(page.getByRole('button', { name: /3 readings/ })).toBeFocused();

  await page.getByRole('button', { name: 'Finish' }).focus();
  await page.keyboard.press('Enter');
  const end = page.getByRole('dialog', { name: 'End this run?' });
  await expect(end).toBeVisible();
  for (const [group, words] of [
    ['Duct', 'On'],
    ['Drum', 'Empty'],
  ] as const) {
    await tabTo(page, end.getByRole('group', { name: group }).getByRole('radio').first());
    await page.keyboard.press('Space');
    await expect(end.getByRole('radio', { name: words, exact: true })).toBeChecked();
  }
  await tabTo(page, end.getByRole('button', { name: 'End the run' }));
  await page.keyboard.press('Enter');
  await expect(page.getByRole('button', { name: 'Take another run' })).toBeVisible();
  await expect(page.getByRole('heading', { level: 1 })).toBeFocused();
  await expect(held(page)).toHaveText(/\w/);
});

/** Words that are cut off, and keys that lie over each other or cannot be brought into view. */
async function lost(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const found: string[] = [];
    const root =
      document.querySelector('dialog[open]') ?? document.querySelector('main') ?? document.body;
    for (const element of root.querySelectorAll<HTMLElement>('*')) {
      if (element.closest('svg, .sr-only, .sw-live') || !element.checkVisibility()) continue;
      const isWide = element.scrollWidth > element.clientWidth + 1;
      const hasWords = [...element.childNodes].some(
        (node) => node.nodeType === Node.TEXT_NODE && node.textContent?.trim(),
      );
      const isBox = getComputedStyle(element).display !== 'inline' && element.clientWidth > 1;
      if (hasWords && isBox && isWide) found.push(`cut off: ${element.outerHTML.slice(0, 90)}`);
    }
    const keys = [
      ...root.querySelectorAll<HTMLElement>('button, a[href], select, label:has(input)'),
    ].filter((key) => key.checkVisibility() && !key.closest('.sr-only'));
    const boxes = keys.map((key) => key.getBoundingClientRect());
    boxes.forEach((one, i) => {
      const name = keys[i]?.textContent?.trim() ?? '';
      if (one.left < -1 || one.right > innerWidth + 1) found.push(`out of the page: ${name}`);
      boxes.slice(i + 1).forEach((other, k) => {
        const isInside = keys[i]?.closest('.sw-foot') || keys[i + 1 + k]?.closest('.sw-foot');
        const isOver =
          one.left < other.right - 1 &&
          other.left < one.right - 1 &&
          one.top < other.bottom - 1 &&
          other.top < one.bottom - 1;
        if (isOver && !isInside)
          found.push(`lie over each other: ${name}, ${keys[i + 1 + k]?.textContent}`);
      });
    });
    return found;
  });
}

/** As large as it gets: twice the text, then twice the page, on two phones. */
async function expectNothingLost(page: Page, state: string): Promise<void> {
  for (const [width, height] of [
    [390, 844],
    [320, 640],
  ] as const) {
    for (const [way, zoom, text] of [
      ['text', 1, '200%'],
      ['page', 2, ''],
    ] as const) {
      await page.setViewportSize({ width: width / zoom, height: height / zoom });
      await page.evaluate((size) => (document.documentElement.style.fontSize = size), text);
      const sight = `${state}, ${way} at 200 %, ${width} px`;
      expect(await sidewaysPx(page), `${sight}: sideways scroll`).toBe(0);
      expect(await lost(page), sight).toEqual([]);
    }
  }
  await page.evaluate(() => (document.documentElement.style.fontSize = ''));
}

test('at twice the text or twice the page nothing of the stopwatch is cut off, covered or out of reach', async ({
  page,
}) => {
  const { visits } = await (await page.request.get('/api/rounds')).json();
  await page.clock.install({ time: new Date() });
  await page.goto(`/visits/${visits.at(-1).id}/stopwatch`);
  const start = page.getByRole('button', { name: 'Start the clock' });
  await expect(start).toBeVisible();
  await expectNothingLost(page, 'before the run');
  for (const caution of await page
    .getByRole('region', { name: 'Safety first' })
    .getByRole('checkbox')
    .all()) {
    await caution.click();
  }
  await start.click();
  await expect(page.getByText('Type all three figures')).toBeVisible();
  const next = await heatUntil(page, 'watch', 0);
  await expectNothingLost(page, 'watch');
  await page.keyboard.press('m');
  await expectNothingLost(page, 'slip of marks');
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: /\d readings/ }).click();
  await expect(page.getByRole('dialog')).toBeVisible();
  await expectNothingLost(page, 'slip of the run');
  await page.keyboard.press('Escape');
  await heatUntil(page, 'cut-heat', next);
  await expectNothingLost(page, 'cut-heat');
  await page.getByRole('button', { name: 'Finish' }).click();
  await expectNothingLost(page, 'end of the run');
});
