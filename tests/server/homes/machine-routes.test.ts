import { randomUUID } from 'node:crypto';
import { beforeEach, expect, test } from 'vitest';
import { machinePageSchema } from '#shared/schemas/homes.ts';
import { bookVisit, THERMOSTAT_155, type BookedVisit } from '#tests/support/booked-visit.ts';
import { createTestApp, NOW } from '#tests/support/test-app.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician');
let booked: BookedVisit;
let url: string;
let fuseId: string;

const FUSE = {
  ...THERMOSTAT_155,
  kind: 'thermal-fuse',
  name: 'HL-F196',
  opens: 196,
  closes: null,
  closesTol: null,
};

beforeEach(async () => {
  booked = await bookVisit(owner, technician);
  url = `/api/machines/${booked.machine.id}`;
  fuseId = (await owner.post('/api/ratings').send(FUSE).expect(201)).body.id;
});

function fitting(given: object = {}) {
  return {
    ratingId: booked.rating.id,
    visitId: booked.visit.id,
    fittedAtMs: NOW.getTime(),
    supplier: 'Millgate Parts',
    lot: 'L7',
    ...given,
  };
}

test('a machine’s page holds its home, customer, ratings and parts', async () => {
  const { body } = await technician.get(url).expect(200);

  expect(machinePageSchema.parse(body)).toEqual({
    ...booked.machine,
    home: expect.objectContaining({ address: '4 Sill Lane' }),
    customer: expect.objectContaining({ name: 'Oona Marsh' }),
    specified: [{ setting: 'high', rating: booked.rating, limit: null }],
    fitted: [],
  });
});

test('the technician on the visit corrects a machine and adds another', async () => {
  const { id, ...machine } = booked.machine;

  const changed = await technician
    .put(url)
    .send({ ...machine, serial: 'C40-0118', ratedWatts: null });
  const added = await technician.post('/api/machines').send({ ...machine, make: 'Norrin' });

  expect(changed.body).toEqual({ ...machine, id, serial: 'C40-0118', ratedWatts: null });
  expect(added.status).toBe(201);
  expect((await technician.get(`/api/machines/${added.body.id}`)).body.make).toBe('Norrin');
});

test('a technician cannot move a machine to a home they have no business at', async () => {
  const elsewhere = await bookVisit(owner, await app.agent('technician'));
  const { machine } = booked;

  const { homeId } = elsewhere.machine;
  await technician
    .put(url)
    .send({ ...machine, homeId })
    .expect(404);

  expect((await owner.get(url)).body.homeId).toBe(machine.homeId);
  await owner
    .put(url)
    .send({ ...machine, homeId: randomUUID() })
    .expect(400);
});

test('each heat setting is specified once; a second time takes its place', async () => {
  const specify = (given: object) =>
    technician
      .put(`${url}/specified`)
      .send({ setting: 'high', ratingId: booked.rating.id, limitRatingId: null, ...given });

  await specify({ setting: 'low' }).expect(200);
  const page = await specify({ limitRatingId: fuseId });

  expect(page.body.specified).toEqual([
    { setting: 'high', rating: booked.rating, limit: { ...FUSE, id: fuseId } },
    { setting: 'low', rating: booked.rating, limit: null },
  ]);
});

test('a fuse does not cycle, and a cycling thermostat guards nothing', async () => {
  const specify = (given: object) =>
    owner
      .put(`${url}/specified`)
      .send({ setting: 'high', ratingId: booked.rating.id, limitRatingId: null, ...given });

  expect((await specify({ ratingId: fuseId })).body.fields).toEqual({
    ratingId: 'Choose a cycling thermostat or thermistor',
  });
  expect((await specify({ limitRatingId: booked.rating.id })).body.fields).toEqual({
    limitRatingId: 'Choose a limit, cut-off or fuse',
  });
  expect((await specify({ limitRatingId: randomUUID() })).status).toBe(400);
  expect((await owner.get(url)).body.specified).toHaveLength(1);
});

test('a part is fitted with its supplier and lot, and taken out with the reason', async () => {
  const fitted = await technician.post(`${url}/parts`).send(fitting());
  const [part] = fitted.body.fitted;
  const remove = (removedAtMs: number) =>
    technician
      .post(`${url}/parts/${part.id}/remove`)
      .send({ removedAtMs, removedWhy: 'Opens late' });

  expect(fitted.status).toBe(201);
  expect(part).toEqual({
    id: expect.any(String),
    visitId: booked.visit.id,
    fittedAtMs: NOW.getTime(),
    supplier: 'Millgate Parts',
    lot: 'L7',
    rating: booked.rating,
    removedAtMs: null,
    removedWhy: '',
  });
  expect((await remove(NOW.getTime() - 1)).body.fields).toHaveProperty('removedAtMs');
  const out = await remove(NOW.getTime() + 1);
  expect(out.body.fitted).toEqual([
    { ...part, removedAtMs: NOW.getTime() + 1, removedWhy: 'Opens late' },
  ]);
  expect((await remove(NOW.getTime() + 2)).status).toBe(409);
});

test('parts are listed newest first', async () => {
  await technician.post(`${url}/parts`).send(fitting({ fittedAtMs: 1000, visitId: null }));
  const page = await technician.post(`${url}/parts`).send(fitting({ ratingId: fuseId }));

  expect(page.body.fitted.map((part: { rating: { name: string } }) => part.rating.name)).toEqual([
    'HL-F196',
    'HL-T155',
  ]);
});

test('a part names a rating that is there and a visit to this machine', async () => {
  const elsewhere = await bookVisit(owner, technician);
  const fit = (given: object) => technician.post(`${url}/parts`).send(fitting(given));

  expect((await fit({ ratingId: randomUUID() })).body.fields).toEqual({
    ratingId: 'Choose what was fitted',
  });
  expect((await fit({ visitId: elsewhere.visit.id })).body.fields).toEqual({
    visitId: 'Choose a visit to this machine',
  });
});

test('a part of another machine cannot be taken out here', async () => {
  const elsewhere = await bookVisit(owner, technician);
  const there = `/api/machines/${elsewhere.machine.id}/parts`;
  const page = await owner.post(there).send(fitting({ visitId: null }));
  const [part] = page.body.fitted;

  const removed = { removedAtMs: NOW.getTime() + 1, removedWhy: 'x' };
  await owner.post(`${url}/parts/${part.id}/remove`).send(removed).expect(404);
});

test('a machine without runs says so with an empty list', async () => {
  expect((await technician.get(`${url}/runs`)).body).toEqual([]);
  await owner.get(`/api/machines/${randomUUID()}/runs`).expect(404);
});
