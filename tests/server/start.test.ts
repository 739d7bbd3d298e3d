import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm, stat } from 'node:fs/promises';
import { createServer } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { migrate, openDatabase } from '#server/db.ts';

const ROOT = new URL('../../', import.meta.url);
/** A process that starts beside other tests takes its time. */
const PATIENCE_MS = 60_000;
let folder: string;
let dataDir: string;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fusekeeper-start-'));
  dataDir = join(folder, 'data');
});

afterEach(() => rm(folder, { recursive: true }));

/** The real program from source, with an environment of its own. */
function start(env: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: ROOT,
    env: { PATH: process.env['PATH'], DATA_DIR: dataDir, DEMO: 'no', PORT: '0', ...env },
  });
  let said = '';
  const hear = (chunk: Buffer) => (said += chunk.toString());
  child.stdout.on('data', hear);
  child.stderr.on('data', hear);
  return {
    child,
    said: () => said,
    ended: once(child, 'exit').then(([code]) => Number(code)),
    async address(): Promise<string> {
      for (;;) {
        const found = /Fusekeeper is at (\S+)/.exec(said)?.[1];
        if (found) return found.replace('localhost', '127.0.0.1');
        await once(child.stdout, 'data');
      }
    },
  };
}

test(
  'it makes its folder, says its address, answers, and ends cleanly when told to',
  async () => {
    const server = start({});
    const address = await server.address();
    const health = await fetch(`${address}/api/health`);
    const card = await fetch(`${address}/api/shop-card`);
    server.child.kill('SIGTERM');

    expect(await health.json()).toEqual({ ok: true });
    // An empty installation without the demo: no shop yet.
    expect(await card.json()).toEqual({ name: '', town: '' });
    expect(await server.ended).toBe(0);
    expect(((await stat(dataDir)).mode & 0o777).toString(8)).toBe('700');
    // A clean end folds the write-ahead log back into the database.
    await expect(stat(join(dataDir, 'fusekeeper.sqlite-wal'))).rejects.toThrow(/ENOENT/);
  },
  PATIENCE_MS,
);

test(
  'a database of a newer program is refused with a sentence',
  async () => {
    const server = start({});
    await server.address();
    server.child.kill('SIGTERM');
    await server.ended;
    const db = openDatabase(join(dataDir, 'fusekeeper.sqlite'));
    await migrate(db);
    await db('migrations').insert({ name: '999-ledger', batch: 9 });
    await db.destroy();

    const again = start({});

    expect(await again.ended).toBe(1);
    expect(again.said()).toMatch(
      /^Fusekeeper did not start\. This database was written by a newer/,
    );
  },
  PATIENCE_MS,
);

test(
  'bad names in the environment and a taken port end it with words',
  async () => {
    const taken = createServer().listen(0, '127.0.0.1');
    await once(taken, 'listening');
    const address = taken.address();
    const port = typeof address === 'object' && address ? address.port : 0;

    const [misnamed, barred] = [start({ PORT: 'x', DEMO: 'y' }), start({ PORT: String(port) })];

    expect(await misnamed.ended).toBe(1);
    expect(misnamed.said()).toBe(
      'Fusekeeper did not start. The environment cannot be used:\n' +
        '  PORT must be a number\n  DEMO must be yes or no\n',
    );
    expect(await barred.ended).toBe(1);
    expect(barred.said()).toMatch(/did not start\. .*EADDRINUSE/);
    taken.close();
  },
  PATIENCE_MS,
);
