import request from 'supertest';
import { expect, test } from 'vitest';
import { z } from 'zod';
import { RULES } from '#server/access.ts';
import { findRule } from '#server/http/guard.ts';
import { buildAccessWorld } from '#tests/support/access-world.ts';
import { createTestApp, type Agent } from '#tests/support/test-app.ts';
import { CASES, strangeIds, type Asked } from './access-cases.ts';

const app = await createTestApp();
const { world, office, other, otherRunId, otherToken } = await buildAccessWorld(app);
const NOT_FOUND = {
  code: 'not-found',
  message: 'There is nothing here, or it is not yours to see.',
};
const ACTORS = [
  'anonymous',
  'a link’s customer',
  'another link’s customer',
  'the visit’s technician',
  'another technician',
  'office',
  'owner',
] as const;

/** A layer of Express's router: a route, or a router that holds more, or what is of no interest here. */
const layerSchema = z.object({
  rawPath: z.string().optional(),
  route: z.object({ path: z.string(), methods: z.record(z.string(), z.boolean()) }).optional(),
  handle: z.custom<{ stack?: unknown[] }>((value) => typeof value === 'function'),
});

/** Every route of the running app, as `GET /api/jobs/:id`. */
function walk(stack: unknown[], below = ''): string[] {
  return z
    .array(layerSchema)
    .parse(stack)
    .flatMap(({ rawPath, route, handle }) => {
      if (route)
        return Object.keys(route.methods).map((method) => named(method, below + route.path));
      const mount = rawPath === undefined || rawPath === '/' ? '' : rawPath;
      return handle.stack ? walk(handle.stack, below + mount) : [];
    });
}

function named(method: string, path: string): string {
  return `${method.toUpperCase()} ${path}`;
}

const ROWS = RULES.map(({ method, path }) => named(method, path)).toSorted();

const METHOD = z.enum(['get', 'post', 'put', 'delete']);

/** A session of its own for each request, since some end it. */
async function send(actor: (typeof ACTORS)[number], method: string, asked: Asked) {
  const agents: Partial<Record<typeof actor, Agent>> = {
    'the visit’s technician': world.own,
    'another technician': other,
    office,
    owner: world.owner,
  };
  const agent = agents[actor];
  const from = agent ? await app.agentOf(agent.person) : request.agent(app.app);
  // A link's token opens that link, and is nothing to any other door.
  const tokens = { 'a link’s customer': world.token, 'another link’s customer': otherToken };
  const token = actor in tokens ? Reflect.get(tokens, actor) : undefined;
  if (token) from.set('Cookie', `fusekeeper=${token}`).set('Authorization', `Bearer ${token}`);
  const { path, body, file } = asked;
  const sent = from[METHOD.parse(method.toLowerCase())](`/api${path}`);
  return file === undefined ? sent.send(body) : sent.attach('file', Buffer.from(file), 'log.csv');
}

/** Everything that is kept, but for who came when, the record of refusals, and octets that nothing changes. */
async function everything(method: string): Promise<string> {
  if (method === 'GET') return '';
  const tables = await app
    .db('sqlite_master')
    .where({ type: 'table' })
    .whereNotIn('name', ['sessions', 'audit_log', 'run_samples', 'sqlite_sequence'])
    .pluck('name');
  return JSON.stringify(await Promise.all(tables.map((table) => app.db(table))));
}

test('every route of the running app has one row in the table, and every row a route', () => {
  const found = walk(app.app.router.stack);
  const routes = found.map((route) => route.replace(' /api/', ' /'));

  expect(routes.length).toBeGreaterThan(50);
  expect(found.filter((route) => !route.includes(' /api/'))).toEqual([]);
  expect(routes.toSorted()).toEqual(ROWS);
  for (const route of routes) {
    const [method = '', path = ''] = route.split(' ');
    const { rule } = findRule(method, path.replace(/:\w+/g, world.jobId)) ?? {};
    expect(rule && named(rule.method, rule.path)).toBe(route);
  }
});

test('every row is tried with every actor', () => {
  expect(Object.keys(CASES).toSorted()).toEqual(ROWS);
});

for (const [route, { expected, ask }] of Object.entries(CASES)) {
  test(`${route} lets in who may and nobody else`, async () => {
    const [method = ''] = route.split(' ');
    const answers: string[] = [];
    // The owner and the visit's technician come last, since they may change what is asked for.
    for (const [index, actor] of [...ACTORS.entries()].toSorted(byHarm)) {
      const asked = await ask(world);
      const before = await everything(method);
      const answer = await send(actor, method, asked);
      const isRefused = [401, 403, 404].includes(answer.status);
      answers[index] = isRefused ? String(answer.status) : 'ok';
      if (answer.status === 404) expect(answer.body).toEqual(NOT_FOUND);
      if (isRefused) expect(await everything(method)).toBe(before);
    }

    expect(answers.join(' ')).toBe(expected);
  });
}

function byHarm([a]: [number, string], [b]: [number, string]): number {
  const rank = (index: number) => (index === 3 ? 9 : index);
  return rank(a) - rank(b);
}

test('what is another technician’s cannot be told from what is not there', async () => {
  for (const path of [`/visits/${world.visitId}`, `/runs/${world.runId}`, `/jobs/${world.jobId}`]) {
    const hidden = await other.get(`/api${path}`);
    const missing = await other.get(`/api${strangeIds(path)}`);

    expect(hidden.status).toBe(404);
    expect({ status: missing.status, body: missing.body }).toEqual({
      status: hidden.status,
      body: hidden.body,
    });
  }
});

test('lists hold a technician’s own and nobody else’s', async () => {
  const ids = async (agent: Agent, path: string): Promise<string[]> =>
    (await agent.get(`/api${path}`)).body.map(({ id }: { id: string }) => id);

  expect(await ids(world.own, '/jobs')).toEqual([world.jobId]);
  expect(await ids(other, '/jobs')).not.toContain(world.jobId);
  expect(await ids(other, `/jobs?technician=${world.own.person.id}`)).not.toContain(world.jobId);
  expect(await ids(world.own, '/homes')).toEqual([world.machine.homeId]);
  expect(await ids(other, '/homes')).not.toContain(world.machine.homeId);
});

test('a link opens its own run only', async () => {
  const open = async (token: string) =>
    (await request(app.app).post('/api/shared/open').send({ token })).body;

  const [one, another] = [await open(world.token), await open(otherToken)];

  expect(one.jobNumber).not.toBe(another.jobNumber);
  expect(JSON.stringify(one)).not.toContain(otherRunId);
});

test('a row that names no route opens nothing', async () => {
  for (const path of ['/nothing', '/jobs/new/more', '/people/../jobs', '/jobs/%zz']) {
    const answer = await world.owner.get(`/api${path}`);
    expect({ path, status: answer.status, body: answer.body }).toEqual({
      path,
      status: 404,
      body: NOT_FOUND,
    });
  }
});
