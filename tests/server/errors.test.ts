import request from 'supertest';
import { expect, test } from 'vitest';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp({
  pages: (req) => {
    throw new Error(`the house is at ${req.path}`);
  },
});
const owner = await app.agent('owner');

test('a defect of ours is logged whole and told bare', async () => {
  const answer = await request(app.app).get('/somewhere');

  expect(answer.status).toBe(500);
  expect(answer.body).toEqual({ code: 'defect', message: 'Something broke on our side.' });
  const line = app.lines.find((each) => each.includes('unexpected error')) ?? '{}';
  expect(JSON.parse(line)).toMatchObject({
    level: 50,
    err: {
      message: 'the house is at /somewhere',
      stack: expect.stringContaining('errors.test.ts'),
    },
    req: { method: 'GET', path: '/somewhere' },
  });
});

test('what cannot be JSON is refused in words', async () => {
  const send = (body: string, type = 'application/json') =>
    owner.post('/api/customers').set('Content-Type', type).send(body);

  expect((await send('{"name":')).body).toEqual({
    code: 'not-json',
    message: 'The request is not readable JSON.',
  });
  expect((await send('{}', 'application/json; charset=koi8-r')).status).toBe(415);
  expect((await send(`{"name":"${'x'.repeat(101 * 1024)}"}`)).body).toMatchObject({
    code: 'too-large',
  });
  expect((await send('[]')).status).toBe(400);
  expect((await send('"x"')).status).toBe(400);
});

test('a packed body is refused, since a small one can hold a house', async () => {
  const answer = await owner
    .post('/api/customers')
    .set({ 'Content-Type': 'application/json', 'Content-Encoding': 'gzip' })
    .send('x');

  expect(answer.status).toBe(415);
});

test('an address that cannot be decoded names nothing', async () => {
  for (const path of ['/api/jobs/%zz', '/api/jobs/%00', '/api/%2e%2e/jobs']) {
    expect([path, (await owner.get(path)).status]).toEqual([path, 404]);
  }
});

test('a method that a route does not know is not there', async () => {
  await owner.patch('/api/shop').send({}).expect(404);
  await owner.options('/api/shop').expect(404);
  await owner.head('/api/shop').expect(200);
});
