import { once } from 'node:events';
import { createServer, request as httpRequest } from 'node:http';
import type { IncomingHttpHeaders, OutgoingHttpHeaders } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Express } from 'express';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { within } from '#server/http/trusted-proxy.ts';
import { createTestApp } from '#tests/support/test-app.ts';

/** Two neighbours on the loopback: the proxy that the shop named, and anybody else. */
const PROXY = '127.0.0.2';
const ANYBODY = '127.0.0.3';
/** Addresses for documentation, RFC 5737 and RFC 3849. */
const CALLER = '203.0.113.7';
const OTHER_CALLER = '198.51.100.20';
const CALLER_V6 = '2001:db8::17';

const publicUrl = new URL('https://fusekeeper.example');
const proxied = await createTestApp({ publicUrl, trustedProxy: [PROXY] });
const port = await listen(proxied.app);
/** As it comes: nothing is trusted. */
const plain = await createTestApp();
const plainPort = await listen(plain.app);

beforeEach(async () => {
  await proxied.db('audit_log').delete();
  await plain.db('audit_log').delete();
});

async function listen(app: Express): Promise<number> {
  const server = createServer(app).listen(0, '127.0.0.1');
  await once(server, 'listening');
  afterAll(() => void server.close());
  const { port: listensAt } = server.address() as AddressInfo;
  return listensAt;
}

type Asked = {
  from: string;
  path?: string;
  method?: string;
  headers?: OutgoingHttpHeaders;
  body?: unknown;
  to?: number;
};
type Answer = { status: number; headers: IncomingHttpHeaders; body: string };

/** As it goes over the wire, from an address of the caller's choice. */
async function ask({ from, path = '/api/health', method = 'GET', ...rest }: Asked) {
  const { headers = {}, body, to = port } = rest;
  const sent = httpRequest({
    host: '127.0.0.1',
    port: to,
    localAddress: from,
    method,
    path,
    headers: body === undefined ? headers : { ...headers, 'content-type': 'application/json' },
  });
  sent.end(body === undefined ? undefined : JSON.stringify(body));
  const [response] = await once(sent, 'response');
  let text = '';
  for await (const chunk of response) text += String(chunk);
  return { status: response.statusCode, headers: response.headers, body: text } as Answer;
}

/** A request of another site is refused and put on record with the address it came from. */
async function addressOnRecord(asked: Asked): Promise<string> {
  const { db } = asked.to === plainPort ? plain : proxied;
  const elsewhere = { origin: 'https://elsewhere.example', ...asked.headers };
  const { status } = await ask({
    ...asked,
    path: '/api/shared/open',
    method: 'POST',
    headers: elsewhere,
  });
  expect(status).toBe(403);
  const [entry] = await db('audit_log').where({ event: 'malicious_csrf' }).orderBy('id', 'desc');
  return JSON.parse(entry.details).address;
}

function guess(from: string, headers: OutgoingHttpHeaders) {
  const body = { token: 'a-guess' };
  return ask({ from, path: '/api/shared/open', method: 'POST', headers, body });
}

const caddys = (caller: string, proto = 'https') => ({
  'x-forwarded-for': caller,
  'x-forwarded-proto': proto,
  'x-forwarded-host': publicUrl.host,
});

test('[ASVS 4.1.3] the trusted proxy’s word on the caller’s address is put on record', async () => {
  for (const caller of [CALLER, OTHER_CALLER, CALLER_V6]) {
    expect(await addressOnRecord({ from: PROXY, headers: caddys(caller) })).toBe(caller);
  }
});

test('[ASVS 4.1.3] from anybody else the forwarded headers change nothing', async () => {
  const spoofed = [
    caddys(CALLER),
    caddys(CALLER, 'http'),
    { 'x-forwarded-for': `${CALLER}, ${PROXY}` },
    { 'x-forwarded-for': PROXY, 'x-real-ip': CALLER, forwarded: `for=${CALLER};proto=http` },
  ];

  for (const headers of spoofed) {
    expect(await addressOnRecord({ from: ANYBODY, headers })).toBe(ANYBODY);
    expect(await addressOnRecord({ from: ANYBODY, headers, to: plainPort })).toBe(ANYBODY);
    expect(await addressOnRecord({ from: PROXY, headers, to: plainPort })).toBe(PROXY);
    const page = await ask({ from: ANYBODY, path: '/', headers });
    expect([page.status, page.headers.location]).toEqual([404, undefined]);
  }
});

