import { test as base, expect } from '@playwright/test';
import type { BrowserContext, BrowserContextOptions, Page } from '@playwright/test';

/** A refusal that a test brings about on purpose; Chromium logs it as an error. */
type Refusal = { path: RegExp; status: number };

/** Told before anybody signs in: that nobody is signed in is no fault. */
const NOBODY_YET: Refusal = { path: /\/api\/session$/, status: 401 };

declare global {
  interface Window {
    reportViolation(words: string): void;
  }
}

class Watch {
  private readonly baseUrl: string;
  readonly faults: string[] = [];
  readonly refusals: Refusal[] = [NOBODY_YET];

  constructor(baseUrl: string) {
    this.baseUrl = baseUrl;
  }

  async over(context: BrowserContext): Promise<void> {
    await context.exposeBinding('reportViolation', (_source, words: string) =>
      this.faults.push(`policy: ${words}`),
    );
    await context.addInitScript(() => {
      document.addEventListener('securitypolicyviolation', (event) => {
        window.reportViolation(
          `${event.violatedDirective} ${event.blockedURI} ${event.sourceFile}`,
        );
      });
    });
    for (const page of context.pages()) this.page(page);
    context.on('page', (page) => this.page(page));
  }

  private page(page: Page): void {
    page.on('pageerror', (error) => this.faults.push(`page: ${error.stack ?? error.message}`));
    page.on('console', (message) => {
      if (message.type() !== 'error' || this.foreseen(message.text(), message.location().url))
        return;
      this.faults.push(`console: ${message.text()} (${message.location().url})`);
    });
  }

  private foreseen(text: string, url: string): boolean {
    const status = /the server responded with a status of (\d{3})/.exec(text)?.[1];
    return this.refusals.some(
      (refusal) =>
        String(refusal.status) === status && refusal.path.test(new URL(url, this.baseUrl).pathname),
    );
  }
}

type Fixtures = {
  watch: Watch;
  /** Says that the test brings about this refusal. */
  foresee: (path: RegExp, status: number) => void;
  /** Another person's browser: its own cookies, watched like the first. */
  anotherBrowser: (options?: BrowserContextOptions) => Promise<Page>;
};

/** Playwright's test; an error on the console, an uncaught one or a breach of the policy fails it. */
export const test = base.extend<Fixtures>({
  watch: async ({ baseURL }, use) => {
    const watch = new Watch(baseURL ?? 'http://127.0.0.1');
    await use(watch);
    expect(watch.faults, 'nothing went wrong in the browser').toEqual([]);
  },

  context: async ({ context, watch }, use) => {
    await watch.over(context);
    await use(context);
  },

  foresee: async ({ watch }, use) => {
    await use((path, status) => watch.refusals.push({ path, status }));
  },

  anotherBrowser: async ({ browser, watch, baseURL }, use) => {
    const opened: BrowserContext[] = [];
    await use(async (options = {}) => {
      const context = await browser.newContext({ ...(baseURL && { baseURL }), ...options });
      opened.push(context);
      await watch.over(context);
      return context.newPage();
    });
    for (const context of opened) await context.close();
  },
});

export { expect };
