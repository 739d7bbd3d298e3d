import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import type { Page } from '@playwright/test';
import { cyclingReadings, plainLog } from './support/probe-logs.ts';
import { asFile, sayHowItWasMade } from './support/upload-steps.ts';
import { expect, test } from './support/watched-test.ts';

const OWNER = {
  name: 'Ines Varga',
  email: 'ines@tessford.example',
  password: 'three odd words 48',
};

test.use({
  baseURL: `http://127.0.0.1:${process.env['FK_EMPTY_PORT']}`,
  viewport: { width: 1440, height: 900 },
});

/** `npm run owner` on the data folder of the server that started empty. */
async function makeOwner(): Promise<void> {
  const env = {
    ...process.env,
    DATA_DIR: process.env['FK_EMPTY_DATA'],
    OWNER_NAME: OWNER.name,
    OWNER_EMAIL: OWNER.email,
    OWNER_PASSWORD: OWNER.password,
  };
  await promisify(execFile)(process.execPath, ['dist/server/commands/make-owner.js'], { env });
}

async function goTo(page: Page, place: string): Promise<void> {
  await page
    .getByRole('navigation', { name: 'Main', exact: true })
    .getByRole('link', { name: place, exact: true })
    .click();
}

/** The page with this heading stands: what is typed from here on goes into it. */
async function opened(page: Page, heading: string): Promise<void> {
  await expect(page.getByRole('heading', { name: heading, exact: true })).toBeVisible();
}

async function addTechnician(page: Page): Promise<void> {
  await goTo(page, 'Shop');
  await page.getByRole('link', { name: 'Add a person' }).click();
  await opened(page, 'Add a person');
  await page.getByLabel('Name', { exact: true }).fill('Pell Arden');
  await page
    .getByLabel('E-mail, which they sign in with', { exact: true })
    .fill('pell@tessford.example');
  await page.getByRole('group', { name: 'Role' }).getByLabel('technician', { exact: true }).check();
  await page.getByLabel('First password', { exact: true }).fill('kettle orchard 12');
  await page.getByRole('button', { name: 'Add the person' }).click();
  await expect(page.getByText('Pell Arden')).toBeVisible();
}

async function addRatingAndProbe(page: Page): Promise<void> {
  await goTo(page, 'Ratings');
  await page.getByRole('link', { name: 'Add a rating' }).click();
  await opened(page, 'New rating');
  await page.getByLabel('Name or part number', { exact: true }).fill('HL-155-25');
  await page.getByLabel('Opens, °F', { exact: true }).fill('155');
  await page.getByLabel('Closes, °F', { exact: true }).fill('165');
  await page.getByRole('button', { name: 'Save the rating' }).click();
  await expect(page.getByRole('alert')).toContainText('Enter a temperature below the one it opens');
  await page.getByLabel('Closes, °F', { exact: true }).fill('130');
  await page.getByRole('button', { name: 'Save the rating' }).click();
  await expect(page.getByRole('link', { name: 'HL-155-25' })).toBeVisible();

  await page.getByRole('link', { name: 'Add a probe' }).click();
  await opened(page, 'New probe');
  await page.getByLabel('Name', { exact: true }).fill('Probe 1');
  await page.getByLabel('Accuracy, ±', { exact: true }).fill('2');
  await page.getByRole('button', { name: 'Save the probe' }).click();
  await expect(page.getByText('Probe 1')).toBeVisible();
}

/** The customer, the home, the machine, the complaint and the first visit, in the order a call tells them. */
async function takeFirstCall(page: Page): Promise<void> {
  await goTo(page, 'Jobs');
  await page.getByRole('link', { name: 'Take the first call' }).click();
  await opened(page, 'Take a call');
  await page.getByLabel('Name', { exact: true }).fill('Corin Hale');
  await page.getByLabel('Phone', { exact: true }).fill('555-0177');
  await page.getByRole('button', { name: 'Add the customer' }).click();
  await page.getByLabel('Address', { exact: true }).fill('7 Mill Steps');
  await page.getByRole('button', { name: 'Add the home' }).click();
  await page.getByLabel('Make', { exact: true }).fill('Vesper');
  await page.getByLabel('Model', { exact: true }).fill('V5');
  await page.getByRole('button', { name: 'Add the machine' }).click();
  await page
    .getByLabel('Complaint, in the customer’s words', { exact: true })
    .fill('Stone cold since Sunday.');
  await page.getByLabel('Technician', { exact: true }).selectOption('Pell Arden');
  await page.getByLabel('From', { exact: true }).fill('08:00');
  await page.getByLabel('To', { exact: true }).fill('09:30');
  await page.getByRole('button', { name: 'Take the call' }).click();
  await expect(page.getByRole('heading', { name: '“Stone cold since Sunday.”' })).toBeVisible();
}

test('from an empty shop the owner adds all that a run needs by form, and walks to its verdict', async ({
  page,
}) => {
  await makeOwner();
  await page.goto('/');
  await page.getByLabel('E-mail', { exact: true }).fill(OWNER.email);
  await page.getByLabel('Password', { exact: true }).fill(OWNER.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByText('No job yet.')).toBeVisible();

  await addTechnician(page);
  await addRatingAndProbe(page);
  await takeFirstCall(page);

  await page.getByRole('link', { name: 'Vesper V5, electric' }).click();
  await page.getByRole('link', { name: 'Set what it should have on high heat' }).click();
  await page
    .getByLabel('Thermostat, or thermistor set-point', { exact: true })
    .selectOption({ index: 1 });
  await page.getByRole('button', { name: 'Save what it should have' }).click();
  await expect(page.getByText('opens 155 ± 5, closes 130 ± 5 °F').first()).toBeVisible();

  await goTo(page, 'Rounds');
  await expect(page.getByRole('heading', { name: 'Pell Arden' })).toBeVisible();
  await page.getByRole('link', { name: 'Corin Hale', exact: true }).click();
  await page.getByRole('link', { name: 'Upload a probe file' }).click();
  const log = asFile('outlet.csv', plainLog(cyclingReadings(1100)));
  await page.getByLabel('Probe file', { exact: true }).setInputFiles(log);
  await sayHowItWasMade(page, /^Probe 1/);
  await page.getByRole('button', { name: 'Accept and judge' }).click();

  await expect(page).toHaveURL(/\/runs\/[0-9a-f-]{36}$/);
  await expect(page.getByText('Proven by this run.')).toBeVisible();
});
