import { randomUUID } from 'node:crypto';
import type { NewMachine } from '#shared/schemas/homes.ts';
import { THERMOSTAT_155 } from '#tests/support/booked-visit.ts';
import type { Agent } from '#tests/support/test-app.ts';

/** Everything that a route can name: all of it of the own technician's visit. */
export type World = {
  owner: Agent;
  own: Agent;
  visitId: string;
  jobId: string;
  machine: NewMachine & { id: string };
  customerId: string;
  ratingId: string;
  probeId: string;
  someoneId: string;
  runId: string;
  uploadId: string;
  shareId: string;
  token: string;
};

export type Asked = { path: string; body?: object; file?: string };

/**
 * What one route answers to: anonymous · a link's customer · another link's customer · technician of the
 * visit · another technician · office · owner. `ok` is anything but a refusal of access.
 */
export type Case = { expected: string; ask: (world: World) => Asked | Promise<Asked> };

const anyone = 'ok ok ok ok ok ok ok';
const signedIn = '401 401 401 ok ok ok ok';
const ownerOnly = '401 401 401 403 403 403 ok';
const desk = '401 401 401 403 403 ok ok';
const notOther = '401 401 401 ok 404 ok ok';
const field = '401 401 401 ok 404 403 ok';
const sender = '401 401 401 ok 404 403 404';

const customer = { name: 'Ida Penn', phone: '', email: '', notes: '' };
const probe = {
  name: 'Blue lead',
  kind: 'thermocouple-k',
  unit: 'F',
  accuracyClass: null,
  accuracy: 2,
  responseS: null,
  calibrationU: null,
  calibratedAtMs: null,
  notes: '',
};
const calibration = {
  kind: 'ice-and-boiling',
  madeAtMs: 1,
  unit: 'F',
  points: [
    { reference: null, readings: [32.4] },
    { reference: null, readings: [211] },
  ],
  pressureHPa: 1008,
  altitudeM: null,
  referenceName: '',
  referenceU: null,
  resolution: 0.1,
  drift: 1,
  intervalMonths: 12,
  notes: '',
};
const shop = {
  name: 'Harrow Lane',
  town: '',
  phone: '',
  email: '',
  zone: 'UTC',
  unit: 'F',
  minCycles: 3,
};
const note = { timeS: 10, tempC: 50, text: 'Belt squeals' };
const part = (world: World) => ({
  ratingId: world.ratingId,
  visitId: null,
  fittedAtMs: 1,
  supplier: '',
  lot: '',
});
const address = { address: '9 Weir Row', town: 'Tessford', accessNotes: '' };
/** Asks with nothing that could be done: whether the door opens is all that is looked at. */
const just = (path: (world: World) => string, body?: object) => ({
  ask: (world: World): Asked => ({ path: path(world), ...(body && { body }) }),
});

async function made(agent: Agent, path: string, body: object): Promise<{ id: string }> {
  const answer = await agent.post(path).send(body);
  if (answer.status !== 201) throw new Error(`${path}: ${answer.status} ${answer.text}`);
  return answer.body;
}

async function newNote(world: World): Promise<string> {
  const page = await world.owner.post(`/api/runs/${world.runId}/notes`).send(note);
  return page.body.notes[0].id;
}

