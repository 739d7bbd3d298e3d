import { expect, test } from './support/watched-test.ts';

test.use({ person: 'tom', viewport: { width: 390, height: 844 } });

test('a runaway says stop and what to do, and a note on it hangs on the chart', async ({
  page,
}) => {
  await page.goto('/rounds');
  await page.getByRole('link', { name: 'Day before' }).click();
  await page.getByRole('link', { name: 'Rosalind Peake', exact: true }).click();
  await page.getByRole('link', { name: /As found/ }).click();

  await expect(page.getByText('Stop.', { exact: true })).toBeVisible();
  await expect(page.getByText('Do not leave this machine heating.')).toBeVisible();
  const next = page.getByRole('region', { name: 'In the next ten minutes' });
  await expect(next.getByRole('listitem').first()).toContainText('Cut the heat');
  await expect(next).toContainText('pull the plug or open the breaker');

  await page.getByRole('button', { name: 'Add a note' }).click();
  await page.getByRole('button', { name: 'Keep the note' }).click();
  await expect(page.getByRole('alert')).toContainText('to put right');
  await page.getByLabel('Time, m:ss').fill('12:40');
  await page.getByLabel('Note', { exact: true }).fill('Smell of hot lint at the door');
  await page.getByRole('button', { name: 'Keep the note' }).click();

  const note = page.getByRole('listitem').filter({ hasText: 'Smell of hot lint at the door' });
  await expect(note).toContainText('12:40');
  await expect(note.getByRole('button', { name: /^Change note [A-Z]$/ })).toBeVisible();

  await note.getByRole('button').click();
  await page.getByLabel('Note', { exact: true }).fill('Smell of hot lint, door shut');
  await page.getByRole('button', { name: 'Keep the note' }).click();
  await expect(page.getByText('Smell of hot lint, door shut')).toBeVisible();
  await expect(page.getByText('Smell of hot lint at the door')).toHaveCount(0);
});
