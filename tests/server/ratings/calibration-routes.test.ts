import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import { calibrationSchema } from '#shared/schemas/calibrations.ts';
import { runPageSchema } from '#shared/schemas/runs.ts';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { makeRun, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const office = await app.agent('office');
const technician = await app.agent('technician');

const DAY_MS = 24 * 3600_000;
const PROBE = {
  name: 'Red lead',
  kind: 'thermocouple-k',
  unit: 'F',
  accuracyClass: 'iec-2',
  accuracy: 4.5,
  responseS: 3,
  calibrationU: null,
  calibratedAtMs: null,
  notes: '',
};
/** Held beside a thermometer that shows 5 °F more at every point. */
const CALIBRATION = {
  kind: 'reference',
  madeAtMs: app.now().getTime() - 30 * DAY_MS,
  unit: 'F',
  points: [
    { reference: 75, readings: [70] },
    { reference: 205, readings: [200.1, 199.9] },
  ],
  pressureHPa: null,
  altitudeM: null,
  referenceName: 'Glass no. 4',
  referenceU: 0.5,
  resolution: 0.1,
  drift: 1,
  intervalMonths: 12,
  notes: '',
};
const BATHS = {
  ...CALIBRATION,
  kind: 'ice-and-boiling',
  points: [
    { reference: null, readings: [31.5] },
    { reference: null, readings: [210.2] },
  ],
  altitudeM: 210,
  referenceName: '',
  referenceU: null,
};

async function newProbe(): Promise<string> {
  return (await office.post('/api/probes').send(PROBE).expect(201)).body.id;
}

test('a calibration comes back as it was written down, and none before it is lost', async () => {
  const probeId = await newProbe();
  const first = await office.post(`/api/probes/${probeId}/calibrations`).send(CALIBRATION);
  const second = await office.post(`/api/probes/${probeId}/calibrations`).send(BATHS);

  const listed = await technician.get('/api/calibrations');

  expect(first.status).toBe(201);
  expect(calibrationSchema.parse(first.body)).toMatchObject({ ...CALIBRATION, probeId });
  expect(listed.body).toEqual([first.body, second.body]);
});

test('a calibration says what is missing, field by field', async () => {
  const probeId = await newProbe();
  const send = async (given: object) =>
    (await office.post(`/api/probes/${probeId}/calibrations`).send({ ...CALIBRATION, ...given }))
      .body.fields;

  expect(await send({ referenceName: '', referenceU: null })).toEqual({
    referenceName: 'Enter which thermometer it was held beside',
    referenceU: 'Enter its uncertainty, from its certificate',
  });
  expect(await send({ points: [{ reference: null, readings: [] }] })).toEqual({
    points: 'Enter at least two points',
    'points.0.readings': 'Enter what the probe read',
    'points.0.reference': 'Enter what the reference showed',
  });
  expect(await send({ ...BATHS, altitudeM: null })).toEqual({
    pressureHPa: 'Enter the air pressure, or the altitude',
  });
  expect(await send({ madeAtMs: app.now().getTime() + 2 * DAY_MS })).toEqual({
    madeAtMs: 'Enter a day that has come',
  });
});

test('points that give no line are refused in words', async () => {
  const probeId = await newProbe();
  const points = [
    { reference: 75, readings: [70] },
    { reference: 205, readings: [120] },
  ];

  const answer = await office
    .post(`/api/probes/${probeId}/calibrations`)
    .send({ ...CALIBRATION, points });

  expect(answer.status).toBe(400);
  expect(answer.body.fields.points).toMatch(/off by more than any sound probe/);
  await office.post(`/api/probes/${randomUUID()}/calibrations`).send(CALIBRATION).expect(404);
});

test('a probe has a class of its own kind only', async () => {
  const add = (given: object) => office.post('/api/probes').send({ ...PROBE, ...given });

  expect((await add({ accuracyClass: 'pt-a' })).body.fields).toEqual({
    accuracyClass: 'Choose a class of this kind of probe',
  });
  expect((await add({ kind: 'other' })).status).toBe(400);
  expect((await add({ kind: 'pt100', accuracyClass: 'pt-a' })).body.accuracyClass).toBe('pt-a');
});

test(
  'a run is judged on corrected readings, and keeps the calibration that it was judged with',
  async () => {
    const booked = await bookVisit(owner, technician);
    const probeId = await newProbe();
    const plainId = await makeRun(technician, booked.visit.id, cyclingLog(), { probeId });
    const pageOf = async (id: string) =>
      runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body);
    const plain = await pageOf(plainId);
    await office.post(`/api/probes/${probeId}/calibrations`).send(CALIBRATION).expect(201);

    const judgedId = await makeRun(technician, booked.visit.id, cyclingLog(), { probeId });
    const judged = await pageOf(judgedId);
    const again = await technician.post(`/api/runs/${plainId}/analyses`).send({ ratingId: null });

    const firstOf = (page: typeof plain) => page.analysis.analysis.cutOuts[0]!;
    expect(plain.analysis.judgedWith).toMatchObject({ accuracyK: 2.5, calibration: null });
    expect(judged.analysis.judgedWith).toMatchObject({
      probeId,
      name: 'Red lead',
      accuracyK: 0,
      calibration: { kind: 'reference', standing: 'current', madeAtMs: CALIBRATION.madeAtMs },
    });
    // 5 °F more, at every temperature; the ± 4.5 °F of the class no longer counts.
    expect(firstOf(judged).tempC - firstOf(plain).tempC).toBeCloseTo(5 / 1.8, 6);
    expect(firstOf(judged).uTotalK).toBeLessThan(firstOf(plain).uTotalK / 2);
    expect(firstOf(runPageSchema.parse(again.body)).tempC).toBeCloseTo(firstOf(judged).tempC, 9);
    // What was judged before stays as it was.
    expect((await pageOf(plainId)).earlier[0]?.id).toBe(plain.analysis.id);
  },
  WORKER_START_MS,
);

test(
  'the trace is drawn as it was judged, the file’s readings stay as recorded',
  async () => {
    const booked = await bookVisit(owner, technician);
    const probeId = await newProbe();
    await office.post(`/api/probes/${probeId}/calibrations`).send(CALIBRATION).expect(201);
    const rows = [75, 155, 154.9, 155.1, 130].map((tempF, i) => `${i * 5},${tempF}`);
    const log = ['Elapsed (s),Exhaust (°F)', ...rows, ''].join('\n');

    const id = await makeRun(technician, booked.visit.id, log, { probeId });
    const answer = await technician.get(`/api/runs/${id}/samples`).responseType('blob');
    const { packed } = await app.db('run_samples').where({ run_id: id, channel: 1 }).first();

    expect(answer.body.readDoubleLE(5 * 8)).toBeCloseTo((75 + 5 - 32) / 1.8, 9);
    expect(packed).toEqual(Buffer.from(Float64Array.of(75, 155, 154.9, 155.1, 130).buffer));
  },
  WORKER_START_MS,
);
