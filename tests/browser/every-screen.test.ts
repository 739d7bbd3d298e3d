import { lookAt } from './support/look-at.ts';
import { SCREENS } from './support/screens.ts';
import { expect, test } from './support/watched-test.ts';

for (const { name, person, open, standing, isSite = false } of SCREENS) {
  test.describe(name, () => {
    test.use({ person, viewport: { width: 390, height: 844 } });

    test(`${name}: nothing that axe finds, no sideways scroll, day and night, at every width`, async ({
      page,
      foresee,
    }) => {
      if (name === 'closed link') foresee(/\/api\/shared\/open$/, 404);
      await open(page);
      await expect(page.getByText(standing).filter({ visible: true }).first()).toBeVisible();
      await lookAt(page, name, { isSite });
    });
  });
}
