import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 1440, height: 900 } });

test('a technician shares a run, the customer reads and prints it, and a revoked link says how to reach the shop', async ({
  page,
  anotherBrowser,
  foresee,
}) => {
  await page.goto('/jobs?state=all');
  await page.getByLabel('Find by name, street, number, make or serial').fill('Marlow');
  await expect(page).toHaveURL(/find=Marlow/);
  const job = page.getByRole('row').filter({ hasText: 'Towels take three rounds' });
  await job.getByRole('link').first().click();
  await page.getByRole('link', { name: 'After the new pipe' }).click();

  await page.getByRole('button', { name: 'Make a link' }).click();
  const link = await page.getByLabel(/^The link, shown this once/).inputValue();
  const token = link.split('#')[1] ?? '';
  // 128 bits or more need 22 characters of base64url.
  expect(token.length).toBeGreaterThanOrEqual(22);

  const phone = await anotherBrowser({ viewport: { width: 390, height: 844 } });
  await phone.goto(new URL(link).pathname + new URL(link).hash);
  await expect(phone.getByText('Harrow Lane Appliance Repair').first()).toBeVisible();
  await expect(phone.getByRole('heading', { name: 'May you use it tonight?' })).toBeVisible();
  await expect(phone.getByText('Towels take three rounds to dry')).toBeVisible();
  await expect(phone.getByRole('button', { name: 'Print or save as PDF' })).toBeVisible();
  const sheets = (await phone.pdf({ format: 'A4' })).toString('latin1').match(/\/Type\s*\/Page\b/g);
  expect(sheets).toHaveLength(1);

  const inside = await phone.request.get('/api/jobs');
  expect(inside.status()).toBe(401);

  await page.reload();
  await expect(page.getByText(/^Opened today/)).toBeVisible();
  await page.getByRole('button', { name: 'Take back' }).first().click();
  const slip = page.getByRole('dialog', { name: 'Take this link back?' });
  await slip.getByRole('button', { name: 'Take back' }).click();
  await expect(page.getByText(/taken back /).first()).toBeVisible();

  foresee(/\/api\/shared\/open$/, 404);
  await phone.reload();
  await expect(phone.getByRole('heading', { name: 'This link does not open' })).toBeVisible();
  await expect(phone.getByRole('link', { name: '555-0100' })).toBeVisible();
  await expect(phone.getByText('Hester Marlow')).toHaveCount(0);
});
