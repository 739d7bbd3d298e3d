import { once } from 'node:events';
import { readdir } from 'node:fs/promises';
import { createServer, request as httpRequest, type IncomingMessage } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { sendLog, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, type Agent } from '#tests/support/test-app.ts';

const BOUNDARY = 'fusekeeper-test';
const MB = 1024 * 1024;

vi.setConfig({ testTimeout: WORKER_START_MS });

const app = await createTestApp();
const owner = await app.agent('owner');
const server = createServer(app.app);
let technician: Agent;
let cookie: string;
let visitId: string;

beforeAll(async () => {
  await once(server.listen(0, '127.0.0.1'), 'listening');
  technician = await app.agent('technician');
  visitId = (await bookVisit(owner, technician)).visit.id;
  cookie = technician.cookie;
}, WORKER_START_MS);

afterAll(() => {
  server.closeAllConnections();
  server.close();
});

const staged = () => readdir(join(app.dataDir, 'staged'));

function start(headers: Record<string, string | number> = {}) {
  const { port } = server.address() as AddressInfo;
  return httpRequest({
    port,
    host: '127.0.0.1',
    method: 'POST',
    path: `/api/uploads?visitId=${visitId}`,
    headers: { cookie, 'content-type': `multipart/form-data; boundary=${BOUNDARY}`, ...headers },
  });
}

function partHead(fileName = 'big.csv', field = 'file'): string {
  const disposition = `form-data; name="${field}"; filename="${fileName}"`;
  return `--${BOUNDARY}\r\nContent-Disposition: ${disposition}\r\nContent-Type: text/csv\r\n\r\n`;
}
const partEnd = `\r\n--${BOUNDARY}--\r\n`;

async function answerOf(request: ReturnType<typeof start>) {
  const [response] = (await once(request, 'response')) as [IncomingMessage];
  let text = '';
  for await (const piece of response.setEncoding('utf8')) text += piece;
  return { status: response.statusCode, body: JSON.parse(text), headers: response.headers };
}

test('a file over 100 MB is refused and leaves nothing, though its size was not announced', async () => {
  const request = start();
  const answer = answerOf(request);
  request.write(partHead());
  const piece = Buffer.alloc(MB, '0,75\n');
  for (let sent = 0; sent <= 100; sent++) {
    if (!request.write(piece)) await once(request, 'drain');
  }
  request.end(partEnd);

  expect((await answer).status).toBe(413);
  expect((await answer).body.code).toBe('too-large');
  expect(await staged()).toEqual([]);
});

test('a file that says it is over 100 MB is refused before it is sent', async () => {
  const request = start({ 'content-length': 200 * MB });
  const answer = answerOf(request);
  request.flushHeaders();

  expect((await answer).status).toBe(413);
  request.destroy();
  expect(await staged()).toEqual([]);
});

test('a connection that is cut off leaves nothing and frees its place', async () => {
  for (let i = 0; i < 5; i++) {
    const request = start();
    request.on('error', () => undefined);
    request.write(partHead());
    request.write(Buffer.alloc(MB, '0,75\n'));
    await expect.poll(staged).toHaveLength(1);
    request.destroy();
    await expect.poll(staged).toEqual([]);
  }

  const upload = await sendLog(technician, visitId, cyclingLog(50));

  expect(upload.reading.state).toBe('read');
  await technician.delete(`/api/uploads/${upload.id}`).expect(204);
});

test.each([
  ['photo.png', 415, 'wrong-ending'],
  ['log.csv.exe', 415, 'wrong-ending'],
])('a file called %s is refused', async (fileName, status, code) => {
  const answer = await technician
    .post('/api/uploads')
    .query({ visitId })
    .attach('file', Buffer.from('0,75\n'), fileName);

  expect(answer.status).toBe(status);
  expect(answer.body.code).toBe(code);
  expect(await staged()).toEqual([]);
});

test('a form with anything but one file is refused', async () => {
  const post = () => technician.post('/api/uploads').query({ visitId });
  const log = Buffer.from(cyclingLog(50));
  const answers = [
    await post().attach('file', log, 'a.csv').attach('file', log, 'b.csv'),
    await post().attach('other', log, 'a.csv'),
    await post().field('note', 'hello').attach('file', log, 'a.csv'),
    await post().field('note', 'hello'),
  ];

  expect(answers.map(({ status }) => status)).toEqual([400, 400, 400, 400]);
  expect(await staged()).toEqual([]);
});

test('a second file of the same person waits its turn', async () => {
  const first = start();
  const answer = answerOf(first);
  first.write(partHead());
  first.write(cyclingLog(50));
  await expect.poll(staged).toHaveLength(1);

  const second = await technician
    .post('/api/uploads')
    .query({ visitId })
    .attach('file', Buffer.from(cyclingLog(50)), 'b.csv');
  first.end(partEnd);

  expect(second.status).toBe(429);
  expect(Number(second.headers['retry-after'])).toBeGreaterThan(0);
  expect((await answer).status).toBe(201);
});
