import { randomUUID } from 'node:crypto';
import { beforeEach, expect, test } from 'vitest';
import { jobListSchema, jobPageSchema, visitPageSchema } from '#shared/schemas/jobs.ts';
import { bookVisit, type BookedVisit } from '#tests/support/booked-visit.ts';
import { createTestApp, NOW, type Agent } from '#tests/support/test-app.ts';

const HOUR_MS = 3_600_000;
const app = await createTestApp();
const owner = await app.agent('owner');
const office = await app.agent('office');
const technician = await app.agent('technician', 'Tom Birkett');
let booked: BookedVisit;

beforeEach(async () => {
  for (const table of ['fitted_parts', 'visits', 'jobs']) await app.db(table).delete();
  booked = await bookVisit(owner, technician);
});

async function list(query: string, who: Agent = office) {
  const { body } = await who.get(`/api/jobs${query}`).expect(200);
  return jobListSchema.parse(body);
}

async function newJob(given: object = {}) {
  const asked = { machineId: booked.machine.id, complaint: 'No heat', callsBackJobId: null };
  return office.post('/api/jobs').send({ ...asked, ...given });
}

function visiting(given: object = {}) {
  const startsAtMs = NOW.getTime() + 24 * HOUR_MS;
  const times = { startsAtMs, endsAtMs: startsAtMs + HOUR_MS };
  return { technicianId: technician.person.id, ...times, notes: '', ...given };
}

test('jobs are numbered one after the other from 1001', async () => {
  const [first] = await list('');
  const second = await newJob();
  const third = await newJob();

  expect(first?.number).toBe(1001);
  expect([second.body.number, third.body.number]).toEqual([1002, 1003]);
});

test('jobs taken at the same moment get numbers of their own', async () => {
  const taken = await Promise.all(Array.from({ length: 12 }, () => newJob()));

  const numbers = taken.map(({ body }) => Number(body.number));
  expect(numbers.toSorted((a, b) => a - b)).toEqual(Array.from({ length: 12 }, (_, i) => 1002 + i));
});

test('a new job is booked, with its machine, home and customer', async () => {
  const { status, body } = await newJob({ complaint: ' It stops after a minute ' });

  expect(status).toBe(201);
  expect(jobPageSchema.parse(body)).toMatchObject({
    complaint: 'It stops after a minute',
    state: 'booked',
    takenAtMs: NOW.getTime(),
    callsBack: null,
    customer: { name: 'Oona Marsh' },
    home: { address: '4 Sill Lane' },
    machine: booked.machine,
    visits: [],
  });
  expect((await office.get(`/api/jobs/${body.id}`)).body).toEqual(body);
});

test('a callback names the job that it returns from, on the same machine', async () => {
  const elsewhere = await bookVisit(owner, technician);

  const callback = await newJob({ callsBackJobId: booked.visit.jobId });
  const other = await newJob({ callsBackJobId: elsewhere.visit.jobId });
  const none = await newJob({ callsBackJobId: randomUUID() });

  expect(callback.body.callsBack).toEqual({
    id: booked.visit.jobId,
    number: 1001,
    takenAtMs: NOW.getTime(),
  });
  for (const refused of [other, none]) {
    expect(refused.body.fields).toEqual({
      callsBackJobId: 'Choose an earlier job on this machine',
    });
  }
});

test('a job needs a complaint and a machine that is there', async () => {
  expect((await newJob({ complaint: '' })).body.fields).toHaveProperty('complaint');
  expect((await newJob({ machineId: randomUUID() })).body.fields).toEqual({
    machineId: 'Choose a machine',
  });
});

test('a visit is booked for somebody who can go, and ends after it starts', async () => {
  const url = `/api/jobs/${booked.visit.jobId}/visits`;

  const visit = await office.post(url).send(visiting({ notes: 'Ring the side bell' }));
  const deskVisit = await office.post(url).send(visiting({ technicianId: office.person.id }));
  const backwards = await office.post(url).send(visiting({ endsAtMs: 5 }));

  expect(visit.status).toBe(201);
  expect(visit.body).toEqual({
    id: expect.any(String),
    jobId: booked.visit.jobId,
    technician: { id: technician.person.id, name: 'Tom Birkett' },
    startsAtMs: NOW.getTime() + 24 * HOUR_MS,
    endsAtMs: NOW.getTime() + 25 * HOUR_MS,
    safetyTickedAtMs: null,
    notes: 'Ring the side bell',
    notesVersion: '',
    notesEdited: null,
  });
  expect(deskVisit.body.fields).toEqual({ technicianId: 'Choose a technician' });
  expect(backwards.body.fields).toEqual({ endsAtMs: 'End the visit after it starts' });
  await office.post(`/api/jobs/${randomUUID()}/visits`).send(visiting()).expect(404);
});

test('a job’s page has its visits newest first', async () => {
  const later = await office.post(`/api/jobs/${booked.visit.jobId}/visits`).send(visiting());

  const { body } = await office.get(`/api/jobs/${booked.visit.jobId}`);

  expect(jobPageSchema.parse(body).visits).toEqual([
    { ...later.body, runs: [] },
    { ...booked.visit, runs: [] },
  ]);
});

