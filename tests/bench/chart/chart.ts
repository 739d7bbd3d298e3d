import { chromium, type CDPSession, type Page } from '@playwright/test';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createServer, type ViteDevServer } from 'vite';

/** A million readings, one a tenth of a second, as a thermostat makes them. */
const READINGS = 1_000_000;
const FRAMES = 90;

type Timing = { builtMs: number; drawnMs: number; framesMs: number[]; busyMs: number };

/** Frame times of the run's chart while it is zoomed and moved, at full speed and throttled as a slow phone is. */
export async function bench(): Promise<void> {
  const folder = await mkdtemp(join(tmpdir(), 'fusekeeper-chart-'));
  const server = await serve(folder);
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu'],
  });
  const rows = [];
  for (const [name, width, throttle] of [
    ['desk, 1440 px', 1440, 1],
    ['phone, 390 px, CPU at a quarter', 390, 4],
  ] as const) {
    const page = await browser.newPage({ viewport: { width, height: 900 } });
    const timing = await timeChart(page, addressOf(server), throttle);
    rows.push({ chart: name, ...summaryOf(timing) });
    await page.close();
  }
  console.log(`\nStrip chart, ${READINGS.toLocaleString('en-US')} readings, ${FRAMES} frames`);
  console.table(rows);
  await browser.close();
  await server.close();
  await rm(folder, { recursive: true });
}

async function serve(folder: string): Promise<ViteDevServer> {
  const root = process.cwd();
  const server = await createServer({
    root,
    configFile: join(root, 'vite.config.ts'),
    cacheDir: join(folder, 'cache'),
    logLevel: 'error',
    server: { host: '127.0.0.1', port: 0, hmr: false, watch: null },
  });
  return server.listen();
}

function addressOf(server: ViteDevServer): string {
  const address = server.httpServer?.address();
  if (!address || typeof address === 'string') throw new Error('the bench server has no port');
  return `http://127.0.0.1:${address.port}/tests/bench/chart/index.html`;
}

async function timeChart(page: Page, url: string, throttle: number): Promise<Timing> {
  await page.goto(url);
  await page.waitForFunction(() => 'fusekeeperBench' in window, null, { timeout: 120_000 });
  const session = await page.context().newCDPSession(page);
  await session.send('Emulation.setCPUThrottlingRate', { rate: throttle });
  // Time on the processor, which a busy machine does not stretch as it does the clock.
  await session.send('Performance.enable', { timeDomain: 'threadTicks' });
  const timing = await page.evaluate((readings) => window.fusekeeperBench(readings), READINGS);
  const before = await busyMs(session);
  const zoomed = await page.evaluate((frames) => window.fusekeeperZoom(frames), FRAMES);
  return { ...timing, ...zoomed, busyMs: ((await busyMs(session)) - before) / FRAMES };
}

async function busyMs(session: CDPSession): Promise<number> {
  const { metrics } = await session.send('Performance.getMetrics');
  return (metrics.find(({ name }) => name === 'TaskDuration')?.value ?? NaN) * 1000;
}

function summaryOf({ builtMs, drawnMs, framesMs, busyMs }: Timing) {
  return {
    'pyramid, ms': round(builtMs),
    'first draw, ms': round(drawnMs),
    'frame p50, ms': round(quantile(framesMs, 0.5)),
    'frame p95, ms': round(quantile(framesMs, 0.95)),
    'processor a frame, ms': round(busyMs),
  };
}

function quantile(values: number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN;
}

function round(ms: number): number {
  return Math.round(ms * 10) / 10;
}
