import { DEMO_PASSWORD } from '#server/demo/demo-people.ts';
import { sayHowItWasMade } from './support/upload-steps.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ viewport: { width: 390, height: 844 } });

test('a technician signs in, uploads a probe’s file on a visit and reads the verdict', async ({
  page,
}) => {
  await page.goto('/');
  await page.getByLabel('E-mail').fill('tom.birkett@harrowlane.example');
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();

  const stop = page.getByRole('listitem').filter({ hasText: 'Rosalind Peake' });
  await expect(stop.getByText(/^Callback, \d+ days? after job \d+$/)).toBeVisible();
  await expect(stop.getByText(/^Last time: /)).toBeVisible();
  await expect(stop.getByRole('link', { name: 'Call 555-0112' })).toHaveAttribute(
    'href',
    'tel:5550112',
  );
  await stop.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();

  await expect(page.getByText('not ticked yet')).toBeVisible();
  // The last tick stores them all, and the boxes give way to what was ticked: no box is left to look at.
  for (const caution of await page.getByRole('checkbox').all()) await caution.click();
  await expect(page.getByText(/^ticked \d/)).toBeVisible();

  await page.getByRole('link', { name: 'Upload a probe file' }).click();
  await page.getByLabel('Probe file').setInputFiles('sample-logs/in-band-relay-replaced.csv');

  await expect(page.getByRole('heading', { name: '721 readings over 12:00' })).toBeVisible();
  await expect(page.getByLabel('The exhaust is in column')).toHaveValue('Exhaust F');
  await expect(page.getByLabel('Clock')).toContainText('seconds');
  const firstRow = page.getByRole('row').filter({ hasText: '67.9' });
  await expect(firstRow.first()).toContainText('0:00');

  await page.getByRole('button', { name: 'Accept and judge' }).click();
  await expect(page.getByRole('alert')).toContainText('Four things to put right');
  await page.getByRole('link', { name: 'Say whether the duct was on or off' }).click();
  await expect(page.getByRole('group', { name: 'Duct' }).getByLabel('On')).toBeFocused();

  await sayHowItWasMade(page, /^K2/);
  await page.getByRole('button', { name: 'Accept and judge' }).click();

  await expect(page).toHaveURL(/\/runs\/[0-9a-f-]{36}$/);
  await expect(page.getByText('Proven by this run.')).toBeVisible();
});

test('a file that cannot be a log is told so before it is sent, and a cancelled one leaves nothing', async ({
  page,
  signedIn,
  baseURL,
  anotherBrowser,
}) => {
  const phone = await anotherBrowser({
    storageState: await signedIn('tom', baseURL ?? ''),
    viewport: { width: 390, height: 844 },
  });
  await page.close();
  await phone.goto('/rounds');
  await phone.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();
  await phone.getByRole('link', { name: 'Upload a probe file' }).click();
  const picker = phone.getByLabel('Probe file');

  await picker.setInputFiles({
    name: 'chart.png',
    mimeType: 'image/png',
    buffer: Buffer.from('x'),
  });
  await expect(phone.getByRole('alert')).toContainText('must be a .csv or .txt');
  await expect(phone).toHaveTitle(/^Error: /);

  await picker.setInputFiles({ name: 'log.csv', mimeType: 'text/csv', buffer: Buffer.alloc(0) });
  await expect(phone.getByRole('alert')).toContainText('The selected file is empty');

  await picker.setInputFiles('sample-logs/in-band-relay-replaced.csv');
  await phone.getByRole('button', { name: 'Throw it away' }).click();
  const slip = phone.getByRole('dialog', { name: 'Throw this file away?' });
  const gone = phone.waitForResponse((response) => response.request().method() === 'DELETE');
  await slip.getByRole('button', { name: 'Throw it away' }).click();
  expect((await gone).status()).toBe(204);
  await expect(phone.getByRole('heading', { name: 'Runs' })).toBeVisible();
});
