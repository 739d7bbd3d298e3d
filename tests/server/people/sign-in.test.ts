import jwt from 'jsonwebtoken';
import request from 'supertest';
import { beforeEach, expect, test, vi } from 'vitest';
import { createTestApp, NOW, type Agent } from '#tests/support/test-app.ts';

// True hashes: a third of a second each on a free core, some seconds on a crowded machine.
vi.setConfig({ testTimeout: 180_000 });

const DAY_MS = 86_400_000;
let nowMs = NOW.getTime();
const app = await createTestApp({ now: () => new Date(nowMs) });
const owner = await app.agent('owner', 'Mae Harrow');
const PASSWORD = 'four quiet drums turn';
const EMAIL = 'rae@harrowlane.example';
const rae = (
  await owner
    .post('/api/people')
    .send({ name: 'Rae', email: EMAIL, role: 'technician', password: PASSWORD })
).body;
const WRONG = {
  status: 401,
  body: { code: 'wrong-sign-in', message: 'That e-mail and password do not go together.' },
};

beforeEach(async () => {
  nowMs = NOW.getTime();
  await app.db('sign_in_failures').delete();
  await app.db('audit_log').delete();
});

async function signIn(email = EMAIL, password = PASSWORD) {
  const { status, body, headers } = await request(app.app)
    .post('/api/session')
    .send({ email, password });
  const cookies: string[] = [headers['set-cookie'] ?? []].flat();
  return { status, body, cookies };
}

function seen(cookie: string) {
  return request(app.app).get('/api/session').set('Cookie', cookie);
}

async function audited(): Promise<string[]> {
  return app.db('audit_log').orderBy('id').pluck('event');
}

test('the right password opens a session, whatever the case of the address', async () => {
  const { status, body, cookies } = await signIn(' RAE@HarrowLane.example ');

  expect(status).toBe(200);
  expect(body.person).toEqual(rae);
  expect(cookies).toEqual([
    expect.stringMatching(
      /^fusekeeper=[\w.-]+; Path=\/; Expires=Fri, 03 Apr 2026 15:00:00 GMT; HttpOnly; SameSite=Lax$/,
    ),
  ]);
  const [cookie = ''] = cookies[0]?.split(';') ?? [];
  expect((await seen(cookie)).body.person).toEqual(rae);
  expect(await audited()).toEqual(['authn_login_success']);
});

test('a wrong password, an unknown address and a disabled person get the same answer', async () => {
  await owner.post(`/api/people/${rae.id}/disable`).expect(200);

  const disabled = await signIn();
  await owner.post(`/api/people/${rae.id}/enable`).expect(200);
  const wrong = await signIn(EMAIL, 'four quiet drums turm');
  const unknown = await signIn('nobody@harrowlane.example');

  expect(disabled).toMatchObject(WRONG);
  expect(wrong).toEqual(disabled);
  expect(unknown).toEqual(disabled);
  expect((await signIn()).status).toBe(200);
});

test('an unknown address takes as long as a known one', async () => {
  const takesMs = async (email: string) => {
    await app.db('sign_in_failures').delete();
    const start = performance.now();
    await signIn(email, 'not the password');
    return performance.now() - start;
  };

  // In turn, so that what else the machine does falls on both; the quickest is the least disturbed.
  const known: number[] = [];
  const unknown: number[] = [];
  for (let i = 0; i < 4; i++) {
    known.push(await takesMs(EMAIL));
    unknown.push(await takesMs('nobody@harrowlane.example'));
  }

  // Without the hash of nobody it is under a tenth.
  const ratio = Math.min(...unknown) / Math.min(...known);
  expect(ratio).toBeGreaterThan(0.5);
  expect(ratio).toBeLessThan(2);
});

test('nothing of a long password is ignored', async () => {
  // bcrypt alone reads 72 bytes: eighteen of these.
  const password = '🧺'.repeat(64);
  const person = { name: 'Lou', email: 'lou@harrowlane.example', role: 'office', password };
  await owner.post('/api/people').send(person).expect(201);

  expect((await signIn(person.email, `${'🧺'.repeat(18)}WRONG`)).status).toBe(401);
  expect((await signIn(person.email, password)).status).toBe(200);
});

test('after five failures it must wait, twice as long each time, until a success', async () => {
  for (let i = 0; i < 5; i++) expect((await signIn(EMAIL, 'wrong')).status).toBe(401);
  expect(await signIn()).toMatchObject({
    status: 429,
    body: { code: 'too-many-tries', message: 'Too many tries. Wait 1 s, then try again.' },
  });

  nowMs += 1000;
  expect((await signIn(EMAIL, 'wrong')).status).toBe(401);
  nowMs += 1999;
  expect((await signIn()).status).toBe(429);
  nowMs += 1;
  expect((await signIn()).status).toBe(200);
  expect((await signIn(EMAIL, 'wrong')).status).toBe(401);
  expect((await signIn()).status).toBe(200);
});

