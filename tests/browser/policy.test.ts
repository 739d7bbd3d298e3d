import { expect, test } from './support/watched-test.ts';

test('every answer carries a policy that lets nothing of another origin in', async ({ page }) => {
  const opened = await page.goto('/sign-in');
  const health = await page.request.get('/api/health');
  const nowhere = await page.request.get('/assets/nowhere.js');

  for (const headers of [opened?.headers(), health.headers(), nowhere.headers()]) {
    const policy = headers?.['content-security-policy'] ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("script-src 'self'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe-');
    expect(headers?.['x-content-type-options']).toBe('nosniff');
  }
});

// The watch itself: each of these must fail, or the other tests watch nothing.
test.fail('an error on the console fails a test', async ({ page }) => {
  await page.goto('/sign-in');
  const told = page.waitForEvent('pageerror');
  await page.evaluate(() => setTimeout(() => window.reportError(new Error('nobody caught this'))));
  await told;
});

test.fail('a breach of the policy fails a test', async ({ page }) => {
  await page.goto('/sign-in');
  await page.evaluate(() => document.body.setAttribute('style', 'color: red'));
  await page.evaluate(() => new Promise((resolve) => requestAnimationFrame(resolve)));
});

test.fail('a refusal that no test foresaw fails it', async ({ page }) => {
  await page.goto('/sign-in');
  await page.evaluate(() => fetch('/api/jobs').then(({ status }) => status));
});
