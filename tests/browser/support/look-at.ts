import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
const SITE_TARGET_PX = 48;
const PAD_KEY_PX = 64;

export type Theme = 'day' | 'night';
/** As wide as the screen, and its ground. */
export type Sight = { width: number; theme: Theme };

export const EVERY_SIGHT: Sight[] = [320, 390, 1440].flatMap((width) => [
  { width, theme: 'day' as const },
  { width, theme: 'night' as const },
]);
/** Each ground once, on the narrowest page and on a desk's: for states of a page that was looked at whole. */
export const TWO_SIGHTS: Sight[] = [
  { width: 320, theme: 'night' },
  { width: 1440, theme: 'day' },
];

type LookOptions = { sights?: Sight[]; isSite?: boolean };

/** Nothing that axe finds, no sideways scroll, no target that a thumb could miss, in every sight. */
export async function lookAt(
  page: Page,
  state: string,
  { sights = EVERY_SIGHT, isSite = true }: LookOptions = {},
): Promise<void> {
  for (const { width, theme } of sights) {
    const isPhone = width < 700;
    await page.setViewportSize({ width, height: isPhone ? 844 : 900 });
    await page.evaluate((to) => (document.documentElement.dataset['theme'] = to), theme);
    const sight = `${state}, ${theme}, ${width} px`;
    expect(await sidewaysPx(page), `${sight}: sideways scroll`).toBe(0);
    if (isSite && isPhone) expect(await smallTargets(page), sight).toEqual([]);
    expect(await violations(page), sight).toEqual([]);
  }
}

export async function sidewaysPx(page: Page): Promise<number> {
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
  return page.evaluate(
    ([sitePx, padPx]) => {
      const within = document.querySelector('dialog[open]') ?? document;
      const controls = within.querySelectorAll<HTMLElement>(
        'main a[href], nav a[href], header a[href], button, input, select, textarea, summary, [role=slider]',
      );
      return [...controls].flatMap((control) => {
        const target = control.matches('[type=checkbox], [type=radio]')
          ? (control.closest('label') ?? control)
          : control;
        const leastPx = control.matches('.sw-key') ? padPx : sitePx;
        const { width, height } = target.getBoundingClientRect();
        const isSeen = width > 1 && control.checkVisibility();
        const isLarge = width >= leastPx - 0.5 && height >= leastPx - 0.5;
        return !isSeen || isLarge
          ? []
          : [`${Math.round(width)} × ${Math.round(height)}: ${target.outerHTML.slice(0, 120)}`];
      });
    },
    [SITE_TARGET_PX, PAD_KEY_PX] as const,
  );
}
