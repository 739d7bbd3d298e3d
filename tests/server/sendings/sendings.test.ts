import { randomUUID } from 'node:crypto';
import { expect, test } from 'vitest';
import { bookVisit } from '#tests/support/booked-visit.ts';
import { cyclingLog } from '#tests/support/cycling-log.ts';
import { makeRun } from '#tests/support/send-log.ts';
import { createTestApp, NOW } from '#tests/support/test-app.ts';
import { sendingDevice } from './sent-things.ts';

const app = await createTestApp();
const owner = await app.agent('owner');
const office = await app.agent('office');
const technician = await app.agent('technician', 'Tess Rowe');
const other = await app.agent('technician');

async function booked() {
  const { visit } = await bookVisit(owner, technician);
  return { visitId: visit.id, read: async () => (await owner.get(`/api/visits/${visit.id}`)).body };
}

test('a thing that comes twice is done once, and gets the same answer again', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const edit = device.thing('visit-edit', { visitId, basedOn: '', notes: 'Lint behind the drum' });

  const first = await device.send(edit);
  const second = await device.send(edit, edit);

  const answer = { notesVersion: edit.id };
  expect(first).toEqual([{ id: edit.id, status: 'applied', answer }]);
  expect(second).toEqual([
    { id: edit.id, status: 'already-applied', answer },
    { id: edit.id, status: 'already-applied', answer },
  ]);
  expect(await read()).toMatchObject({
    notes: 'Lint behind the drum',
    notesVersion: edit.id,
    notesEdited: { by: 'Tess Rowe', atMs: Date.parse('2026-03-04T14:30:00Z') },
  });
  expect(await app.db('received_things').where({ id: edit.id })).toHaveLength(1);
});

test('an id that comes with something else in it, or from somebody else, is refused', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const edit = device.thing('visit-edit', { visitId, basedOn: '', notes: 'One' });
  await device.send(edit);

  const [changed] = await device.send({ ...edit, payload: { ...edit.payload, notes: 'Two' } });
  const [stolen] = await sendingDevice(owner).send(edit);

  expect(changed).toMatchObject({ id: edit.id, status: 'refused', code: 'id-used' });
  expect(stolen).toMatchObject({ id: edit.id, status: 'refused', code: 'id-used' });
  expect((await read()).notes).toBe('One');
});

test('the order of names in a payload does not make it another thing', async () => {
  const { visitId } = await booked();
  const device = sendingDevice(technician);
  const edit = device.thing('visit-edit', { visitId, basedOn: '', notes: 'One' });
  await device.send(edit);

  const [answer] = await device.send({ ...edit, payload: { notes: 'One', basedOn: '', visitId } });

  expect(answer?.status).toBe('already-applied');
});

test('what belongs after something waits for it, and goes once that has come', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const chain = `visit:${visitId}`;
  const one = device.thing(
    'visit-edit',
    { visitId, basedOn: '', notes: 'One' },
    { chain, chainN: 1 },
  );
  const two = device.thing(
    'visit-edit',
    { visitId, basedOn: one.id, notes: 'Two' },
    { chain, chainN: 2 },
  );

  const [early] = await device.send(two);
  const untouched = (await read()).notes;
  const answers = await device.send(two, one);

  expect(early).toMatchObject({ id: two.id, status: 'waiting' });
  expect(untouched).toBe('');
  // Put in order of the device, however they lie in the request.
  expect(answers.map(({ id, status }) => [id, status])).toEqual([
    [one.id, 'applied'],
    [two.id, 'applied'],
  ]);
  expect((await read()).notes).toBe('Two');
});

test('a place in a chain is taken once', async () => {
  const { visitId } = await booked();
  const device = sendingDevice(technician);
  const place = { chain: `visit:${visitId}`, chainN: 1 };
  await device.send(device.thing('visit-edit', { visitId, basedOn: '', notes: 'One' }, place));

  const [answer] = await device.send(
    device.thing('visit-edit', { visitId, basedOn: '', notes: 'Another' }, place),
  );

  expect(answer).toMatchObject({ status: 'refused', code: 'place-used' });
});

test('an edit made on an older state is a conflict that shows both, and changes nothing', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const first = sendingDevice(owner);
  const theirs = first.thing('visit-edit', { visitId, basedOn: '', notes: 'From the desk' });
  await first.send(theirs);
  const mine = device.thing('visit-edit', { visitId, basedOn: '', notes: 'From the van' });

  const [answer] = await device.send(mine);
  const [again] = await device.send(mine);

  expect(answer).toEqual({
    id: mine.id,
    status: 'conflict',
    server: {
      notes: 'From the desk',
      notesVersion: theirs.id,
      notesEdited: { by: 'A owner', atMs: Date.parse('2026-03-04T14:30:00Z') },
    },
    device: mine.payload,
  });
  expect(again).toEqual(answer);
  expect((await read()).notes).toBe('From the desk');
});

