import request from 'supertest';
import { expect, test } from 'vitest';
import { RULES } from '#server/access.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp();
const proxied = await createTestApp({ publicUrl: new URL('https://fusekeeper.example') });
const METHODS = { POST: 'post', PUT: 'put', DELETE: 'delete' } as const;
const customer = { name: 'Ida Penn', phone: '', email: '', notes: '' };

/** What a page at another port of this machine sends: the same site, but another origin. */
const FROM_ELSEWHERE = [
  { 'Sec-Fetch-Site': 'cross-site', Origin: 'http://elsewhere.example' },
  { 'Sec-Fetch-Site': 'same-site', Origin: 'http://127.0.0.1:9999' },
  { Origin: 'http://127.0.0.1:9999' },
  { Origin: 'null' },
];

test('no route that changes something listens to a page of another origin', async () => {
  const owner = await app.agent('owner');
  const changing = RULES.filter(({ method }) => method !== 'GET');
  const before = await app.db('sessions').where({ ended_at_ms: null });

  for (const { method, path } of changing) {
    if (method === 'GET') continue;
    const url = `/api${path.replace(/:\w+/g, owner.person.id)}`;
    for (const headers of FROM_ELSEWHERE) {
      const answer = await owner[METHODS[method]](url).set(headers).send(customer);
      expect([url, answer.status, answer.body.code]).toEqual([url, 403, 'other-origin']);
    }
  }

  expect(await app.db('customers')).toEqual([]);
  expect(await app.db('sessions').where({ ended_at_ms: null })).toEqual(before);
  const refusals = await app.db('audit_log').where({ event: 'malicious_csrf' });
  expect(refusals).toHaveLength(changing.length * FROM_ELSEWHERE.length);
});

test('the application’s own pages, and programs that are no page, are listened to', async () => {
  const owner = await app.agent('owner');
  const from = [{ 'Sec-Fetch-Site': 'same-origin' }, { 'Sec-Fetch-Site': 'none' }, {}];

  for (const headers of from) {
    await owner.post('/api/customers').set(headers).send(customer).expect(201);
  }
  const ours = { Host: 'localhost:4870', Origin: 'http://localhost:4870' };
  await owner.post('/api/customers').set(ours).send(customer).expect(201);
});

test('behind a proxy the public address is the own one, whatever the host says', async () => {
  const post = (origin: string) =>
    request(proxied.app)
      .post('/api/session')
      .set({ Host: '127.0.0.1:4870', Origin: origin })
      .send({});

  await post('https://fusekeeper.example').expect(400);
  await post('http://127.0.0.1:4870').expect(403);
});

test('a form of another site cannot pass for JSON', async () => {
  const owner = await app.agent('owner');
  const before = await app.db('customers');

  for (const type of ['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data']) {
    const answer = await owner.post('/api/customers').type(type).send(JSON.stringify(customer));
    expect([type, answer.status, answer.body.code]).toEqual([type, 415, 'wrong-type']);
  }
  expect(await app.db('customers')).toEqual(before);
});

test('an upload takes a form and no JSON', async () => {
  const technician = await app.agent('technician');

  await technician.post('/api/uploads').send({}).expect(415);
});
