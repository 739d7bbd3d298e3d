import { randomUUID } from 'node:crypto';
import { beforeAll, expect, test } from 'vitest';
import { createSampleRepository } from '#server/runs/sample-repository.ts';
import { jobPageSchema } from '#shared/schemas/jobs.ts';
import { runCardSchema, runPageSchema } from '#shared/schemas/runs.ts';
import { bookVisit, THERMOSTAT_155, type BookedVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog, cyclingTemps } from '#tests/support/cycling-log.ts';
import { makeRun, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, type Agent } from '#tests/support/test-app.ts';

const THERMOSTAT = { opensF: 155, closesF: 130 };

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician');
let booked: BookedVisit;
let runId: string;

beforeAll(async () => {
  booked = await bookVisit(owner, technician);
  runId = await makeRun(technician, booked.visit.id, cyclingLog());
}, WORKER_START_MS);

async function octets(agent: Agent, path: string): Promise<Float64Array> {
  const answer = await agent.get(path).responseType('blob').expect(200);
  const body: Buffer = answer.body;
  return Float64Array.from({ length: body.length / 8 }, (_, i) => body.readDoubleLE(i * 8));
}

test('155 °F is kept as 155 °F, bit for bit', async () => {
  const rows = [75, 155, 154.9, 155.1, 130].map((tempF, i) => `${i * 5},${tempF}`);
  const log = ['Elapsed (s),Exhaust (°F)', ...rows, ''].join('\n');
  const id = await makeRun(technician, booked.visit.id, log);

  const { packed } = await app.db('run_samples').where({ run_id: id, channel: 1 }).first();

  // IEEE 754 binary64 of 75, 155, 154.9, 155.1 and 130, as the language itself writes them.
  expect(packed).toEqual(Buffer.from(Float64Array.of(75, 155, 154.9, 155.1, 130).buffer));
});

test('readings that a crash left without a run are swept at the next start, a run’s own stay', async () => {
  const samples = createSampleRepository(app.db);
  const lost = randomUUID();
  await samples.insert(lost, 0, [new Uint8Array(8)]);
  const readingsOf = (id: string) => app.db('run_samples').where({ run_id: id }).select('chunk');
  const before = await readingsOf(runId);

  await samples.sweep();

  expect(await readingsOf(lost)).toEqual([]);
  expect(await readingsOf(runId)).toEqual(before);
  expect(before.length).toBeGreaterThan(0);
});

test('the samples of a run are all of its readings, in °C', async () => {
  const values = await octets(technician, `/api/runs/${runId}/samples`);

  const temps = cyclingTemps(480, THERMOSTAT);
  expect([...values.subarray(0, 480)]).toEqual(temps.map((_, i) => i * 5));
  // NIST SP 811 (2008), B.8: t/°C = (t/°F − 32)/1.8.
  for (const [i, tempF] of temps.entries()) expect(values[480 + i]).toBe((tempF - 32) / 1.8);
});

test('a trace of few columns keeps the highest and the lowest reading', async () => {
  const values = await octets(technician, `/api/runs/${runId}/trace?columns=40`);

  const columns = values.length / 3;
  const temps = cyclingTemps(480, THERMOSTAT).map((tempF) => (tempF - 32) / 1.8);
  const of = (place: number) => Array.from({ length: columns }, (_, k) => values[3 * k + place]!);
  expect(columns).toBe(40);
  expect(Math.max(...of(2))).toBe(Math.max(...temps));
  expect(Math.min(...of(1))).toBe(Math.min(...temps));
});

test('a channel that the run does not have is refused', async () => {
  const answer = await technician.get(`/api/runs/${runId}/samples?channel=3`);

  expect(answer.status).toBe(400);
  expect(answer.body.code).toBe('no-channel');
});

test('a second temperature column can be drawn, its empty cells as gaps', async () => {
  const rows = ['0,75,70', '5,80,', '10,85,71', '15,90,71.5'];
  const log = ['Elapsed (s),Exhaust (°F),Room (°F)', ...rows, ''].join('\n');
  const id = await makeRun(technician, booked.visit.id, log);

  const page = runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body);
  const values = await octets(technician, `/api/runs/${id}/samples?channel=1`);

  expect(page.channels).toEqual(['Exhaust (°F)', 'Room (°F)']);
  expect(values[4]).toBeCloseTo(21.111, 3);
  expect(values[5]).toBeNaN();
});