test('another technician’s visit is refused as if there were none, and so is a strange one', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(other);
  const payloads = [visitId, randomUUID()].flatMap((id) => [
    device.thing('visit-edit', { visitId: id, basedOn: '', notes: 'Mine now' }),
    device.thing('safety-ticks', { visitId: id, tickedAtMs: 1 }),
  ]);

  const answers = await device.send(...payloads);

  const refused = {
    status: 'refused',
    code: 'not-found',
    message: 'There is nothing here, or it is not yours to see.',
  };
  expect(answers).toEqual(payloads.map(({ id }) => ({ id, ...refused })));
  expect(await read()).toMatchObject({ notes: '', safetyTickedAtMs: null });
  const tried = await app.db('audit_log').where({ user_id: other.person.id, event: 'authz_fail' });
  expect(tried).toHaveLength(4);
});

test('the office records on no visit', async () => {
  const { visitId } = await booked();
  const device = sendingDevice(office);

  const [answer] = await device.send(device.thing('safety-ticks', { visitId, tickedAtMs: 1 }));

  expect(answer).toMatchObject({ status: 'refused', code: 'not-allowed' });
});

test('the first ticking of the cautions counts, and none lies in the future', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const tick = (tickedAtMs: number) =>
    device.send(device.thing('safety-ticks', { visitId, tickedAtMs }));

  await tick(NOW.getTime() + 86_400_000);
  const capped = (await read()).safetyTickedAtMs;
  await tick(NOW.getTime() - 60_000);
  await tick(NOW.getTime() - 30_000);

  expect(capped).toBe(NOW.getTime());
  expect((await read()).safetyTickedAtMs).toBe(NOW.getTime() - 60_000);
});

test('a note on a run keeps the id it got on the device, and a bad one leaves nothing behind', async () => {
  const { visitId } = await booked();
  const runId = await makeRun(technician, visitId, cyclingLog());
  const device = sendingDevice(technician);
  const note = { runId, timeS: 30, tempC: 60, text: 'Belt squeals' };
  const [good, late] = [
    device.thing('run-note', note),
    device.thing('run-note', { ...note, timeS: 1e6 }),
  ];

  const answers = await device.send(good, late);

  expect(answers).toMatchObject([{ status: 'applied' }, { status: 'refused', code: 'fields' }]);
  const { body } = await technician.get(`/api/runs/${runId}`);
  expect(body.notes).toMatchObject([{ id: good.id, text: 'Belt squeals', by: 'Tess Rowe' }]);
});

test('a kind of a newer client is refused by name, holds up nothing, and may pass later', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const strange = device.thing('photo', { visitId });
  const edit = device.thing('visit-edit', { visitId, basedOn: '', notes: 'After it' });

  const answers = await device.send(strange, edit);

  expect(answers).toMatchObject([
    { id: strange.id, status: 'refused', code: 'unknown-kind' },
    { id: edit.id, status: 'applied' },
  ]);
  expect((answers[0] as { message: string }).message).toContain('“photo”');
  expect((await read()).notes).toBe('After it');
  // Not final: no record of it bars the same thing from a server that knows the kind.
  expect(await app.db('received_things').where({ id: strange.id })).toEqual([]);
});

test('one thing that cannot be read does not hold up the others', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const edit = device.thing('visit-edit', { visitId, basedOn: '', notes: 'Read' });
  const unreadable = { id: randomUUID(), kind: 7 };

  const answers = await device.send('nonsense', unreadable, null, edit);

  expect(answers).toMatchObject([
    { id: unreadable.id, status: 'refused', code: 'unreadable' },
    { id: edit.id, status: 'applied' },
  ]);
  expect((await read()).notes).toBe('Read');
});

test('things of one person are not taken under another’s session', async () => {
  const { visitId, read } = await booked();
  const device = sendingDevice(technician);
  const things = [device.thing('visit-edit', { visitId, basedOn: '', notes: 'Whose?' })];

  const answer = await owner
    .post('/api/sendings')
    .send({ deviceId: device.deviceId, personId: technician.person.id, things });

  expect([answer.status, answer.body.code]).toEqual([409, 'other-person']);
  expect((await read()).notes).toBe('');
});

test('what the client of the version before sent is still taken', async () => {
  const { visitId, read } = await booked();
  // Recorded from the first client that had a queue: it knew neither whose the things were nor chains.
  const recorded = {
    deviceId: '0b4f3c7e-52a5-4d0e-9d0b-6f2a5b9a7c11',
    things: [
      {
        id: 'c2f6b1de-8a07-4f0c-b0f0-2f9c4f1f6f10',
        kind: 'visit-edit',
        madeAtMs: 1772634600000,
        order: 1,
        payload: { visitId, basedOn: '', notes: 'From an old phone' },
      },
    ],
  };

  const answer = await technician.post('/api/sendings').send(recorded);

  expect(answer.status).toBe(200);
  expect(answer.body).toEqual({
    serverNowMs: NOW.getTime(),
    answers: [
      {
        id: 'c2f6b1de-8a07-4f0c-b0f0-2f9c4f1f6f10',
        status: 'applied',
        answer: { notesVersion: 'c2f6b1de-8a07-4f0c-b0f0-2f9c4f1f6f10' },
      },
    ],
  });
  expect((await read()).notes).toBe('From an old phone');
});

test('more than 500 things at once are refused whole', async () => {
  const device = sendingDevice(technician);
  const things = Array.from({ length: 501 }, () => null);

  const answer = await technician.post('/api/sendings').send({ deviceId: device.deviceId, things });

  expect(answer.status).toBe(400);
});
