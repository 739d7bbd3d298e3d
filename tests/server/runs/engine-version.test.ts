import { expect, test } from 'vitest';
import { ANALYSIS_VERSION } from '#shared/analysis/analyse-run.ts';
import { runPageSchema } from '#shared/schemas/runs.ts';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { makeRun, WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp } from '#tests/support/test-app.ts';

const NEWER = `${Number(ANALYSIS_VERSION) + 1}`;
const app = await createTestApp({ engineVersion: NEWER });
const owner = await app.agent('owner');
const technician = await app.agent('technician');

test(
  'a run says which version judged it, which the server has by now, and keeps both answers',
  async () => {
    const { visit } = await bookVisit(owner, technician);
    const id = await makeRun(technician, visit.id, cyclingLog());

    const before = runPageSchema.parse((await technician.get(`/api/runs/${id}`)).body);
    const again = await technician.post(`/api/runs/${id}/analyses`).send({ ratingId: null });
    const after = runPageSchema.parse(again.body);

    expect(before.analysis.analysis.version).toBe(ANALYSIS_VERSION);
    expect(before.engineVersion).toBe(NEWER);
    expect(after.earlier).toMatchObject([{ id: before.analysis.id, version: ANALYSIS_VERSION }]);
  },
  WORKER_START_MS,
);
