import { beforeEach, expect, test } from 'vitest';
import { roundsSchema } from '#shared/schemas/jobs.ts';
import { bookVisit, type BookedVisit } from '#tests/support/booked-visit.ts';
import { createTestApp, NOW, type Agent } from '#tests/support/test-app.ts';

const HOUR_MS = 3_600_000;
const app = await createTestApp();
const owner = await app.agent('owner');
const tom = await app.agent('technician', 'Tom Birkett');
const ada = await app.agent('technician', 'Ada Voss');
let booked: BookedVisit;

beforeEach(async () => {
  for (const table of ['fitted_parts', 'visits', 'jobs']) await app.db(table).delete();
  booked = await bookVisit(owner, tom);
});

async function rounds(agent: Agent, query = '') {
  return roundsSchema.parse((await agent.get(`/api/rounds${query}`).expect(200)).body);
}

async function visit(jobId: string, technician: Agent, startsAt: string): Promise<string> {
  const startsAtMs = Date.parse(startsAt);
  const asked = {
    technicianId: technician.person.id,
    startsAtMs,
    endsAtMs: startsAtMs + HOUR_MS,
    notes: '',
  };
  return (await owner.post(`/api/jobs/${jobId}/visits`).send(asked).expect(201)).body.id;
}

async function callback(): Promise<string> {
  const asked = {
    machineId: booked.machine.id,
    complaint: 'Stops again',
    callsBackJobId: booked.visit.jobId,
  };
  return (await owner.post('/api/jobs').send(asked).expect(201)).body.id;
}

test('a technician’s day holds their own visits in order; the desk sees everyone’s', async () => {
  const { jobId } = booked.visit;
  const early = await visit(jobId, tom, '2026-03-04T13:00:00Z');
  const adas = await visit(jobId, ada, '2026-03-04T20:00:00Z');

  const ids = async (agent: Agent) => (await rounds(agent)).visits.map(({ id }) => id);

  expect(await ids(tom)).toEqual([early, booked.visit.id]);
  expect(await ids(ada)).toEqual([adas]);
  expect(await ids(owner)).toEqual([early, booked.visit.id, adas]);
});

test('the day is the shop’s, from its midnight to its next', async () => {
  const { jobId } = booked.visit;
  // New York is 5 h behind UTC in March before the 8th.
  const first = await visit(jobId, ada, '2026-03-05T05:00:00Z');
  const last = await visit(jobId, ada, '2026-03-06T04:59:59Z');
  await visit(jobId, ada, '2026-03-06T05:00:00Z');

  const { day, visits } = await rounds(ada, '?day=2026-03-05');

  expect(day).toBe('2026-03-05');
  expect(visits.map(({ id }) => id)).toEqual([first, last]);
  expect((await rounds(ada)).day).toBe('2026-03-04');
  await ada.get('/api/rounds?day=tomorrow').expect(400);
});

test('a visit carries its job, machine and home', async () => {
  const [first] = (await rounds(tom)).visits;

  expect(first).toMatchObject({
    ...booked.visit,
    before: null,
    runs: [],
    job: { number: 1001, machine: booked.machine, home: { address: '4 Sill Lane' } },
  });
});

test('a callback says what was done last time, by whom and with which lot', async () => {
  const part = { ratingId: booked.rating.id, fittedAtMs: NOW.getTime(), supplier: '', lot: 'L7' };
  const parts = `/api/machines/${booked.machine.id}/parts`;
  await owner
    .post(parts)
    .send({ ...part, visitId: booked.visit.id })
    .expect(201);
  await owner
    .post(parts)
    .send({ ...part, visitId: null, lot: 'of another day' })
    .expect(201);
  await visit(await callback(), ada, '2026-03-05T15:00:00Z');

  const { visits } = await rounds(ada, '?day=2026-03-05');

  expect(visits[0]?.before).toBe('Job 1001, 4 March, Tom Birkett: HL-T155 (lot L7) fitted.');
});

test('a callback of a job where nothing was fitted, or nobody went, says that', async () => {
  await visit(await callback(), ada, '2026-03-05T15:00:00Z');
  const before = async () => (await rounds(ada, '?day=2026-03-05')).visits[0]?.before;

  expect(await before()).toBe('Job 1001, 4 March, Tom Birkett: no part fitted.');
  await app.db('visits').where({ id: booked.visit.id }).delete();
  expect(await before()).toBe('Job 1001: no visit was made.');
});
