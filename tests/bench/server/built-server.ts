import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { readFile, writeFile, mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';

const ENTRY = 'dist/server/index.js';
const START_WITHIN_MS = 120_000;

export type BuiltServer = Awaited<ReturnType<typeof startBuiltServer>>;

/** The built server with its demo shop, on this machine only, in a folder of its own. */
export async function startBuiltServer() {
  const dataDir = await mkdtemp(join(tmpdir(), 'fusekeeper-bench-'));
  const env = { ...process.env, NODE_ENV: 'production', HOST: '127.0.0.1', PORT: '0' };
  const child = spawn(process.execPath, [ENTRY], {
    env: { ...env, DATA_DIR: dataDir, LOG_LEVEL: 'warn' },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  try {
    const origin = await saysWhereItIs(child);
    const cookie = await signIn(origin);
    return {
      origin,
      cookie,
      residentMb: () => memoryMb(child, 'VmRSS'),
      peakMb: () => memoryMb(child, 'VmHWM'),
      /** From here on the peak counts anew. */
      forgetPeak: () => writeFile(`/proc/${child.pid}/clear_refs`, '5'),
      stop: () => stop(child, dataDir),
    };
  } catch (error) {
    await stop(child, dataDir);
    throw error;
  }
}

/** The address in what the server says once it listens; it chose a free port by itself. */
async function saysWhereItIs(child: ChildProcess): Promise<string> {
  const signal = AbortSignal.timeout(START_WITHIN_MS);
  const ended = once(child, 'exit', { signal }).then(() => {
    throw new Error(`${ENTRY} ended by itself; run npm run build:server first`);
  });
  ended.catch(() => undefined);
  if (!child.stdout) throw new Error('the server cannot be heard');
  const [said] = await Promise.race([once(child.stdout, 'data', { signal }), ended]);
  const port = /localhost:(\d+)/.exec(String(said))?.[1];
  return `http://127.0.0.1:${port}`;
}

async function stop(child: ChildProcess, dataDir: string): Promise<void> {
  if (child.exitCode === null) {
    child.kill('SIGTERM');
    await once(child, 'exit');
  }
  await rm(dataDir, { recursive: true, force: true });
}

async function signIn(origin: string): Promise<string> {
  const { email } = DEMO_PEOPLE[0];
  const answer = await fetch(`${origin}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ email, password: DEMO_PASSWORD }),
  });
  const [cookie] = answer.headers.getSetCookie();
  if (!cookie) throw new Error(`sign-in answered ${answer.status}`);
  return cookie.split(';', 1)[0] ?? '';
}

async function memoryMb({ pid }: ChildProcess, field: 'VmRSS' | 'VmHWM'): Promise<number> {
  const status = await readFile(`/proc/${pid}/status`, 'utf8');
  const kb = new RegExp(`${field}:\\s+(\\d+) kB`).exec(status)?.[1];
  return Number(kb) / 1024;
}