test('an address that nobody has must wait just the same', async () => {
  const email = 'stranger@harrowlane.example';
  for (let i = 0; i < 5; i++) expect((await signIn(email, 'wrong')).status).toBe(401);

  expect((await signIn(email)).body.message).toBe('Too many tries. Wait 1 s, then try again.');
});

test('many tries at the same moment are all counted', async () => {
  const answers = await Promise.all(Array.from({ length: 12 }, () => signIn(EMAIL, 'wrong')));

  expect(answers.filter(({ status }) => status === 401)).toHaveLength(5);
  expect(answers.filter(({ status }) => status === 429)).toHaveLength(7);
});

test('a storm of sign-ins is turned away while other requests are answered', async () => {
  let hashed = 0;
  const storm = Array.from({ length: 40 }, async (_, i) => {
    const { status } = await signIn(`p${i}@harrowlane.example`, 'wrong');
    if (status === 401) hashed += 1;
    return status;
  });
  const other = await owner.get('/api/session');
  const hashedMeanwhile = hashed;
  const statuses = await Promise.all(storm);

  expect(other.status).toBe(200);
  // It waits for none of the hashes that stand in the queue.
  expect(hashedMeanwhile).toBeLessThan(5);
  expect(statuses.filter((status) => status === 401).length).toBeLessThanOrEqual(22);
  expect(statuses.filter((status) => status === 429).length).toBeGreaterThanOrEqual(18);
});

test('the address that was typed is kept as a keyed hash only, and forgotten after a day', async () => {
  await signIn('Typed-My-Password@harrowlane.example', 'wrong');
  const [row] = await app.db('sign_in_failures');
  nowMs += DAY_MS + 1;
  await signIn('another@harrowlane.example', 'wrong');

  expect(row.email_hash).toMatch(/^[0-9a-f]{64}$/);
  expect(await app.db('sign_in_failures').where({ email_hash: row.email_hash })).toEqual([]);
});

test('failures and locks are on record without what was typed', async () => {
  for (let i = 0; i < 5; i++) await signIn(EMAIL, 'my-secret-guess');

  expect(await audited()).toEqual([
    ...Array<string>(4).fill('authn_login_fail'),
    'authn_login_lock',
  ]);
  const kept = JSON.stringify(await app.db('audit_log')) + app.lines.join('');
  expect(kept).not.toContain('my-secret-guess');
  expect(kept).not.toContain(EMAIL);
});

test('no log line holds a cookie, a token or a password', async () => {
  const { cookies } = await signIn();
  const token = /fusekeeper=([^;]+)/.exec(cookies[0] ?? '')?.[1] ?? '';
  await seen(`fusekeeper=${token}`).query({ token: 'in-the-query' });

  const log = app.lines.join('');
  expect(token.length).toBeGreaterThan(100);
  for (const secret of [token, PASSWORD, 'in-the-query']) expect(log).not.toContain(secret);
  expect(log).toContain('"path":"/api/session"');
});

test('signing out ends the session at once, for a copy of its cookie too', async () => {
  const { cookies } = await signIn();
  const [cookie = ''] = cookies[0]?.split(';') ?? [];

  const out = await request(app.app).delete('/api/session').set('Cookie', cookie);

  expect(out.status).toBe(204);
  expect(out.headers['set-cookie']).toEqual([
    expect.stringMatching(/^fusekeeper=;.*Expires=Thu, 01 Jan 1970/),
  ]);
  expect((await seen(cookie)).status).toBe(401);
});

test('signing in anew ends the session that the browser had', async () => {
  const person = await app.agent('office');

  await person.post('/api/session').send({ email: EMAIL, password: PASSWORD }).expect(200);

  expect((await seen(person.cookie)).status).toBe(401);
});

test('disabling somebody ends what they have open; enabling does not bring it back', async () => {
  const person = await app.agent('technician');
  await person.get('/api/session').expect(200);

  await owner.post(`/api/people/${person.person.id}/disable`).expect(200);
  await person.get('/api/session').expect(401);
  await owner.post(`/api/people/${person.person.id}/enable`).expect(200);

  await person.get('/api/session').expect(401);
});

test('another role holds from the next request on', async () => {
  const person = await app.agent('office');
  await person.get('/api/customers').expect(200);

  await app.db('users').where({ id: person.person.id }).update({ role: 'technician' });

  await person.get('/api/customers').expect(403);
});

