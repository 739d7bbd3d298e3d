import { mkdtempSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { defineConfig } from '@playwright/test';
import { CHROMIUM_ARGS, CHROMIUM_PATH } from './tests/browser/support/debians-chromium.ts';

async function freePort(): Promise<string> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  await new Promise((resolve) => server.close(resolve));
  if (address === null || typeof address === 'string') throw new Error('no free port');
  return String(address.port);
}

async function freePorts(count: number): Promise<string> {
  return (await Promise.all(Array.from({ length: count }, freePort))).join(' ');
}

function freshFolder(): string {
  return mkdtempSync(join(tmpdir(), 'fusekeeper-browser-'));
}

// Each worker has a demo shop of its own, so that files which run side by side do not change each other's day.
const WORKERS = 2;

// This file is read again in every worker: what the first reading chose is handed down by the environment.
const demoPorts = (process.env['FK_DEMO_PORTS'] ??= await freePorts(WORKERS)).split(' ');
const demoFolders = (process.env['FK_DEMO_DATA'] ??= demoPorts.map(freshFolder).join(' ')).split(
  ' ',
);
process.env['FK_EMPTY_PORT'] ??= await freePort();
process.env['FK_EMPTY_DATA'] ??= freshFolder();

const demoUrls = demoPorts.map((port) => `http://127.0.0.1:${port}`);
const demoUrl = demoUrls[Number(process.env['TEST_PARALLEL_INDEX'] ?? 0)] ?? '';

function server(port: string, dataFolder: string, demo: 'yes' | 'no') {
  return {
    command: 'node --enable-source-maps dist/server/index.js',
    url: `http://127.0.0.1:${port}/api/health`,
    env: {
      HOST: '127.0.0.1',
      PORT: port,
      DATA_DIR: dataFolder,
      DEMO: demo,
      NODE_ENV: 'production',
    },
    // Three shops are laid out side by side, on a machine that may be busy.
    timeout: 120_000,
    gracefulShutdown: { signal: 'SIGTERM' as const, timeout: 5_000 },
  };
}

export default defineConfig({
  testDir: 'tests/browser',
  testMatch: '*.test.ts',
  workers: WORKERS,
  timeout: 240_000,
  expect: { timeout: 20_000 },
  forbidOnly: true,
  outputDir: 'test-results/browser',
  reporter: [['list'], ['json', { outputFile: 'test-results/browser.json' }]],
  use: {
    baseURL: demoUrl,
    locale: 'en-US',
    timezoneId: 'America/New_York',
    // Without a film of every page: that costs more than most tests.
    trace: { mode: 'retain-on-failure', screenshots: false },
    launchOptions: {
      executablePath: CHROMIUM_PATH,
      args: CHROMIUM_ARGS,
    },
  },
  webServer: [
    ...demoPorts.map((port, i) => server(port, demoFolders[i] ?? '', 'yes')),
    server(process.env['FK_EMPTY_PORT'], process.env['FK_EMPTY_DATA'], 'no'),
  ],
});
