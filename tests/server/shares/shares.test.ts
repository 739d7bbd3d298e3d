import { createHash } from 'node:crypto';
import request from 'supertest';
import { beforeAll, expect, test } from 'vitest';
import { madeShareSchema, sharedRunSchema } from '#shared/schemas/shares.ts';
import { bookVisit, THERMOSTAT_155 } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { makeRun, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, NOW, TEST_SHOP } from '#tests/support/test-app.ts';

const DAY_MS = 86_400_000;

let nowMs = NOW.getTime();
const app = await createTestApp({ now: () => new Date(nowMs) });
const owner = await app.agent('owner');
const technician = await app.agent('technician', 'Ada Quill');
let runId: string;

beforeAll(async () => {
  const { visit } = await bookVisit(owner, technician);
  runId = await makeRun(technician, visit.id, cyclingLog());
}, WORKER_START_MS);

async function makeShare(days = 30) {
  const answer = await technician.post(`/api/runs/${runId}/shares`).send({ days }).expect(201);
  const share = madeShareSchema.parse(answer.body);
  return { share, token: new URL(share.url).hash.slice(1) };
}

function open(token: string) {
  return request(app.app).post('/api/shared/open').send({ token });
}

test('a customer opens the run from a link, without an account', async () => {
  const { share, token } = await makeShare();

  const answer = await open(token);

  expect(new URL(share.url).pathname).toBe('/shared');
  expect(answer.status).toBe(200);
  expect(answer.headers['cache-control']).toBe('no-store');
  const shared = sharedRunSchema.strict().parse(answer.body);
  expect(shared).toMatchObject({
    shop: { name: TEST_SHOP.name, phone: TEST_SHOP.phone },
    customerName: 'Oona Marsh',
    technician: 'Ada Quill',
    machine: { make: 'Calder', model: 'C40', fuel: 'electric', place: 'Basement' },
    judgedBy: { name: 'HL-T155' },
    analysis: { outcome: 'proven' },
    notes: [],
  });
  expect(shared.trace.length).toBeLessThanOrEqual(1200);
});

test('the link is 256 random bits of which only a hash is kept', async () => {
  const { share, token } = await makeShare();
  const other = await makeShare();

  const row = await app.db('shares').where({ id: share.id }).first();

  expect(Buffer.from(token, 'base64url')).toHaveLength(32);
  expect(other.token).not.toBe(token);
  expect(row.token_hash).toBe(createHash('sha256').update(token).digest('hex'));
  expect(JSON.stringify(await app.db('shares'))).not.toContain(token);
  expect(JSON.stringify(await app.db('audit_log'))).not.toContain(token);
  expect(app.lines.join()).not.toContain(token);
});

test('a wrong, an expired and a revoked link are told apart by nobody', async () => {
  const expired = await makeShare(1);
  const revoked = await makeShare();
  await technician.post(`/api/shares/${revoked.share.id}/revoke`).expect(200);
  const good = await makeShare();
  nowMs += DAY_MS;

  const answers = [];
  for (const token of ['wrong', expired.token, revoked.token]) answers.push(await open(token));
  const opens = await open(good.token);
  nowMs -= DAY_MS;

  for (const answer of answers) {
    expect(answer.status).toBe(404);
    expect(answer.body).toEqual({
      code: 'link-not-open',
      message: expect.any(String),
      shop: { name: TEST_SHOP.name, phone: TEST_SHOP.phone, email: TEST_SHOP.email },
    });
    expect(answer.text).toBe(answers[0]?.text);
    expect(Object.keys(answer.headers)).toEqual(Object.keys(answers[0]?.headers ?? {}));
  }
  expect(opens.status).toBe(200);
});

test('a link shows the run as it was judged and noted when it was made', async () => {
  const note = { timeS: 300, tempC: 68, text: 'Heat cut out' };
  const noted = await technician.post(`/api/runs/${runId}/notes`).send(note);
  const noteId = noted.body.notes[0].id;
  const { token } = await makeShare();
  const before = sharedRunSchema.parse((await open(token)).body);

  const lower = { ...THERMOSTAT_155, name: 'HL-T140', opens: 140, closes: 115 };
  const rating = (await owner.post('/api/ratings').send(lower)).body;
  await technician.post(`/api/runs/${runId}/analyses`).send({ ratingId: rating.id }).expect(201);
  await technician
    .put(`/api/runs/${runId}/notes/${noteId}`)
    .send({ ...note, text: 'Changed' })
    .expect(200);
  const after = sharedRunSchema.parse((await open(token)).body);

  expect(before.notes).toEqual([note]);
  expect(after).toEqual(before);
});

test('the shop sees when a link was first opened, and by whom it was made', async () => {
  const { share, token } = await makeShare();
  const openedAtMs = nowMs;
  await open(token).expect(200);
  nowMs += 60_000;
  await open(token).expect(200);

  const listed = await technician.get(`/api/runs/${runId}/shares`);

  expect(listed.body).toContainEqual({
    id: share.id,
    runId,
    madeAtMs: share.madeAtMs,
    by: 'Ada Quill',
    expiresAtMs: share.madeAtMs + 30 * DAY_MS,
    revokedAtMs: null,
    openedAtMs,
  });
  const events = await app.db('audit_log').where('details', 'like', `%${share.id}%`).pluck('event');
  expect(events).toEqual(['share_made', 'share_opened']);
});

test('guessing is slowed down after twenty tries a minute', async () => {
  nowMs += 10 * 60_000;
  const statuses = [];
  for (let i = 0; i < 21; i++) statuses.push((await open(`guess-${i}`)).status);
  nowMs += 60_000;
  const later = await open('guess');

  expect(statuses.slice(0, 20)).toEqual(Array(20).fill(404));
  expect(statuses[20]).toBe(429);
  expect(later.status).toBe(404);
});

test('the office shares a run as well, another technician does not', async () => {
  const office = await app.agent('office');
  const other = await app.agent('technician');

  const byOffice = await office.post(`/api/runs/${runId}/shares`).send({ days: 7 });
  const byOther = await other.post(`/api/runs/${runId}/shares`).send({ days: 7 });
  const revokedByOther = await other.post(`/api/shares/${byOffice.body.id}/revoke`);

  expect(byOffice.status).toBe(201);
  expect(byOther.status).toBe(404);
  expect(revokedByOther.status).toBe(404);
});
