import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import request from 'supertest';
import { beforeAll, expect, test, vi } from 'vitest';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '#server/demo/demo-people.ts';
import { seedDemo } from '#server/demo/seed-demo.ts';
import { JOB_STATES, jobListSchema, roundsSchema, type JobListItem } from '#shared/schemas/jobs.ts';
import { homeListSchema, machinePageSchema } from '#shared/schemas/homes.ts';
import type { Role } from '#shared/schemas/people.ts';
import { runPageSchema } from '#shared/schemas/runs.ts';
import { sharedRunSchema } from '#shared/schemas/shares.ts';
import { WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, NOW, type Agent } from '#tests/support/test-app.ts';

vi.setConfig({ testTimeout: WORKER_START_MS });

// Eleven in the morning, in the middle of a visit.
const ELEVEN = new Date(NOW.getTime() + 3_600_000);

const app = await createTestApp({ now: () => ELEVEN });
let tokens: string[] | null;
let owner: Agent;

beforeAll(async () => {
  await app.db('shop').delete();
  tokens = await seedDemo(app);
  owner = await agentOf('owner');
}, 2 * WORKER_START_MS);

async function agentOf(role: Role, name?: string): Promise<Agent> {
  const row = await app
    .db('users')
    .where({ role, ...(name && { name }) })
    .first();
  const { id, email } = row;
  return app.agentOf({ id, name: row.name, email, role, disabledAtMs: null });
}

async function jobs(): Promise<JobListItem[]> {
  return jobListSchema.parse((await owner.get('/api/jobs').expect(200)).body);
}

test('each of its four people signs in with the one password', async () => {
  for (const { email, role } of DEMO_PEOPLE) {
    const answer = await request(app.app)
      .post('/api/session')
      .send({ email, password: DEMO_PASSWORD });

    expect(answer.status).toBe(200);
    expect(answer.body.person.role).toBe(role);
  }
});

test('every sample log is a run that tells the log’s own story', async () => {
  const told = JSON.parse(await readFile('sample-logs/expected.json', 'utf8'));
  const runIds: string[] = await app.db('runs').pluck('id');
  const pages = [];
  for (const id of runIds) {
    pages.push(runPageSchema.parse((await owner.get(`/api/runs/${id}`).expect(200)).body));
  }

  const found = pages.map(({ file, analysis }) => ({
    file: file.name,
    headline: analysis.analysis.findings[0]?.code,
    outcome: analysis.analysis.outcome,
  }));
  const expected = told.map(({ file, headline, outcome }: Record<string, string>) => {
    return { file, headline, outcome };
  });
  const byFile = (a: { file: string }, b: { file: string }) => a.file.localeCompare(b.file);
  expect(found.sort(byFile)).toEqual(expected.sort(byFile));
});

test('both technicians have a day ahead, callbacks with what was done before', async () => {
  for (const name of ['Tom Birkett', 'Ada Quill']) {
    const technician = await agentOf('technician', name);
    const { visits } = roundsSchema.parse((await technician.get('/api/rounds')).body);

    expect(visits.length).toBeGreaterThanOrEqual(4);
    expect(visits.every((visit) => visit.technician.name === name)).toBe(true);
    const callbacks = visits.filter(({ job }) => job.callsBack !== null);
    expect(callbacks.length).toBeGreaterThanOrEqual(1);
    expect(callbacks.every(({ before }) => before !== null)).toBe(true);
  }
});

test('a job stands in every state', async () => {
  const states = new Set((await jobs()).map(({ state }) => state));

  expect([...states].sort()).toEqual([...JOB_STATES].sort());
});

test('the wrong thermostat is in three homes, all of one lot', async () => {
  const homes = homeListSchema.parse((await owner.get('/api/homes').expect(200)).body);
  const machines = homes.flatMap((home) => home.machines);
  const withLot: string[] = [];
  for (const { id } of machines) {
    const page = machinePageSchema.parse((await owner.get(`/api/machines/${id}`)).body);
    const isOfLot = page.fitted.some(
      ({ lot, rating }) => lot === 'B-2207' && rating.name === 'HL-175-25',
    );
    if (isOfLot) withLot.push(page.home.address);
  }

  expect(homes).toHaveLength(12);
  expect(new Set(withLot).size).toBe(3);
});

test('nothing in it happened after now, and no run outside its visit', async () => {
  const rows = await app
    .db('runs')
    .join('visits', 'visits.id', 'runs.visit_id')
    .select('runs.started_at_ms', 'duration_s', 'starts_at_ms', 'ends_at_ms');

  for (const row of rows) {
    const endedAtMs = row.started_at_ms + row.duration_s * 1000;
    expect(endedAtMs).toBeLessThan(ELEVEN.getTime());
    expect(row.started_at_ms).toBeGreaterThanOrEqual(row.starts_at_ms);
    expect(endedAtMs).toBeLessThanOrEqual(row.ends_at_ms);
  }
  const [late] = await app.db('jobs').max({ atMs: 'taken_at_ms' });
  expect(late?.['atMs']).toBeLessThan(ELEVEN.getTime());
});

test('a customer’s link opens the repaired guest house', async () => {
  const [token] = tokens ?? [];

  const answer = await request(app.app).post('/api/shared/open').send({ token });

  const shared = sharedRunSchema.parse(answer.body);
  expect(shared).toMatchObject({ customerName: 'Hester Marlow', analysis: { outcome: 'proven' } });
  expect(shared.notes.length).toBeGreaterThan(0);
});

test('a database that is not empty is left as it is', async () => {
  const before = await app.db('jobs').count({ n: '*' }).first();

  const again = await seedDemo(app);

  expect(again).toBeNull();
  expect(await app.db('jobs').count({ n: '*' }).first()).toEqual(before);
});

test('the untouched files are kept, and nothing is left staged', async () => {
  const uploads = await app.db('uploads').pluck('id');

  expect((await readdir(join(app.dataDir, 'uploads'))).sort()).toEqual(uploads.sort());
  expect(await readdir(join(app.dataDir, 'staged'))).toEqual([]);
});
