import request from 'supertest';
import express from 'express';
import { beforeEach, expect, test } from 'vitest';
import { createLogger, requestLog } from '#server/log.ts';

let lines: string[] = [];
const app = express();
app.use(requestLog(createLogger({ write: (line) => void lines.push(line) })));
app.get('/fine', (_req, res) => void res.set('Set-Cookie', 'session=secret-b').send('body-c'));
app.get('/broken', (_req, res) => void res.status(503).end());

beforeEach(() => {
  lines = [];
});

test('a request is one line of JSON that says what was asked for and how it went', async () => {
  await request(app).get('/fine');

  expect(lines).toHaveLength(1);
  expect(JSON.parse(lines[0] ?? '')).toEqual({
    level: 30,
    time: expect.any(Number),
    req: { method: 'GET', path: '/fine' },
    res: { status: 200 },
    responseTime: expect.any(Number),
    msg: 'request completed',
  });
});

test('headers, cookies, queries and bodies are never written down', async () => {
  await request(app)
    .get('/fine?token=secret-a')
    .set({ Cookie: 'session=secret-b', Authorization: 'Bearer secret-d', Referer: 'secret-e' });

  expect(lines.join('')).not.toMatch(/secret|body-c|127\.0\.0\.1/);
});

test('a line break in an address cannot begin a line of its own', async () => {
  await request(app).get('/fine%0d%0a{"level":30}');

  expect(lines).toHaveLength(1);
  expect(lines[0]?.trimEnd()).not.toMatch(/[\r\n]/);
});

test('an answer that tells of trouble is logged as an error', async () => {
  await request(app).get('/broken');

  expect(JSON.parse(lines[0] ?? '')).toMatchObject({ level: 50, res: { status: 503 } });
});

test('a level can be asked for, and silence', () => {
  const heard: string[] = [];
  const to = { write: (line: string) => void heard.push(line) };

  createLogger(to, 'silent').fatal('nothing');
  createLogger(to, 'error').info('nothing');
  createLogger(to, 'error').error('something');

  expect(heard).toHaveLength(1);
});