test('[ASVS 4.1.3] what the caller wrote itself stands left of the proxy’s word and counts for nothing', async () => {
  const appended = { ...caddys(CALLER), 'x-forwarded-for': `${PROXY}, ${OTHER_CALLER}, ${CALLER}` };
  // A caller at the proxy's own machine does not make a second hop of itself.
  const looped = { ...caddys(CALLER), 'x-forwarded-for': `${CALLER}, ${PROXY}` };

  expect(await addressOnRecord({ from: PROXY, headers: appended })).toBe(CALLER);
  expect(await addressOnRecord({ from: PROXY, headers: looped })).toBe(PROXY);
});

test('[ASVS 4.1.3] a word that is no address is not put on record', async () => {
  for (const word of ['unknown', '', `${CALLER}, _hidden`, 'x'.repeat(5000)]) {
    const headers = { ...caddys(CALLER), 'x-forwarded-for': word };
    expect(await addressOnRecord({ from: PROXY, headers })).toBe(PROXY);
  }
});

test('guessing at links is counted by caller behind the proxy, not by proxy', async () => {
  const statuses: number[] = [];
  for (let i = 0; i < 21; i++) statuses.push((await guess(PROXY, caddys(CALLER))).status);

  expect(statuses).toEqual([...Array<number>(20).fill(404), 429]);
  expect((await guess(PROXY, caddys(OTHER_CALLER))).status).toBe(404);
});

test('[ASVS 4.1.3] a guesser cannot count as many by writing addresses into a header', async () => {
  const statuses: number[] = [];
  for (let i = 0; i < 21; i++)
    statuses.push((await guess(ANYBODY, caddys(`203.0.113.${i}`))).status);

  expect(statuses.at(-1)).toBe(429);
});

test('a page that came to the proxy in the clear is sent to the shop’s address', async () => {
  const asked = { from: PROXY, path: '/rounds?day=2026-03-04' };
  const forged = { host: 'evil.example', 'x-forwarded-host': 'evil.example' };

  const clear = await ask({ ...asked, headers: { ...caddys(CALLER, 'http'), ...forged } });
  const covered = await ask({ ...asked, headers: caddys(CALLER) });

  expect([clear.status, clear.headers.location]).toEqual([
    308,
    'https://fusekeeper.example/rounds?day=2026-03-04',
  ]);
  // Here only the API stands; a page would be found.
  expect(covered.status).toBe(404);
});

test('the API does nothing that came to the proxy in the clear', async () => {
  const headers = caddys(CALLER, 'http');
  const password = { email: 'mae@harrowlane.example', password: 'seen on the way' };

  const read = await ask({ from: PROXY, headers });
  const signIn = await ask({
    from: PROXY,
    path: '/api/session',
    method: 'POST',
    headers,
    body: password,
  });

  for (const { status, body } of [read, signIn]) {
    expect([status, JSON.parse(body)]).toEqual([
      403,
      { code: 'https-only', message: 'Open https://fusekeeper.example instead.' },
    ]);
  }
});

test('a proxy that says nothing of the scheme, and this machine itself, are let through', async () => {
  expect((await ask({ from: PROXY, headers: { 'x-forwarded-for': CALLER } })).status).toBe(200);
  expect((await ask({ from: PROXY })).status).toBe(200);
});

test('a sign-in that failed is on record with the caller’s address', async () => {
  const body = { email: 'nobody@harrowlane.example', password: 'a guess' };
  const path = '/api/session';
  await ask({ from: PROXY, path, method: 'POST', headers: caddys(CALLER), body });

  const [entry] = await proxied.db('audit_log').where({ event: 'authn_login_fail' });
  expect(JSON.parse(entry.details)).toEqual({ failures: 1, address: CALLER });
});

test('a proxy may be named by address or range, of either family', () => {
  const isNamed = within(['10.0.0.0/24', '192.0.2.9', '2001:db8::/64']);

  for (const address of ['10.0.0.255', '::ffff:10.0.0.1', '192.0.2.9', '2001:db8::9']) {
    expect([address, isNamed(address)]).toEqual([address, true]);
  }
  for (const address of ['10.0.1.0', '192.0.2.10', '2001:db8:0:1::9', '', 'localhost']) {
    expect([address, isNamed(address)]).toEqual([address, false]);
  }
});
