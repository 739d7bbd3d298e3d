import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import { analysisInputOf } from '#client/pages/stopwatch/judge-run.ts';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { replayRun } from '#shared/recorder/replay-run.ts';
import type { EndSetup, RunEvent } from '#shared/recorder/run-event.ts';
import { seriesOfRun } from '#shared/recorder/series-of-run.ts';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingTemps } from '#tests/support/cycling-log.ts';
import { seededRandom } from '#tests/support/seeded-random.ts';
import { createTestApp, NOW, TEST_SHOP, type Agent } from '#tests/support/test-app.ts';
import { sendingDevice } from '../sendings/sent-things.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const technician = await app.agent('technician', 'Tess Rowe');
const other = await app.agent('technician');

const SETUP: EndSetup = {
  placement: 'At the exhaust outlet',
  duct: 'on',
  load: 'empty',
  setting: 'high',
  roomTemp: null,
  probeId: null,
};

type Said = { atS: number } & (
  | { temp: number }
  | { mark: 'click' | 'heat-off' }
  | { kind: 'undo' | 'correction'; of: number; temp?: number }
  | { says: 'cut-heat' }
  | { asleepFromS: number }
);

/** The events of a run, from what was done in it. */
function eventsOf(visitId: string, said: Said[], endS: number): RunEvent[] {
  const runId = randomUUID();
  const ids = said.map(() => randomUUID());
  const stamp = (n: number, atS: number) => ({
    runId,
    n,
    atS,
    wallMs: NOW.getTime() - 3_600_000 + Math.round(atS * 1000),
  });
  const middle = said.map((each, i): RunEvent => {
    const stamped = { id: ids[i]!, ...stamp(i + 1, each.atS) };
    if ('mark' in each) return { ...stamped, kind: 'mark', mark: each.mark, text: null };
    if ('asleepFromS' in each) return { ...stamped, kind: 'asleep', fromS: each.asleepFromS };
    if ('says' in each) return { ...stamped, kind: 'guard', says: each.says, why: 'limit-near' };
    if (!('kind' in each)) return { ...stamped, kind: 'reading', temp: each.temp, from: 'hand' };
    if (each.kind === 'undo') return { ...stamped, kind: 'undo', takes: ids[each.of]! };
    return { ...stamped, kind: 'correction', of: ids[each.of]!, temp: each.temp ?? 0 };
  });
  const start: RunEvent = {
    ...{ id: randomUUID(), ...stamp(0, 0), kind: 'start', visitId, label: 'Run 1' },
    ...{ unit: 'F', hasTenths: false, setup: { ...SETUP, duct: null, load: null } },
  };
  const end: RunEvent = {
    ...{ id: randomUUID(), ...stamp(said.length + 1, endS) },
    ...{ kind: 'end', label: 'As found', setup: SETUP },
  };
  return [start, ...middle, end];
}

function send(agent: Agent, events: RunEvent[], deviceNowMs: number | null = null) {
  const device = sendingDevice(agent, { deviceNowMs });
  const chain = `run:${events[0]?.runId}`;
  const things = events.map((event, i) =>
    device.thing('run-event', event, { chain, chainN: i + 1 }),
  );
  return device.send(...things);
}

/** A sound machine read by hand, in whole °F, every 10 s and a little off each time. */
function readings(seed: number, count = 110): Said[] {
  const random = seededRandom(seed);
  const opensF = 146 + 18 * random();
  const temps = cyclingTemps(count * 2, { opensF, closesF: opensF - 25 });
  return Array.from({ length: count }, (_, i) => ({
    atS: 4 + i * 10 + Math.round(random() * 1000) / 1000,
    temp: Math.round(temps[i * 2]! + (random() - 0.5) * 0.8),
  }));
}

test('a run taken by hand comes back as it was typed, with its marks, once its end has come', async () => {
  const { visit } = await bookVisit(owner, technician);
  const said: Said[] = [...readings(1, 60), { atS: 700, mark: 'click' }];
  const events = eventsOf(visit.id, said, 720);

  const answers = await send(technician, events);

  expect(answers.every(({ status }) => status === 'applied')).toBe(true);
  const page = (await technician.get(`/api/runs/${events[0]?.runId}`)).body;
  expect(page).toMatchObject({
    visitId: visit.id,
    label: 'As found',
    samples: 60,
    channel: 'By hand',
    channelUnit: 'F',
    conditions: { ...SETUP, roomUnit: 'F' },
    file: { name: 'stopwatch.jsonl' },
  });
  expect(page.marks).toEqual([{ kind: 'click', timeS: 700 - said[0]!.atS }]);
  const [first] = await app.db('run_samples').where({ run_id: page.id, channel: 1 });
  const typed = new Float64Array(Uint8Array.from(first.packed).buffer);
  expect([...typed]).toEqual(said.slice(0, 60).map((each) => 'temp' in each && each.temp));
});