test('the file comes back untouched, as a download and nothing else', async () => {
  const answer = await technician.get(`/api/runs/${runId}/file`).responseType('blob').expect(200);

  expect(Buffer.from(answer.body).toString('utf8')).toBe(cyclingLog());
  expect(answer.headers).toMatchObject({
    'content-disposition': 'attachment; filename=exhaust.csv',
    'content-type': 'application/octet-stream',
    'x-content-type-options': 'nosniff',
    'cache-control': 'no-store',
  });
});

test('a run can be judged again; the earlier result stays as it was', async () => {
  const id = await makeRun(technician, booked.visit.id, cyclingLog());
  const before = runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body);
  const lower = { ...THERMOSTAT_155, name: 'HL-T140', opens: 140, closes: 115 };
  const rating = (await owner.post('/api/ratings').send(lower)).body;

  const answer = await technician.post(`/api/runs/${id}/analyses`).send({ ratingId: rating.id });

  expect(answer.status).toBe(201);
  const after = runPageSchema.parse(answer.body);
  // 155 °F lies over 140 ± 5 and its allowance of 10; 155 ± 5 holds it.
  expect(before.analysis.analysis.findings[0]?.code).toBe('in-band');
  expect(after.analysis.judgedBy?.name).toBe('HL-T140');
  expect(after.analysis.analysis.outcome).toBe('not-proven');
  expect(after.analysis.analysis.findings.map(({ code }) => code)).not.toContain('in-band');
  expect(after.earlier).toEqual([
    {
      id: before.analysis.id,
      madeAtMs: before.analysis.madeAtMs,
      judgedBy: before.analysis.judgedBy,
      version: before.analysis.analysis.version,
    },
  ]);
  const own = await technician.post(`/api/runs/${id}/analyses`).send({ ratingId: null });
  expect(own.body.analysis.analysis).toEqual(before.analysis.analysis);
});

test('a note is written, changed and taken away', async () => {
  const note = { timeS: 300, tempC: 68.5, text: 'Click at the cut-out' };
  const added = await technician.post(`/api/runs/${runId}/notes`).send(note);
  const [written] = runPageSchema.parse(added.body).notes;
  const path = `/api/runs/${runId}/notes/${written?.id}`;
  const changed = await technician.put(path).send({ ...note, text: 'Two clicks' });
  const removed = await technician.delete(path);
  const again = await technician.delete(path);

  expect(added.status).toBe(201);
  expect(written).toMatchObject({ ...note, by: technician.person.name });
  expect(changed.body.notes).toMatchObject([{ ...note, text: 'Two clicks' }]);
  expect(removed.body.notes).toEqual([]);
  expect(again.status).toBe(404);
});

test('a note after the end of the run is refused at its field', async () => {
  const note = { timeS: 5000, tempC: 60, text: 'Too late' };
  const answer = await technician.post(`/api/runs/${runId}/notes`).send(note);

  expect(answer.status).toBe(400);
  expect(answer.body.fields).toEqual({ timeS: 'A time within the run' });
});

test('the office reads a run and writes nothing on it', async () => {
  const office = await app.agent('office');
  const page = await office.get(`/api/runs/${runId}`).expect(200);
  const note = { timeS: 300, tempC: 68.5, text: 'From the desk' };

  expect(page.body.mayWrite).toBe(false);
  await office.post(`/api/runs/${runId}/notes`).send(note).expect(403);
});

test('a run shows in its job and its machine, with spark and calls', async () => {
  const job = await technician.get(`/api/jobs/${booked.visit.jobId}`);
  const ofMachine = await technician.get(`/api/machines/${booked.machine.id}/runs`);

  const [visit] = jobPageSchema.parse(job.body).visits;
  const card = visit?.runs.find(({ id }) => id === runId);
  expect(card).toMatchObject({ label: 'Run 1', outcome: 'proven', headline: 'in-band' });
  expect(card?.trace.length).toBeGreaterThan(30);
  expect(card?.trace.length).toBeLessThanOrEqual(66);
  expect(card?.calls.length).toBeGreaterThan(3);
  expect(card?.bands?.opensC).toBeCloseTo(68.33, 2);
  expect(ofMachine.body.map((each: unknown) => runCardSchema.parse(each).id)).toContain(runId);
});

test('another technician cannot tell a run from none', async () => {
  const other = await app.agent('technician');
  const nowhere = '/api/runs/6f1c3a52-6a0e-4f57-9d3e-0a6f0c6f8b11';

  const theirs = await other.get(`/api/runs/${runId}`);
  const none = await other.get(nowhere);

  expect(theirs.status).toBe(404);
  expect(theirs.body).toEqual(none.body);
});
