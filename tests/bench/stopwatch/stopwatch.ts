import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { startBuiltServer } from '../server/built-server.ts';
import { beginRun, prepare, timeOpenings, type Opening, type Openings } from './open-offline.ts';
import { FIRST_LOAD_BAR_KB, firstLoad, sumKb } from '#tests/support/first-load.ts';

const BAR_MS = 1000;
const MOST_TIMES = 25;
/** A mid-range phone against this machine's processor, as browsers' tools have it: a quarter. */
const SPEEDS = [
  { name: 'full speed', throttle: 1 },
  { name: 'a quarter', throttle: 4 },
] as const;

/**
 * What the stopwatch's first load weighs, and how long a repeat visit takes to its first key with the server dead.
 * Argument: how many times (default 7). Needs the build: `npm run build`.
 */
export async function bench(args: string[]): Promise<void> {
  const times = Math.min(MOST_TIMES, Number(args[0] ?? 7));
  printFirstLoad();
  const profile = await mkdtemp(join(tmpdir(), 'fusekeeper-bench-phone-'));
  try {
    const server = await startBuiltServer();
    const url = await prepare(profile, server.origin).finally(server.stop);
    console.log(`\nOffline repeat visit to the first key, ms, median of ${times} (bar ${BAR_MS})`);
    console.table([
      ...(await measure(profile, url, 'start', times)),
      ...(await beginRun(profile, url).then(() => measure(profile, url, 'run', times))),
    ]);
  } finally {
    await rm(profile, { recursive: true, force: true });
  }
}

function printFirstLoad(): void {
  const { first, behind } = firstLoad('dist/client');
  const rows = [
    { 'JavaScript of the stopwatch': 'first load, engine in it', ...weight(sumKb(first)) },
    {
      'JavaScript of the stopwatch': 'with keys, guard and strip, fetched behind it',
      ...weight(sumKb(first) + sumKb(behind)),
    },
  ];
  console.table(rows);
}

function weight(kB: number) {
  return {
    'gzip, kB': round(kB),
    [`of ${FIRST_LOAD_BAR_KB}`]: (kB / FIRST_LOAD_BAR_KB).toFixed(3),
  };
}

async function measure(profile: string, url: string, page: 'start' | 'run', times: number) {
  const rows = [];
  for (const { name, throttle } of SPEEDS) {
    const visits: Openings[] = [];
    for (let i = 0; i < times; i++) visits.push(await timeOpenings(profile, url, throttle));
    const common = { page: page === 'start' ? 'before a run' : 'a run going on', processor: name };
    rows.push(
      { ...common, browser: 'just started', ...summaryOf(visits.map(({ first }) => first)) },
      { ...common, browser: 'open already', ...summaryOf(visits.map(({ again }) => again)) },
    );
  }
  return rows;
}

function summaryOf(openings: Opening[]) {
  const ms = openings.map((each) => each.ms);
  return {
    'median, ms': round(median(ms)),
    'worst, ms': round(Math.max(...ms)),
    [`of ${BAR_MS}`]: (median(ms) / BAR_MS).toFixed(2),
    'on its thread, ms': round(median(openings.map(({ threadMs }) => threadMs))),
  };
}

function median(values: number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
