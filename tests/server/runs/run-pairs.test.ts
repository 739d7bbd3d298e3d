import { beforeAll, describe, expect, test } from 'vitest';
import { runPageSchema, type RunConditions, type RunPage } from '#shared/schemas/runs.ts';
import { bookVisit, THERMOSTAT_155, type BookedVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { acceptance, CONDITIONS, sendLog, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, NOW } from '#tests/support/test-app.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician');
let booked: BookedVisit;

type Told = { opensF?: number; closesF?: number; visitId?: string; startedAtMs?: number | null };

/** A run of a 155/130 °F thermostat, unless told otherwise, under such conditions; its id. */
async function runUnder(conditions: Partial<RunConditions>, told: Told = {}): Promise<string> {
  const { opensF = 155, closesF = 130, visitId = booked.visit.id, startedAtMs = null } = told;
  const upload = await sendLog(technician, visitId, cyclingLog(480, { opensF, closesF }));
  const accepted = await technician
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { conditions: { ...CONDITIONS, ...conditions }, startedAtMs }));
  expect(accepted.status).toBe(201);
  return accepted.body.runIds[0];
}

async function pageOf(id: string): Promise<RunPage> {
  return runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body);
}

beforeAll(async () => {
  booked = await bookVisit(owner, technician);
}, 2 * WORKER_START_MS);

describe('a run of a machine', { timeout: 2 * WORKER_START_MS }, () => {
  let off: string;

  beforeAll(async () => {
    off = await runUnder({ duct: 'off' });
  }, 2 * WORKER_START_MS);

  test('stands by itself where there is none to set it beside', async () => {
    expect((await pageOf(off)).pairs).toEqual({ duct: null, settings: null });
  });

  test('is set beside the one with the duct on, from either page', async () => {
    const on = await runUnder({ duct: 'on' }, { opensF: 165, closesF: 132 });

    const [seenOff, seenOn] = [await pageOf(off), await pageOf(on)];

    expect(seenOn.pairs.duct).toMatchObject({ off: { id: off }, on: { id: on } });
    expect(seenOff.pairs.duct).toEqual(seenOn.pairs.duct);
    expect(seenOn.pairs.duct?.pair).toMatchObject({ verdict: 'house-duct' });
    expect(seenOn.pairs.duct?.pair.signs).toContain('runs-hot');
  });

  test('is judged by its own heat setting’s band, and set beside the other setting', async () => {
    const low = { ...THERMOSTAT_155, name: 'HL-T140', opens: 140, closes: 120 };
    const rating = (await owner.post('/api/ratings').send(low)).body;
    await owner
      .put(`/api/machines/${booked.machine.id}/specified`)
      .send({ setting: 'low', ratingId: rating.id, limitRatingId: null })
      .expect(200);

    const cool = await runUnder({ duct: 'off', setting: 'low' }, { opensF: 140, closesF: 120 });
    const page = await pageOf(cool);

    expect(page.analysis.judgedBy?.name).toBe('HL-T140');
    expect(page.analysis.analysis.findings[0]?.code).toBe('in-band');
    expect(page.pairs.settings).toMatchObject({
      hotter: { id: off, setting: 'high' },
      cooler: { id: cool, setting: 'low' },
      pair: { verdict: 'as-it-should', expectedFrom: 'ratings' },
    });
    // 155 − 140 °F, by the two ratings.
    expect((page.pairs.settings?.pair.expectedK ?? 0) * 1.8).toBeCloseTo(15, 6);
  });

  test('on a setting that the machine has no rating for is not judged', async () => {
    const page = await pageOf(await runUnder({ setting: 'medium' }));

    expect(page.analysis).toMatchObject({ judgedBy: null, analysis: { notJudged: 'no-rating' } });
  });

  test('is set beside none from before another part went in', async () => {
    const other = await bookVisit(owner, technician);
    const before = NOW.getTime() - 7_200_000;
    const first = await runUnder({ duct: 'off' }, { visitId: other.visit.id, startedAtMs: before });
    const second = await runUnder(
      { duct: 'on' },
      { visitId: other.visit.id, startedAtMs: before + 3_600_000 },
    );
    expect((await pageOf(second)).pairs.duct?.off.id).toBe(first);

    await owner
      .post(`/api/machines/${other.machine.id}/parts`)
      .send({
        ratingId: other.rating.id,
        visitId: other.visit.id,
        fittedAtMs: before + 1_800_000,
        supplier: '',
        lot: '',
      })
      .expect(201);

    expect((await pageOf(second)).pairs.duct).toBeNull();
  });
});
