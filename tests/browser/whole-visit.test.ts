import type { Page } from '@playwright/test';
import { ownServer } from './support/own-server.ts';
import { laidBy, signIn, untilLaidBy } from './support/phone.ts';
import { byKeypad, endByKeys, openToStart, PATIENTLY, readByKeys } from './support/run-by-keys.ts';
import { createServerRecord } from './support/server-record.ts';
import { expect, test } from './support/watched-test.ts';

test.use({ viewport: { width: 390, height: 844 }, serviceWorkers: 'allow' });

type Stop = { visitId: string; machineId: string; runId: string };

test('with the server dead since breakfast a visit is worked on from opening to the run’s outcome, and sent in the evening', async ({
  page,
}) => {
  const server = await ownServer();
  await server.start();
  try {
    await signIn(page, server.url);
    await untilLaidBy(page);
    const { visitId, machineId, runId } = await stopWithRuns(page);
    const needed = [
      ...[`/api/machines/${machineId}`, `/api/machines/${machineId}/runs`, '/api/ratings'],
      ...[`/api/machines/${machineId}/references`, '/api/probes', `/api/runs/${runId}`],
    ];
    await expect.poll(() => laidBy(page), PATIENTLY).toEqual(expect.arrayContaining(needed));
    await expect
      .poll(() => laidBy(page), PATIENTLY)
      .toEqual(expect.arrayContaining([expect.stringContaining(`/api/runs/${runId}/trace?`)]));
    const record = createServerRecord(server);
    const known = await record.runsOf(visitId);
    await server.kill();

    await page.goto(`${server.url}/rounds`);
    await expect(page.getByText(/^Not connected, as of \d/)).toBeVisible();
    for (const [path, standing] of [
      [`/visits/${visitId}`, /Safety first/],
      [`/machines/${machineId}`, /Specified to have/],
      [`/runs/${runId}`, /What the log shows|Check next|In the next ten minutes|Cut-outs/],
      ['/ratings', /opens/i],
    ] as const) {
      await page.goto(server.url + path);
      await expect(page.getByText(standing).first()).toBeVisible();
      await expect(page.getByRole('main').getByRole('alert')).toHaveCount(0);
    }

    const start = await openToStart(page, `${server.url}/visits/${visitId}/stopwatch`);
    await start.click();
    for (const tempF of [81, 83, 86, 88]) await readByKeys(page, tempF, byKeypad(page));
    await endByKeys(page);
    await expect(page.getByText(/^Judged on this phone by engine version/)).toBeVisible();

    await server.start();
    await page.goto(`${server.url}/unsent`);
    await expect(page.getByText('Everything is with the shop.')).toBeVisible();
    const made = (await record.runsOf(visitId)).filter((id) => !known.includes(id));
    expect(made).toHaveLength(1);
    expect(await record.readingsOf(made[0] ?? '')).toEqual([81, 83, 86, 88]);
  } finally {
    await server.remove();
  }
});

/** A visit of the day whose machine was measured before. */
async function stopWithRuns(page: Page): Promise<Stop> {
  return page.evaluate(async () => {
    const ask = async (path: string) => (await fetch(path)).json();
    const { visits } = await ask('/api/rounds');
    for (const { id, job } of visits) {
      const [run] = await ask(`/api/machines/${job.machine.id}/runs`);
      if (run) return { visitId: id, machineId: job.machine.id, runId: run.id };
    }
    throw new Error('no machine of the day was measured before');
  });
}
