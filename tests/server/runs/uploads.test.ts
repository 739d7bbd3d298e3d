import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { beforeEach, expect, test, vi } from 'vitest';
import { runPageSchema } from '#shared/schemas/runs.ts';
import { bookVisit, type BookedVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import {
  acceptance,
  CONDITIONS,
  previewOf,
  sendLog,
  untilRead,
  WORKER_START_MS,
} from '#tests/support/send-log.ts';
import { createTestApp, NOW } from '#tests/support/test-app.ts';

vi.setConfig({ testTimeout: WORKER_START_MS });

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician', 'Tom Birkett');
let booked: BookedVisit;

beforeEach(async () => {
  booked = await bookVisit(owner, technician);
});

async function leftBehind() {
  const rows = async (table: string) =>
    Number((await app.db(table).count({ n: '*' }).first())?.['n']);
  return {
    staged: await readdir(join(app.dataDir, 'staged')),
    uploads: (await readdir(join(app.dataDir, 'uploads'))).length,
    rows: [await rows('uploads'), await rows('runs'), await rows('run_samples')],
  };
}

test('a log becomes a judged run that can be looked at', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog());
  const preview = previewOf(upload);
  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { startedAtMs: NOW.getTime() }));
  const page = await technician.get(`/api/runs/${accepted.body.runIds[0]}`);

  expect(preview).toMatchObject({
    channelUnit: 'F',
    rows: 480,
    samples: 480,
    durationS: 479 * 5,
    skippedCount: 0,
    parts: [{ fromS: 0, toS: 479 * 5 }],
  });
  expect(accepted.status).toBe(201);
  expect(page.status).toBe(200);
  const run = runPageSchema.parse(page.body);
  expect(run).toMatchObject({
    visitId: booked.visit.id,
    label: 'Run 1',
    startedAtMs: NOW.getTime(),
    technician: 'Tom Birkett',
    customer: { name: 'Oona Marsh' },
    machine: { make: 'Calder', model: 'C40' },
    conditions: CONDITIONS,
    samples: 480,
    file: { name: 'exhaust.csv', bytes: Buffer.byteLength(cyclingLog()) },
    otherRatings: expect.arrayContaining([{ id: booked.rating.id, name: 'HL-T155' }]),
    earlier: [],
    notes: [],
    mayWrite: true,
  });
  // The log cuts out at 155 °F and comes back at 130 °F, and so says the rating: proven by definition.
  expect(run.analysis.judgedBy?.name).toBe('HL-T155');
  expect(run.analysis.analysis).toMatchObject({
    outcome: 'proven',
    findings: [{ code: 'in-band' }],
  });
  // It turns at the first reading at or over 155 °F (68.33 °C): at 50 °F to go and τ = 150 s at most 1.7 °F over it.
  for (const { tempC, uK } of run.analysis.analysis.cutOuts) {
    expect(tempC).toBeGreaterThan(68.33 - uK);
    expect(tempC).toBeLessThan(68.33 + 1.7 / 1.8 + uK);
  }
  expect(await readdir(join(app.dataDir, 'staged'))).toEqual([]);
});

test('a refused log names row, column and value, and leaves nothing behind', async () => {
  const before = await leftBehind();

  const rows = Array.from({ length: 20 }, (_, i) => `${i * 5},${i === 7 ? '1e400' : 75 + i}`);
  const log = ['Elapsed (s),Exhaust (°F)', ...rows, ''].join('\n');
  const upload = await sendLog(technician, booked.visit.id, log);
  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send({ ...acceptanceOfAnything(upload.visitId), resultHash: 'x' });

  expect(upload.reading).toEqual({
    state: 'refused',
    problem: {
      code: 'number-too-large',
      message: expect.stringContaining('Row 9'),
      row: 9,
      column: 'Exhaust (°F)',
      value: '1e400',
      hint: expect.any(String),
    },
  });
  expect(accepted.status).toBe(409);
  expect(await leftBehind()).toEqual(before);
});