export const CASES: Record<string, Case> = {
  'GET /health': { expected: anyone, ...just(() => '/health') },
  'GET /shop-card': { expected: anyone, ...just(() => '/shop-card') },
  // An empty form is a 400, which is no refusal of access; signing in has tests of its own.
  'POST /session': { expected: anyone, ...just(() => '/session', {}) },
  'GET /session': { expected: signedIn, ...just(() => '/session') },
  'DELETE /session': { expected: signedIn, ...just(() => '/session') },
  'PUT /password': { expected: signedIn, ...just(() => '/password', {}) },

  'GET /people': { expected: ownerOnly, ...just(() => '/people') },
  'POST /people': { expected: ownerOnly, ...just(() => '/people', {}) },
  'POST /people/:id/disable': {
    expected: ownerOnly,
    ...just(({ someoneId }) => `/people/${someoneId}/disable`),
  },
  'POST /people/:id/enable': {
    expected: ownerOnly,
    ...just(({ someoneId }) => `/people/${someoneId}/enable`),
  },
  'GET /technicians': { expected: desk, ...just(() => '/technicians') },
  'GET /shop': { expected: signedIn, ...just(() => '/shop') },
  'PUT /shop': { expected: ownerOnly, ...just(() => '/shop', shop) },

  'GET /customers': { expected: desk, ...just(() => '/customers') },
  'POST /customers': { expected: desk, ...just(() => '/customers', customer) },
  'GET /customers/:id': {
    expected: desk,
    ...just(({ customerId }) => `/customers/${customerId}`),
  },
  'PUT /customers/:id': {
    expected: desk,
    ...just(({ customerId }) => `/customers/${customerId}`, customer),
  },
  'GET /homes': { expected: signedIn, ...just(() => '/homes') },
  'POST /homes': {
    expected: desk,
    ask: ({ customerId }) => ({ path: '/homes', body: { ...address, customerId } }),
  },
  'GET /homes/:id': { expected: notOther, ...just(({ machine }) => `/homes/${machine.homeId}`) },
  'PUT /homes/:id': {
    expected: desk,
    ask: ({ machine, customerId }) => ({
      path: `/homes/${machine.homeId}`,
      body: { ...address, customerId },
    }),
  },
  'POST /machines': {
    expected: notOther,
    ask: ({ machine }) => ({ path: '/machines', body: machine }),
  },
  'GET /machines/:id': { expected: notOther, ...just(({ machine }) => `/machines/${machine.id}`) },
  'PUT /machines/:id': {
    expected: notOther,
    ask: ({ machine }) => ({ path: `/machines/${machine.id}`, body: machine }),
  },
  'PUT /machines/:id/specified': {
    expected: notOther,
    ask: ({ machine, ratingId }) => ({
      path: `/machines/${machine.id}/specified`,
      body: { setting: 'low', ratingId, limitRatingId: null },
    }),
  },
  'POST /machines/:id/parts': {
    expected: notOther,
    ask: (world) => ({ path: `/machines/${world.machine.id}/parts`, body: part(world) }),
  },
  'POST /machines/:id/parts/:partId/remove': {
    expected: notOther,
    async ask(world) {
      const path = `/machines/${world.machine.id}/parts`;
      await made(world.owner, `/api${path}`, part(world));
      const page = await world.owner.get(`/api/machines/${world.machine.id}`);
      const fitted = page.body.fitted.find((each: { removedAtMs: unknown }) => !each.removedAtMs);
      const body = { removedAtMs: 2, removedWhy: 'Worn' };
      return { path: `${path}/${fitted.id}/remove`, body };
    },
  },
  'GET /machines/:id/runs': {
    expected: notOther,
    ...just(({ machine }) => `/machines/${machine.id}/runs`),
  },
  'GET /machines/:id/references': {
    expected: notOther,
    ...just(({ machine }) => `/machines/${machine.id}/references`),
  },

  'GET /ratings': { expected: signedIn, ...just(() => '/ratings') },
  'POST /ratings': { expected: desk, ...just(() => '/ratings', THERMOSTAT_155) },
  'PUT /ratings/:id': {
    expected: desk,
    ...just(({ ratingId }) => `/ratings/${ratingId}`, THERMOSTAT_155),
  },
  'GET /probes': { expected: signedIn, ...just(() => '/probes') },
  'POST /probes': { expected: desk, ...just(() => '/probes', probe) },
  'PUT /probes/:id': { expected: desk, ...just(({ probeId }) => `/probes/${probeId}`, probe) },
  'GET /calibrations': { expected: signedIn, ...just(() => '/calibrations') },
  'POST /probes/:id/calibrations': {
    expected: desk,
    ...just(({ probeId }) => `/probes/${probeId}/calibrations`, calibration),
  },

  'GET /jobs': { expected: signedIn, ...just(() => '/jobs') },
  'POST /jobs': {
    expected: desk,
    ask: ({ machine }) => ({
      path: '/jobs',
      body: { machineId: machine.id, complaint: 'No heat', callsBackJobId: null },
    }),
  },
  'GET /jobs/:id': { expected: notOther, ...just(({ jobId }) => `/jobs/${jobId}`) },
  'PUT /jobs/:id': {
    expected: notOther,
    ...just(({ jobId }) => `/jobs/${jobId}`, { state: 'on-site' }),
  },
  'POST /jobs/:id/visits': {
    expected: desk,
    ask: ({ jobId, own }) => ({
      path: `/jobs/${jobId}/visits`,
      body: { technicianId: own.person.id, startsAtMs: 1, endsAtMs: 2, notes: '' },
    }),
  },
  'GET /visits/:id': { expected: notOther, ...just(({ visitId }) => `/visits/${visitId}`) },
  'POST /visits/:id/safety': {
    expected: field,
    ...just(({ visitId }) => `/visits/${visitId}/safety`),
  },
  'GET /rounds': { expected: signedIn, ...just(() => '/rounds') },
  'POST /sendings': {
    expected: signedIn,
    ...just(() => '/sendings', { deviceId: '5f0c1f0e-7d5e-4c3a-9a55-1f6a2f5a9d01', things: [] }),
  },

  'POST /uploads': {
    expected: field,
    ask: ({ visitId }) => ({ path: `/uploads?visitId=${visitId}`, file: 'not a log' }),
  },
  'GET /uploads/:id': { expected: sender, ...just(({ uploadId }) => `/uploads/${uploadId}`) },
  'PUT /uploads/:id/choices': {
    expected: sender,
    ...just(({ uploadId }) => `/uploads/${uploadId}/choices`, {}),
  },
  'POST /uploads/:id/accept': {
    expected: sender,
    ...just(({ uploadId }) => `/uploads/${uploadId}/accept`, {}),
  },
  'DELETE /uploads/:id': { expected: sender, ...just(({ uploadId }) => `/uploads/${uploadId}`) },

  'GET /runs/:id': { expected: notOther, ...just(({ runId }) => `/runs/${runId}`) },
  'GET /runs/:id/trace': { expected: notOther, ...just(({ runId }) => `/runs/${runId}/trace`) },
  'GET /runs/:id/samples': { expected: notOther, ...just(({ runId }) => `/runs/${runId}/samples`) },
  'GET /runs/:id/file': { expected: notOther, ...just(({ runId }) => `/runs/${runId}/file`) },
  'POST /runs/:id/analyses': {
    expected: field,
    ...just(({ runId }) => `/runs/${runId}/analyses`, {}),
  },
  'POST /runs/:id/notes': {
    expected: field,
    ...just(({ runId }) => `/runs/${runId}/notes`, note),
  },
  'PUT /runs/:id/notes/:noteId': {
    expected: field,
    ask: async (world) => ({
      path: `/runs/${world.runId}/notes/${await newNote(world)}`,
      body: note,
    }),
  },
  'DELETE /runs/:id/notes/:noteId': {
    expected: field,
    ask: async (world) => ({ path: `/runs/${world.runId}/notes/${await newNote(world)}` }),
  },

  'GET /runs/:id/shares': { expected: notOther, ...just(({ runId }) => `/runs/${runId}/shares`) },
  'POST /runs/:id/shares': {
    expected: notOther,
    ...just(({ runId }) => `/runs/${runId}/shares`, { days: 7 }),
  },
  'POST /shares/:id/revoke': {
    expected: notOther,
    async ask({ owner, runId }) {
      const share = await made(owner, `/api/runs/${runId}/shares`, { days: 7 });
      return { path: `/shares/${share.id}/revoke` };
    },
  },
  // Whoever holds the token of a link opens that one.
  'POST /shared/open': {
    expected: anyone,
    ask: ({ token }) => ({ path: '/shared/open', body: { token } }),
  },
};

/** A path with ids that name nothing, for the same answer. */
export function strangeIds(path: string): string {
  return path.replace(/[0-9a-f]{8}-[0-9a-f-]{27}/g, () => randomUUID());
}