test('both values of a correction, what was taken back and the guard are told on the run', async () => {
  const { visit } = await bookVisit(owner, technician);
  const taken = readings(2, 30);
  const said: Said[] = [
    ...taken,
    { atS: 310, temp: 999 },
    { atS: 311, kind: 'undo', of: 30 },
    { atS: 320, kind: 'correction', of: 5, temp: 88 },
    { atS: 330, says: 'cut-heat' },
  ];
  const events = eventsOf(visit.id, said, 340);

  await send(technician, events);

  const page = (await technician.get(`/api/runs/${events[0]?.runId}`)).body;
  expect(page.samples).toBe(30);
  const was = taken[5];
  const wasTemp = was && 'temp' in was ? was.temp : null;
  expect(page.warnings.map(({ code }: { code: string }) => code)).toEqual([
    'corrected',
    'taken-back',
    'guard',
  ]);
  expect(page.warnings[0].message).toContain(`typed as ${wasTemp} and put right to 88`);
});

test('a span asleep in a run without signal is held against both clocks as its end comes', async () => {
  const { visit } = await bookVisit(owner, technician);
  const said: Said[] = [...readings(3, 30), { atS: 320, asleepFromS: 300 }];
  const told = async (deviceNowMs: number | null) => {
    const events = eventsOf(visit.id, said, 340);
    await send(technician, events, deviceNowMs);
    return (await technician.get(`/api/runs/${events[0]?.runId}`)).body.warnings[0].message;
  };
  const span = 'From 5:00 to 5:20 time is from the phone’s clock';

  expect(await told(NOW.getTime() + 400)).toBe(
    `${span}; it agreed with the server’s clock when the run was sent.`,
  );
  expect(await told(NOW.getTime() - 90_000)).toBe(`${span}; not checked.`);
  // An older client, which does not say what its clock shows.
  expect(await told(null)).toBe(`${span}; not checked.`);
});

test('device and server judge six seeded runs alike, to the figures that are printed', async () => {
  const { visit, machine } = await bookVisit(owner, technician);
  const page = (await technician.get(`/api/machines/${machine.id}`)).body;
  for (let seed = 101; seed <= 106; seed++) {
    const events = eventsOf(visit.id, readings(seed), 1120);
    const run = replayRun(events);
    const toJudge = run && seriesOfRun(run);
    if (!run || !toJudge) throw new Error('no run');
    const person = technician.person;
    const references = (await technician.get(`/api/machines/${machine.id}/references`)).body;
    const known = {
      ...{ machine: page, probes: [], calibrations: [], references },
      session: { person, shop: TEST_SHOP },
    };
    const onDevice = analyseRun(toJudge.series, analysisInputOf(known, run, SETUP, toJudge));

    await send(technician, events);

    const stored = (await technician.get(`/api/runs/${run.start.runId}`)).body;
    expect(printed(stored.analysis.analysis)).toEqual(printed(onDevice));
  }
}, 240_000);

/** Codes, calls and outcome as they are; numbers as they are printed. */
function printed({ findings, outcome, cutOuts, resets, version }: Analysis) {
  const points = [...cutOuts, ...resets].map(({ timeS, tempC, uTotalK, call }) => ({
    at: timeS.toFixed(0),
    temp: (tempC * 1.8 + 32).toFixed(1),
    u: (uTotalK * 1.8).toFixed(1),
    call,
  }));
  return { codes: findings.map(({ code }) => code), outcome, points, version };
}

test('nobody adds to another’s run, and nothing comes after its end', async () => {
  const { visit } = await bookVisit(owner, technician);
  const events = eventsOf(visit.id, readings(3, 10), 120);

  const [refused] = await send(other, events);
  await send(technician, events);
  const last = { ...events.at(-1)!, n: events.length, id: randomUUID() };
  const device = sendingDevice(technician);
  const [late] = await device.send(device.thing('run-event', last));
  const [foreign] = await sendingDevice(owner).send(sendingDevice(owner).thing('run-event', last));

  expect(refused).toMatchObject({ status: 'refused', code: 'not-found' });
  expect(late).toMatchObject({ status: 'refused', code: 'run-over' });
  expect(foreign).toMatchObject({ status: 'refused', code: 'out-of-place' });
});

test('a run that a crash came before is made with the next one', async () => {
  const { visit } = await bookVisit(owner, technician);
  const lost = eventsOf(visit.id, readings(4, 20), 220);
  await send(technician, lost);
  const { runId } = lost[0]!;
  await app.db('analyses').where({ run_id: runId }).delete();
  await app.db('runs').where({ id: runId }).delete();
  await app.db('uploads').where({ id: runId }).delete();

  await send(technician, eventsOf(visit.id, readings(5, 20), 220));

  expect((await technician.get(`/api/runs/${runId}`)).body).toMatchObject({ samples: 20 });
});

test('a run that was thrown away, or holds under three readings, makes none', async () => {
  const { visit } = await bookVisit(owner, technician);
  const few = eventsOf(visit.id, readings(6, 2), 40);
  const events = eventsOf(visit.id, readings(7, 10), 120);
  const thrown: RunEvent[] = events.map((event) =>
    event.kind === 'end' ? { ...event, kind: 'thrown-away' } : event,
  );

  await send(technician, few);
  const [last] = (await send(technician, thrown.map(withoutEnd))).slice(-1);

  expect(last?.status).toBe('applied');
  expect((await technician.get(`/api/runs/${few[0]?.runId}`)).status).toBe(404);
  expect((await technician.get(`/api/runs/${events[0]?.runId}`)).status).toBe(404);
});

function withoutEnd(event: RunEvent): RunEvent {
  if (event.kind !== 'thrown-away') return event;
  const { id, runId, n, atS, wallMs, kind } = event;
  return { id, runId, n, atS, wallMs, kind };
}