test('a log without a unit is a question; the answer reads the same bytes', async () => {
  const log = cyclingLog(200).replace('Exhaust (°F)', 'Exhaust');
  const upload = await sendLog(technician, booked.visit.id, log);
  expect(upload.reading).toMatchObject({ state: 'question', question: { about: 'unit' } });

  const choices = { answers: { unit: 'F' }, channel: null };
  await technician.put(`/api/uploads/${upload.id}/choices`).send(choices).expect(200);
  const answered = await untilRead(technician, upload.id);

  expect(answered.choices).toEqual(choices);
  expect(previewOf(answered)).toMatchObject({ channelUnit: 'F', samples: 200 });
});

test('only what was looked at is accepted', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(100));
  const before = await leftBehind();

  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { resultHash: '0000000000000000' }));

  expect(accepted.status).toBe(409);
  expect(accepted.body.code).toBe('changed');
  expect(await leftBehind()).toEqual(before);
  await technician.delete(`/api/uploads/${upload.id}`).expect(204);
});

test('a discarded upload is gone, file and all', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(100));
  expect(await readdir(join(app.dataDir, 'staged'))).toContain(upload.id);

  await technician.delete(`/api/uploads/${upload.id}`).expect(204);

  expect(await readdir(join(app.dataDir, 'staged'))).not.toContain(upload.id);
  await technician.get(`/api/uploads/${upload.id}`).expect(404);
});

test('a file that could not be stored is still there to be accepted again', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(100));
  const before = await leftBehind();

  const odd = { ...CONDITIONS, probeId: '6f1c3a52-6a0e-4f57-9d3e-0a6f0c6f8b11' };
  const refused = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { conditions: odd }));
  await app.db.raw(
    `create trigger no_room before insert on analyses begin select raise(abort, 'disk full'); end`,
  );
  const failed = await technician.post(`/api/uploads/${upload.id}/accept`).send(acceptance(upload));
  await app.db.raw('drop trigger no_room');

  expect(refused.status).toBe(400);
  expect(failed.status).toBe(500);
  expect(await leftBehind()).toEqual(before);
  const again = await technician.post(`/api/uploads/${upload.id}/accept`).send(acceptance(upload));
  expect(again.status).toBe(201);
});

test('a long record is split into runs, each with its own clock and its own result', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(480));
  const spans = [
    { fromS: 0, toS: 1195, label: 'Duct on' },
    { fromS: 1200, toS: 2395, label: 'Duct off' },
  ];
  const marks = [{ timeS: 1300, kind: 'click' as const }];
  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { spans, marks, startedAtMs: NOW.getTime() }));
  const [first, second] = accepted.body.runIds;
  const [on, off] = await Promise.all(
    [first, second].map(async (id) =>
      runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body),
    ),
  );

  expect(on).toMatchObject({ label: 'Duct on', samples: 240, durationS: 1195, marks: [] });
  expect(off).toMatchObject({
    label: 'Duct off',
    samples: 240,
    durationS: 1195,
    startedAtMs: NOW.getTime() + 1_200_000,
    marks: [{ timeS: 100, kind: 'click' }],
  });
  expect(off?.analysis.analysis.durationS).toBe(1195);
  expect(on?.file).toEqual(off?.file);
});

test('a span with nothing in it is refused by its name', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(100));
  const spans = [{ fromS: 9000, toS: 9100, label: 'Nothing' }];

  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { spans }));

  expect(accepted.status).toBe(400);
  expect(accepted.body.message).toContain('Nothing');
});

test('only who sent an upload can see, change or accept it', async () => {
  const upload = await sendLog(technician, booked.visit.id, cyclingLog(100));
  const path = `/api/uploads/${upload.id}`;

  const answers = await Promise.all([
    owner.get(path),
    owner.put(`${path}/choices`).send({ answers: {}, channel: null }),
    owner.post(`${path}/accept`).send(acceptance(upload)),
    owner.delete(path),
  ]);

  expect(answers.map(({ status }) => status)).toEqual([404, 404, 404, 404]);
});

test('a technician cannot send a log to somebody else’s visit', async () => {
  const other = await app.agent('technician');

  const sent = await other
    .post('/api/uploads')
    .query({ visitId: booked.visit.id })
    .attach('file', Buffer.from(cyclingLog(10)), 'exhaust.csv');

  expect(sent.status).toBe(404);
});

function acceptanceOfAnything(visitId: string) {
  const spans = [{ fromS: 0, toS: 10, label: 'Run 1' }];
  return { visitId, conditions: CONDITIONS, marks: [], spans, startedAtMs: null };
}