test('the technician of a visit moves the job on; a state that is none is refused', async () => {
  const url = `/api/jobs/${booked.visit.jobId}`;

  const changed = await technician.put(url).send({ state: 'waiting-for-part' });

  expect(changed.body.state).toBe('waiting-for-part');
  expect((await office.get(url)).body).toEqual(changed.body);
  await technician.put(url).send({ state: 'forgotten' }).expect(400);
  await office.put(`/api/jobs/${randomUUID()}`).send({ state: 'closed' }).expect(404);
});

test('the Jobs table tells who goes and when next', async () => {
  const other = await app.agent('technician', 'Ada Voss');
  const url = `/api/jobs/${booked.visit.jobId}/visits`;
  await office.post(url).send(visiting({ technicianId: other.person.id }));
  await office.post(url).send(visiting({ startsAtMs: 1, endsAtMs: 2 }));

  const [job] = await list('');

  expect(job?.technicians.toSorted()).toEqual(['Ada Voss', 'Tom Birkett']);
  // The visit that is going on counts; the one of long ago does not.
  expect(job?.nextVisitAtMs).toBe(NOW.getTime() - HOUR_MS);
  expect(job?.lastRun).toBeNull();
});

test('the Jobs table is narrowed by state, technician and callback', async () => {
  const callback = (await newJob({ callsBackJobId: booked.visit.jobId })).body;
  await office.put(`/api/jobs/${callback.id}`).send({ state: 'closed' });
  const numbers = async (query: string) => (await list(query)).map(({ number }) => number);

  expect(await numbers('')).toEqual([1002, 1001]);
  expect(await numbers('?state=closed')).toEqual([1002]);
  expect(await numbers('?callbacks=yes')).toEqual([1002]);
  expect(await numbers('?callbacks=no&state=&technician=&find=')).toEqual([1002, 1001]);
  expect(await numbers(`?technician=${technician.person.id}`)).toEqual([1001]);
  await office.get('/api/jobs?state=odd').expect(400);
  await office.get('/api/jobs?find=a&find=b').expect(400);
});

test('the search finds every word, in whatever case, in number, person, address or machine', async () => {
  const found = async (words: string) =>
    (await list(`?find=${encodeURIComponent(words)}`)).map(({ number }) => number);
  await newJob({ complaint: '100% lint_trap' });

  for (const words of [
    'oona',
    'SILL lane',
    'calder c40',
    'tessford marsh',
    'c40-0117',
    '555-0142',
  ]) {
    expect([words, await found(words)]).toEqual([words, [1002, 1001]]);
  }
  expect(await found('1001')).toEqual([1001]);
  expect(await found('keeps stopping')).toEqual([1001]);
  expect(await found('oona nowhere')).toEqual([]);
  expect(await found("' or 1=1 --")).toEqual([]);
});

test('a sign of the search language is looked for as it is', async () => {
  await newJob({ complaint: '100% lint_trap!' });
  const found = async (words: string) => (await list(`?find=${encodeURIComponent(words)}`)).length;

  expect(await found('100%')).toBe(1);
  expect(await found('t_t')).toBe(1);
  expect(await found('trap!')).toBe(1);
  expect(await found('l%p')).toBe(0);
  expect(await found('l_nt')).toBe(0);
});

test('a visit’s page says whether the reader may record on it', async () => {
  const url = `/api/visits/${booked.visit.id}`;
  const mayRecord = async (agent: Agent) =>
    visitPageSchema.parse((await agent.get(url).expect(200)).body).mayRecord;

  expect(await mayRecord(technician)).toBe(true);
  expect(await mayRecord(owner)).toBe(true);
  expect(await mayRecord(office)).toBe(false);
  expect((await technician.get(url)).body).toMatchObject({
    ...booked.visit,
    job: { number: 1001, machine: { id: booked.machine.id } },
    runs: [],
  });
});

test('the cautions are ticked with the moment that it was done', async () => {
  const ticked = await technician.post(`/api/visits/${booked.visit.id}/safety`);

  expect(ticked.body.safetyTickedAtMs).toBe(NOW.getTime());
  expect((await technician.get(`/api/visits/${booked.visit.id}`)).body).toEqual(ticked.body);
});

test('a technician reads the earlier jobs of a machine they go to, but does not change them', async () => {
  const next = await app.agent('technician');
  const callback = (await newJob({ callsBackJobId: booked.visit.jobId })).body;
  const visit = visiting({ technicianId: next.person.id });
  await office.post(`/api/jobs/${callback.id}/visits`).send(visit).expect(201);
  const earlier = `/api/jobs/${booked.visit.jobId}`;

  await next.get(earlier).expect(200);
  await next.put(earlier).send({ state: 'closed' }).expect(404);
  await next.get(`/api/visits/${booked.visit.id}`).expect(404);
  expect((await list('', next)).map(({ id }) => id)).toEqual([callback.id]);
});
