import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, expect, test } from 'vitest';
import { z } from 'zod';
import { ApiError, fetchJson, postJson, sendOnly } from '#client/api/http.ts';

let server: Server | undefined;

async function serve(listener: RequestListener): Promise<string> {
  const started = createServer(listener);
  server = started;
  await new Promise<void>((resolve) => started.listen(0, '127.0.0.1', resolve));
  return `http://127.0.0.1:${(started.address() as AddressInfo).port}`;
}

afterEach(() => {
  server?.close();
  server = undefined;
});

const nameSchema = z.object({ name: z.string() });

async function refusalOf(request: Promise<unknown>): Promise<ApiError> {
  const error = await request.then(
    () => null,
    (thrown: unknown) => thrown,
  );
  if (!(error instanceof ApiError)) throw new Error('no ApiError was thrown');
  return error;
}

test('an answer of the agreed shape is handed on, without what nobody agreed on', async () => {
  const url = await serve((_req, res) => res.end('{"name":"K2","secret":1}'));

  expect(await fetchJson(nameSchema, url)).toEqual({ name: 'K2' });
});

test('an answer of another shape is refused', async () => {
  const url = await serve((_req, res) => res.end('{"name":7}'));

  await expect(fetchJson(nameSchema, url)).rejects.toThrow(z.ZodError);
});

test('a refusal carries the server’s status, words and fields', async () => {
  const url = await serve((_req, res) => {
    res.statusCode = 409;
    res.end('{"code":"fields","message":"Look again.","fields":{"email":"Somebody has it"}}');
  });

  const refusal = await refusalOf(postJson(nameSchema, url, { name: 'K2' }));

  expect(refusal).toMatchObject({
    status: 409,
    code: 'fields',
    message: 'Look again.',
    fields: { email: 'Somebody has it' },
  });
});

test('a refusal that is no JSON gets words of ours', async () => {
  const url = await serve((_req, res) => {
    res.statusCode = 502;
    res.end('<h1>Bad gateway</h1>');
  });

  const refusal = await refusalOf(fetchJson(nameSchema, url));

  expect(refusal.status).toBe(502);
  expect(refusal.message).toBe('The server answered with 502. Try again.');
});

test('a server that is not there is told apart from one that refuses', async () => {
  const url = await serve(() => undefined);
  await new Promise((resolve) => server?.close(resolve));

  const refusal = await refusalOf(fetchJson(nameSchema, url));

  expect(refusal.status).toBe(0);
  expect(refusal.message).toContain('does not answer');
});

test('a request with nothing to say sends no body and takes an empty answer', async () => {
  const seen: (string | undefined)[] = [];
  const url = await serve((req, res) => {
    seen.push(req.method, req.headers['content-type']);
    res.statusCode = 204;
    res.end();
  });

  await sendOnly('DELETE', url);

  expect(seen).toEqual(['DELETE', undefined]);
});
