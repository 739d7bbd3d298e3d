import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { openDatabase } from '#server/db.ts';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';
import { roundsSchema } from '#shared/schemas/jobs.ts';

const ROOT = new URL('../../../', import.meta.url);
const PATIENCE_MS = 180_000;
/** Enough that the answer is far away when the first of them are done. */
const EDITS = 200;
let folder: string;
let running: ChildProcess | undefined;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fusekeeper-killed-'));
});

afterEach(async () => {
  running?.kill('SIGKILL');
  await rm(folder, { recursive: true });
});

/** The real program from source, on a demo shop. */
async function start(): Promise<{ child: ChildProcess; url: string }> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: ROOT,
    env: { PATH: process.env['PATH'], DATA_DIR: folder, PORT: '0', LOG_LEVEL: 'warn' },
  });
  running = child;
  let said = '';
  child.stdout.on('data', (chunk: Buffer) => (said += chunk.toString()));
  for (;;) {
    const found = /Fusekeeper is at (\S+)/.exec(said)?.[1];
    if (found) return { child, url: found.replace('localhost', '127.0.0.1') };
    await once(child.stdout, 'data');
  }
}

async function signIn(url: string): Promise<{ cookie: string; visitId: string }> {
  const email = DEMO_PEOPLE.find(({ key }) => key === 'tom')?.email;
  const answer = await fetch(`${url}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password: DEMO_PASSWORD }),
  });
  const cookie = answer.headers.getSetCookie()[0]?.split(';')[0] ?? '';
  const rounds = await fetch(`${url}/api/rounds`, { headers: { cookie } });
  const [first] = roundsSchema.parse(await rounds.json()).visits;
  if (!first) throw new Error('the demo shop has no visit today');
  return { cookie, visitId: first.id };
}

/** Each edit is made on the one before: one that were done twice, or left out, would make the next a conflict. */
function edits(visitId: string, basedOn: string) {
  let before = basedOn;
  return Array.from({ length: EDITS }, (_, at) => {
    const payload = { visitId, basedOn: before, notes: `Edit ${at + 1}` };
    const thing = { id: randomUUID(), kind: 'visit-edit', madeAtMs: 1, order: at + 1, payload };
    before = thing.id;
    return thing;
  });
}

test(
  'a server killed between applying and answering applies each thing once when it comes again',
  async () => {
    const first = await start();
    const { cookie, visitId } = await signIn(first.url);
    const things = edits(visitId, '');
    const send = (url: string) =>
      fetch(`${url}/api/sendings`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json', cookie },
        body: JSON.stringify({ deviceId: randomUUID(), things }),
      });
    const db = openDatabase(join(folder, 'fusekeeper.sqlite'));
    const count = async () => Number((await db('received_things').count({ n: '*' }).first())?.n);

    const unanswered = send(first.url).then(
      () => 'answered',
      () => 'no answer',
    );
    while ((await count()) < 5);
    first.child.kill('SIGKILL');
    await once(first.child, 'exit');
    expect(await unanswered).toBe('no answer');
    const applied = await count();

    const second = await start();
    const answer = await send(second.url);
    const body: { answers: { status: string }[] } = await answer.json();
    const visit = await fetch(`${second.url}/api/visits/${visitId}`, { headers: { cookie } });
    const stored = await count();
    await db.destroy();

    expect(applied).toBeGreaterThanOrEqual(5);
    expect(applied).toBeLessThan(EDITS);
    const statuses = body.answers.map(({ status }) => status);
    expect(statuses.filter((status) => status === 'already-applied')).toHaveLength(applied);
    expect(statuses.filter((status) => status === 'applied')).toHaveLength(EDITS - applied);
    expect(await visit.json()).toMatchObject({
      notes: `Edit ${EDITS}`,
      notesVersion: things.at(-1)?.id,
    });
    expect(stored).toBe(EDITS);
  },
  PATIENCE_MS,
);
