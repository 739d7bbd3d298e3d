import type { Page } from '@playwright/test';

/** A log that is made up in a test, as a browser takes it. */
export function asFile(name: string, text: string) {
  return { name, mimeType: 'text/csv', buffer: Buffer.from(text) };
}

/** What a technician says of a run on an empty drum, duct on, high heat. */
export async function sayHowItWasMade(page: Page, probe: RegExp): Promise<void> {
  const probes = page.getByLabel('Probe', { exact: true });
  const wanted = probes.locator('option').filter({ hasText: probe });
  await probes.selectOption(await wanted.first().getAttribute('value'));
  await page.getByLabel('Where the probe sat').fill('At the exhaust outlet');
  await page.getByRole('group', { name: 'Duct' }).getByLabel('On').check();
  await page.getByRole('group', { name: 'Drum' }).getByLabel('Empty').check();
  await page.getByRole('group', { name: 'Heat setting' }).getByLabel('High').check();
}