test('a session dies after 14 days unseen, and after 30 in any case', async () => {
  const idle = await app.agent('office');
  const busy = await app.agent('office');
  nowMs += 14 * DAY_MS - 1;
  await busy.get('/api/session').expect(200);
  nowMs += 1;
  await idle.get('/api/session').expect(401);

  nowMs = NOW.getTime() + 27 * DAY_MS;
  await busy.get('/api/session').expect(200);
  nowMs = NOW.getTime() + 30 * DAY_MS - 1000;
  await busy.get('/api/session').expect(200);
  nowMs = NOW.getTime() + 30 * DAY_MS;
  await busy.get('/api/session').expect(401);
});

test('a changed password ends every other session of the person', async () => {
  const signedIn = async (password: string): Promise<string> =>
    (await signIn(EMAIL, password)).cookies[0]?.split(';')[0] ?? '';
  const [here, elsewhere] = [await signedIn(PASSWORD), await signedIn(PASSWORD)];
  const change = (body: object) =>
    request(app.app).put('/api/password').set('Cookie', here).send(body);

  const wrong = await change({ current: 'not this', next: 'a kettle of blue smoke' });
  const short = await change({ current: PASSWORD, next: 'short' });
  await change({ current: PASSWORD, next: 'a kettle of blue smoke' }).expect(204);

  expect(wrong.body.fields).toEqual({ current: 'This is not your present password' });
  expect(short.body.fields).toEqual({ next: 'Use at least 12 characters' });
  expect((await seen(here)).status).toBe(200);
  expect((await seen(elsewhere)).status).toBe(401);
  expect((await signIn()).status).toBe(401);
  expect(await signedIn('a kettle of blue smoke')).not.toBe('');
  await change({ current: 'a kettle of blue smoke', next: PASSWORD }).expect(204);
});

test('guessing the present password of an open session is slowed down as well', async () => {
  const person = await app.agent('technician');
  const guess = () => person.put('/api/password').send({ current: 'guess', next: PASSWORD });

  for (let i = 0; i < 5; i++) await guess().expect(400);

  await guess().expect(429);
});

test('no token but our own, in date and for an open session, is anybody', async () => {
  const person: Agent = await app.agent('owner');
  const [, token = ''] = person.cookie.split('=');
  const claims = { sub: person.person.id, jti: jwt.decode(token, { json: true })?.jti };
  const exp = Math.floor(nowMs / 1000) + 3600;
  const key = app.secrets.tokenKey;
  const [header = '', payload = '', signature = ''] = token.split('.');
  const none = Buffer.from('{"alg":"none","typ":"JWT"}').toString('base64url');
  const aud = 'fusekeeper';
  const forged = {
    'alg none': `${none}.${payload}.`,
    'alg none with its old signature': `${none}.${payload}.${signature}`,
    'no signature': `${header}.${payload}.`,
    'another key': jwt.sign({ ...claims, aud, exp }, 'x'.repeat(48)),
    'another algorithm': jwt.sign({ ...claims, aud, exp }, key, { algorithm: 'HS512' }),
    'another audience': jwt.sign({ ...claims, aud: 'someone', exp }, key),
    'no audience': jwt.sign({ ...claims, exp }, key),
    'out of date': jwt.sign({ ...claims, aud, exp: Math.floor(nowMs / 1000) - 1 }, key),
    'not yet in date': jwt.sign({ ...claims, aud, exp, nbf: exp }, key),
    'no session': jwt.sign({ sub: claims.sub, aud, exp }, key),
    'another person’s session': jwt.sign({ ...claims, sub: rae.id, aud, exp }, key),
    'a key of its own choice': jwt.sign({ ...claims, aud, exp }, 'y'.repeat(48), {
      header: { alg: 'HS256', kid: '../../dev/null', jku: 'http://x.example/keys' },
    }),
    nonsense: 'x',
  };

  expect((await seen(person.cookie)).status).toBe(200);
  for (const [name, forgery] of Object.entries(forged)) {
    expect([name, (await seen(`fusekeeper=${forgery}`)).status]).toEqual([name, 401]);
  }
});

test('where the public address is https the cookie is bound to it', async () => {
  const publicUrl = new URL('https://fusekeeper.example');
  const https = await createTestApp({ publicUrl });
  const person = { name: 'Mae', email: EMAIL, role: 'owner', password: PASSWORD };
  const first = await https.agent('owner');
  // A session that was opened over plain http is none here.
  await first.post('/api/people').send(person).expect(401);
  const secure = first.cookie.replace('fusekeeper=', '__Host-fusekeeper=');
  await request(https.app).post('/api/people').set('Cookie', secure).send(person).expect(201);

  const answer = await request(https.app)
    .post('/api/session')
    .send({ email: EMAIL, password: PASSWORD });

  expect(answer.headers['set-cookie']).toEqual([
    expect.stringMatching(
      /^__Host-fusekeeper=[^;]+; Path=\/; Expires=[^;]+; HttpOnly; Secure; SameSite=Lax$/,
    ),
  ]);
});
