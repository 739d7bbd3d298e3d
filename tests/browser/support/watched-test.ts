import { request, test as base, expect } from '@playwright/test';
import type {
  BrowserContext,
  BrowserContextOptions,
  ConsoleMessage,
  Page,
  Response,
} from '@playwright/test';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';

export type DemoKey = (typeof DEMO_PEOPLE)[number]['key'];
type SignedInState = Exclude<BrowserContextOptions['storageState'], string | undefined>;

/** A refusal that a test brings about on purpose; Chromium logs it as an error. */
type Refusal = { path: RegExp; status: number };

/** Asked before anybody signs in: that nobody is signed in is no fault. */
const NOBODY_YET: Refusal = { path: /\/api\/session$/, status: 401 };

declare global {
  interface Window {
    reportViolation(words: string): void;
  }
}

class Watch {
  readonly faults: string[] = [];
  readonly refusals: Refusal[] = [NOBODY_YET];

  /** Every page of a context, before its first script runs. */
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
    page.on('console', (message) => this.read(message));
    page.on('response', (response) => this.heed(response));
  }

  private read(message: ConsoleMessage): void {
    // A refused request is told below, with its method and path.
    if (message.type() !== 'error' || /^Failed to load resource/.test(message.text())) return;
    this.faults.push(`console: ${message.text()}`);
  }

  private heed(response: Response): void {
    const status = response.status();
    if (status < 400) return;
    const { pathname } = new URL(response.url());
    const isForeseen = this.refusals.some(
      (refusal) => refusal.status === status && refusal.path.test(pathname),
    );
    if (isForeseen) return;
    this.faults.push(`answer: ${status} to ${response.request().method()} ${pathname}`);
  }
}

type Fixtures = {
  /** Who of the demo shop is signed in; null: nobody. */
  person: DemoKey | null;
  watch: Watch;
  /** Says that the test brings about this refusal. */
  foresee: (path: RegExp, status: number) => void;
  /** Another person's browser: its own cookies, watched like the first. */
  anotherBrowser: (options?: BrowserContextOptions) => Promise<Page>;
};

type WorkerFixtures = {
  /** Signs each person in once, whatever the number of tests. */
  signedIn: (person: DemoKey, baseUrl: string) => Promise<SignedInState>;
};

/** Playwright's test; an error on the console, an uncaught one, an unforeseen refusal or a breach of the policy fails it. */
export const test = base.extend<Fixtures, WorkerFixtures>({
  person: [null, { option: true }],

  signedIn: [
    // eslint-disable-next-line no-empty-pattern
    async ({}, use) => {
      const states = new Map<DemoKey, SignedInState>();
      await use(async (person, baseUrl) => {
        const state = states.get(person) ?? (await signIn(person, baseUrl));
        states.set(person, state);
        return state;
      });
    },
    { scope: 'worker' },
  ],

  storageState: async ({ person, signedIn, baseURL }, use) => {
    await use(person && baseURL ? await signedIn(person, baseURL) : undefined);
  },

  watch: [
    // eslint-disable-next-line no-empty-pattern
    async ({}, use) => {
      const watch = new Watch();
      await use(watch);
      expect(watch.faults, 'nothing went wrong in the browser').toEqual([]);
    },
    { auto: true },
  ],

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
      const context = await browser.newContext({
        ...(baseURL && { baseURL }),
        // Else it would be the signed-in person's once more.
        storageState: { cookies: [], origins: [] },
        ...options,
      });
      opened.push(context);
      await watch.over(context);
      return context.newPage();
    });
    for (const context of opened) await context.close();
  },
});

async function signIn(key: DemoKey, baseURL: string): Promise<SignedInState> {
  const email = DEMO_PEOPLE.find((person) => person.key === key)?.email;
  const client = await request.newContext({ baseURL });
  const answer = await client.post('/api/session', { data: { email, password: DEMO_PASSWORD } });
  expect(answer.ok(), `${key} signs in`).toBe(true);
  const state = await client.storageState();
  await client.dispose();
  return state;
}

export { expect };
