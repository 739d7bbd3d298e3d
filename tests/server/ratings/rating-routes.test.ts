import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import { THERMOSTAT_155 } from '#tests/support/booked-visit.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp();
const office = await app.agent('office');
const technician = await app.agent('technician');

const PROBE = {
  name: 'Red lead',
  kind: 'thermocouple-k',
  unit: 'C',
  accuracyClass: null,
  accuracy: 1.1,
  responseS: 4.5,
  calibrationU: 0.35,
  calibratedAtMs: 1_767_225_600_000,
  notes: 'Chipped plug',
};

test('a rating comes back in the unit and to the last bit as it was typed', async () => {
  const typed = { ...THERMOSTAT_155, opens: 155.1, opensTol: 0.1 + 0.2 };

  const added = await office.post('/api/ratings').send(typed);
  const listed = await technician.get('/api/ratings');

  expect(added.body).toEqual({ ...typed, id: expect.any(String) });
  expect(listed.body).toContainEqual(added.body);
});

test('a rating is corrected', async () => {
  const { body } = await office.post('/api/ratings').send(THERMOSTAT_155);

  const changed = await office
    .put(`/api/ratings/${body.id}`)
    .send({ ...THERMOSTAT_155, opens: 160 });

  expect(changed.body).toEqual({ ...body, opens: 160 });
  await office.put(`/api/ratings/${randomUUID()}`).send(THERMOSTAT_155).expect(404);
});

test('a thermostat closes, and below where it opens', async () => {
  const add = (given: object) => office.post('/api/ratings').send({ ...THERMOSTAT_155, ...given });

  expect((await add({ closes: 155 })).body.fields).toEqual({
    closes: 'Enter a temperature below the one it opens at',
  });
  expect((await add({ closes: null })).body.fields).toEqual({
    closes: 'Enter where it closes again',
  });
  expect((await add({ opens: 'hot', opensTol: -1 })).body.fields).toEqual({
    opens: 'Enter a number',
    opensTol: 'At least 0',
  });
});

test('a probe is added, corrected and listed by name', async () => {
  const added = await office.post('/api/probes').send(PROBE);
  const bare = {
    ...PROBE,
    name: 'Glass stem',
    kind: 'liquid-in-glass',
    responseS: null,
    calibrationU: null,
    calibratedAtMs: null,
  };
  const other = await office.post('/api/probes').send(bare);

  const changed = await office
    .put(`/api/probes/${added.body.id}`)
    .send({ ...PROBE, accuracy: 2.2 });

  expect(added.body).toEqual({ ...PROBE, id: expect.any(String) });
  expect(changed.body).toEqual({ ...added.body, accuracy: 2.2 });
  expect((await technician.get('/api/probes')).body).toEqual([other.body, changed.body]);
  await office.put(`/api/probes/${randomUUID()}`).send(PROBE).expect(404);
});
