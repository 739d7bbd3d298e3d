import { brokenAt, cyclingReadings, plainLog, unitlessLog } from './support/probe-logs.ts';
import { asFile, sayHowItWasMade } from './support/upload-steps.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 1440, height: 900 } });

// Two runs of one afternoon, 15 minutes apart, in one record.
const BEFORE = cyclingReadings(1000);
const AFTER = cyclingReadings(900).map(({ timeS, tempF }) => ({ timeS: timeS + 1900, tempF }));

test('a file in an odd layout is refused with row and remedy, another is asked about, and is accepted split in two', async ({
  page,
}) => {
  await page.goto('/rounds');
  await page.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();
  await page.getByRole('link', { name: 'Upload a probe file' }).click();

  const damaged = brokenAt(plainLog(BEFORE), 40, '1e999');
  await page.getByLabel('Probe file').setInputFiles(asFile('damaged.csv', damaged));
  await expect(page.getByRole('heading', { name: 'damaged.csv was not read' })).toBeVisible();
  await expect(page.getByRole('alert')).toContainText('One thing to put right');
  await expect(page.getByRole('definition').nth(0)).toHaveText('40');
  await expect(page.getByRole('definition').nth(1)).toHaveText('Exhaust °F');
  await expect(page.getByRole('definition').nth(2)).toHaveText('1e999');
  await expect(page.getByText('cut that row out')).toBeVisible();

  await page.getByRole('button', { name: 'Choose another file' }).click();
  const odd = unitlessLog([...BEFORE, ...AFTER]);
  await page.getByLabel('Probe file').setInputFiles(asFile('outlet log.txt', odd));
  await expect(page.getByRole('heading', { name: /Which unit/ })).toBeVisible();
  await expect(page.getByRole('radio').first()).toBeChecked();
  await expect(page.getByRole('table').first()).toContainText('21.1');
  await page.getByRole('radio', { name: /Celsius/ }).check();
  await page.getByRole('button', { name: 'Read it this way' }).click();

  await expect(page.getByRole('heading', { name: /^952 readings over 46:40/ })).toBeVisible();
  await page.getByLabel('Where the probe sat').fill('In the duct');
  await page.getByLabel('Unit').selectOption('°F');
  await expect(page.getByText(/^0 cut-outs|^[0-9]+ cut-outs?/).first()).toBeVisible();
  await page.getByRole('button', { name: 'Read it as found again' }).click();
  await page.getByRole('radio', { name: /Celsius/ }).check();
  await page.getByRole('button', { name: 'Read it this way' }).click();
  // What was typed before the file was read anew is still there.
  await expect(page.getByLabel('Where the probe sat')).toHaveValue('In the duct');

  await page.getByRole('button', { name: 'Split into 2 runs' }).click();
  const end = page.getByRole('slider', { name: /^End of / }).last();
  await end.press('ArrowLeft');
  await expect(end).toHaveAttribute('aria-valuetext', '46:39');
  await expect(page.getByLabel('To', { exact: true }).last()).toHaveValue('46:39');

  await sayHowItWasMade(page, /^K2/);
  await page.getByRole('button', { name: 'Add a mark' }).click();
  await page.getByLabel('Time', { exact: true }).fill('99:00');
  await page.getByRole('button', { name: 'Accept 2 runs' }).click();
  await expect(page.getByRole('alert')).toContainText('The record ends at 46:40');
  await page.getByLabel('Time', { exact: true }).fill('3:20');
  await page.getByRole('button', { name: 'Accept 2 runs' }).click();

  await expect(page).toHaveURL(/\/visits\/[0-9a-f-]{36}#runs$/);
  const runs = page.getByRole('region', { name: 'Runs' }).getByRole('link', { name: /^Run \d/ });
  const soundRuns = runs.filter({ hasText: 'proven' });
  await expect.poll(() => soundRuns.count()).toBeGreaterThanOrEqual(2);
});
