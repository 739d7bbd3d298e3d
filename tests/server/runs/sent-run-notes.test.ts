import { expect, test } from 'vitest';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingTemps } from '#tests/support/cycling-log.ts';
import { handRunEvents } from '#tests/support/hand-run-events.ts';
import { WORKER_START_MS } from '#tests/support/send-log.ts';
import { createTestApp, NOW } from '#tests/support/test-app.ts';
import { sendingDevice } from '../sendings/sent-things.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const office = await app.agent('office');
const technician = await app.agent('technician', 'Tess Rowe');
const other = await app.agent('technician');

const FIRST = { timeS: 30, tempC: 60, text: 'Belt squeals' };
const SECOND = { timeS: 40, tempC: 61, text: 'Belt squeals when hot' };
const THIRD = { timeS: 50, tempC: 62, text: 'Idler pulley squeals' };

async function notesOf(runId: string) {
  const { body } = await technician.get(`/api/runs/${runId}`).expect(200);
  return body.notes as { id: string; timeS: number; text: string; by: string }[];
}

/** A run in one chain, as a device keeps it, and a note behind its end. */
async function handRunWithNote() {
  const { visit } = await bookVisit(owner, technician);
  const events = handRunEvents({
    ...{ visitId: visit.id, startedAtMs: NOW.getTime() - 3_600_000, unit: 'F', marks: [] },
    setup: {
      ...{ placement: 'Outlet', duct: 'on', load: 'empty', setting: 'high' },
      ...{ roomTemp: null, probeId: null },
    },
    readings: cyclingTemps(60, { opensF: 155, closesF: 130 }).map((temp, i) => ({
      atS: 2 + i * 5,
      temp,
    })),
  });
  const runId = events[0]?.runId ?? '';
  const device = sendingDevice(technician);
  const chain = `run:${runId}`;
  const things = events.map((event, i) =>
    device.thing('run-event', event, { chain, chainN: i + 1 }),
  );
  const place = { chain, chainN: events.length + 1 };
  return { runId, device, things, note: device.thing('run-note', { runId, ...FIRST }, place) };
}

async function newRun(): Promise<string> {
  const { runId, device, things } = await handRunWithNote();
  await device.send(...things);
  return runId;
}

test(
  'a note that was written, changed and removed without signal comes in that order, once',
  async () => {
    const runId = await newRun();
    const device = sendingDevice(technician);
    const added = device.thing('run-note', { runId, ...FIRST }, { chain: 'notes:a', chainN: 1 });
    const changes = { runId, noteId: added.id };
    const edit = device.thing(
      'run-note-edit',
      { ...changes, was: FIRST, now: SECOND },
      { chain: 'notes:a', chainN: 2 },
    );
    const again = device.thing(
      'run-note-edit',
      { ...changes, was: SECOND, now: THIRD },
      { chain: 'notes:a', chainN: 3 },
    );

    const first = await device.send(added, edit, again);
    const twice = await device.send(added, edit, again);

    expect(first.map(({ status }) => status)).toEqual(['applied', 'applied', 'applied']);
    expect(twice.map(({ status }) => status)).toEqual(Array(3).fill('already-applied'));
    expect(await notesOf(runId)).toMatchObject([{ id: added.id, ...THIRD, by: 'Tess Rowe' }]);

    const removal = device.thing('run-note-removal', { ...changes, was: THIRD });
    expect(await device.send(removal)).toMatchObject([{ status: 'applied' }]);
    expect(await notesOf(runId)).toEqual([]);
  },
  WORKER_START_MS,
);

test('a note that somebody else changed meanwhile is neither changed nor removed unasked', async () => {
  const runId = await newRun();
  const device = sendingDevice(technician);
  const added = device.thing('run-note', { runId, ...FIRST });
  await device.send(added);
  await owner.put(`/api/runs/${runId}/notes/${added.id}`).send(SECOND).expect(200);

  const answers = await device.send(
    device.thing('run-note-edit', { runId, noteId: added.id, was: FIRST, now: THIRD }),
    device.thing('run-note-removal', { runId, noteId: added.id, was: FIRST }),
  );

  expect(answers).toMatchObject([
    { status: 'conflict', server: { note: SECOND }, device: { now: THIRD } },
    { status: 'conflict', server: { note: SECOND } },
  ]);
  expect(await notesOf(runId)).toMatchObject([SECOND]);
});

test('a change of a note that is gone is shown as such; its removal has what it wanted', async () => {
  const runId = await newRun();
  const device = sendingDevice(technician);
  const added = device.thing('run-note', { runId, ...FIRST });
  await device.send(added);
  await owner.delete(`/api/runs/${runId}/notes/${added.id}`).expect(200);

  const answers = await device.send(
    device.thing('run-note-edit', { runId, noteId: added.id, was: FIRST, now: SECOND }),
    device.thing('run-note-removal', { runId, noteId: added.id, was: FIRST }),
  );

  expect(answers).toMatchObject([
    { status: 'conflict', server: { note: null } },
    { status: 'applied' },
  ]);
});

test('a note comes behind the run that it was written on', async () => {
  const { runId, device, things, note } = await handRunWithNote();

  const [early] = await device.send(note);
  const answers = await device.send(...things, note);

  expect(early?.status).toBe('waiting');
  expect(answers.at(-1)?.status).toBe('applied');
  expect(await notesOf(runId)).toMatchObject([FIRST]);
});

test('a note waits for a run that a crash came before, and brings it about', async () => {
  const { runId, device, things, note } = await handRunWithNote();
  await device.send(...things);
  await app.db('analyses').where({ run_id: runId }).delete();
  await app.db('runs').where({ id: runId }).delete();
  await app.db('uploads').where({ id: runId }).delete();

  const [waits] = await device.send(note);
  const [comes] = await device.send(note);

  expect([waits?.status, comes?.status]).toEqual(['waiting', 'applied']);
  expect(await notesOf(runId)).toMatchObject([FIRST]);
});

test('nobody writes on another’s run, nor on one that never was', async () => {
  const runId = await newRun();
  const note = { runId, ...FIRST };
  const [theirs, offices] = [sendingDevice(other), sendingDevice(office)];

  expect(await theirs.send(theirs.thing('run-note', note))).toMatchObject([{ code: 'not-found' }]);
  expect(await offices.send(offices.thing('run-note', note))).toMatchObject([
    { code: 'not-allowed' },
  ]);
  const { thing, send } = sendingDevice(technician);
  const nowhere = '4c0a3f57-3f0e-4f0e-9d0e-5f0c1f0e7d5e';
  expect(await send(thing('run-note', { ...note, runId: nowhere }))).toMatchObject([
    { status: 'refused', code: 'not-found' },
  ]);
});
