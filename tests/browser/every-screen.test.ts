import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { SCREENS } from './support/screens.ts';
import { expect, test } from './support/watched-test.ts';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
const WIDTHS = [320, 390, 1440];
const THEMES = ['day', 'night'];
const SITE_TARGET_PX = 48;

for (const { name, person, open, standing, isSite } of SCREENS) {
  test.describe(name, () => {
    test.use({ person, viewport: { width: 390, height: 844 } });

    test(`${name}: nothing that axe finds, no sideways scroll, day and night, at every width`, async ({
      page,
      foresee,
    }) => {
      if (name === 'closed link') foresee(/\/api\/shared\/open$/, 404);
      await open(page);
      await expect(page.getByText(standing).filter({ visible: true }).first()).toBeVisible();
      for (const width of WIDTHS) {
        await page.setViewportSize({ width, height: width < 700 ? 844 : 900 });
        expect(await sidewaysPx(page), `sideways scroll at ${width} px`).toBe(0);
        if (isSite && width < 700) expect(await smallTargets(page)).toEqual([]);
        for (const theme of THEMES) {
          await page.evaluate((to) => (document.documentElement.dataset['theme'] = to), theme);
          expect(await violations(page), `${theme}, ${width} px`).toEqual([]);
        }
      }
    });
  });
}

async function sidewaysPx(page: Page): Promise<number> {
  return page.evaluate(() =>
    Math.max(0, document.documentElement.scrollWidth - document.documentElement.clientWidth),
  );
}

/** Each violation with the places it was found at. */
async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .options({ resultTypes: ['violations'] })
    .withTags(TAGS)
    .setLegacyMode()
    .analyze();
  return found.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join('\n')}`);
}

/** Controls of a site screen that a thumb could miss. A tick or a radio is as large as its label. */
async function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate((leastPx) => {
    const controls = document.querySelectorAll<HTMLElement>(
      'main a[href], nav a[href], header a[href], button, input, select, textarea, summary, [role=slider]',
    );
    return [...controls].flatMap((control) => {
      const target = control.matches('[type=checkbox], [type=radio]')
        ? (control.closest('label') ?? control)
        : control;
      const { width, height } = target.getBoundingClientRect();
      const isSeen = width > 1 && control.checkVisibility();
      const isLarge = width >= leastPx - 0.5 && height >= leastPx - 0.5;
      return !isSeen || isLarge
        ? []
        : [`${Math.round(width)} × ${Math.round(height)}: ${target.outerHTML.slice(0, 120)}`];
    });
  }, SITE_TARGET_PX);
}
