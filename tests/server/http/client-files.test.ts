import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, expect, test } from 'vitest';
import { clientFiles } from '#server/http/client-files.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const folder = await mkdtemp(join(tmpdir(), 'fusekeeper-client-'));
await mkdir(join(folder, 'assets'));
await writeFile(join(folder, 'index.html'), '<title>Fusekeeper</title>');
await writeFile(join(folder, 'icon.svg'), '<svg/>');
await writeFile(join(folder, '.secret'), 'no');
await writeFile(join(folder, 'assets', 'main-a1b2.js'), 'export {};');
afterAll(() => rm(folder, { recursive: true }));
const { app } = await createTestApp({ pages: clientFiles(folder) });

test('a file whose name tells its content may be kept for a year', async () => {
  const { headers } = await request(app).get('/assets/main-a1b2.js').expect(200);

  expect(headers['cache-control']).toBe('public, max-age=31536000, immutable');
  expect(headers['content-type']).toMatch('javascript');
});

test('every other file is asked for again', async () => {
  for (const path of ['/', '/icon.svg', '/jobs/5', '/shared']) {
    const { headers } = await request(app).get(path).set('Accept', 'text/html,*/*').expect(200);
    expect([path, headers['cache-control']]).toEqual([path, 'no-cache']);
  }
});

test('an address that is no file is a page of the application', async () => {
  const page = await request(app).get('/rounds/2026-03-04').set('Accept', 'text/html').expect(200);

  expect(page.text).toBe('<title>Fusekeeper</title>');
});

test('what is not there is told without telling where files lie', async () => {
  for (const path of ['/assets/main-old.js', '/assets/..%2f..%2fpackage.json', '/api/nothing']) {
    const { status, text } = await request(app).get(path);
    expect([path, status]).toEqual([path, 404]);
    expect(text).not.toContain(folder);
  }
  await request(app).post('/rounds').expect(404);
});

test('a hidden file is not served', async () => {
  const answer = await request(app).get('/.secret');

  expect(answer.text).not.toBe('no');
});
