import 'fake-indexeddb/auto';
import { randomUUID } from 'node:crypto';
import { afterEach, expect, test, vi } from 'vitest';
import { createDevice, type Device } from '#client/device/device.ts';

const opened: Device[] = [];

async function open(name: string, person = TOM, nowMs = Date.now): Promise<Device> {
  const device = createDevice({ name, nowMs });
  opened.push(device);
  await device.open(person, { person });
  return device;
}

const TOM = { id: '11111111-1111-4111-8111-111111111111', name: 'Tom Birkett' };
const ADA = { id: '22222222-2222-4222-8222-222222222222', name: 'Ada Quill' };
const edit = (notes: string) => ({
  kind: 'visit-edit' as const,
  payload: { visitId: TOM.id, basedOn: '', notes },
});

afterEach(async () => {
  for (const device of opened.splice(0)) await device.close();
});

test('a thing is there after the page is gone, with everything in it', async () => {
  const name = randomUUID();
  const before = await open(name);
  const kept = await before.keep(edit('Lint'));
  await before.close();

  const after = await open(name);

  expect(await after.things.list(TOM.id, 'unsent')).toEqual([kept]);
  expect(kept).toMatchObject({ order: 1, state: 'unsent', chain: null, chainN: null });
  expect(after.unsent().unsent).toBe(1);
});

test('two tabs number what they keep at once without a gap and without a double', async () => {
  const name = randomUUID();
  const tabs = [await open(name), await open(name)];

  await Promise.all(
    Array.from({ length: 40 }, (_, at) =>
      tabs[at % 2]!.keep({ kind: 'run-event', payload: at, chain: 'run:1' }),
    ),
  );

  const kept = await tabs[0]!.things.list(TOM.id, 'unsent');
  const numbers = Array.from({ length: 40 }, (_, at) => at + 1);
  expect(kept.map(({ order }) => order)).toEqual(numbers);
  expect((await tabs[1]!.things.listChain(TOM.id, 'run:1')).map(({ chainN }) => chainN)).toEqual(
    numbers,
  );
  expect(await tabs[0]!.things.deviceId()).toBe(await tabs[1]!.things.deviceId());
});

test('a thing counts as kept only once its transaction is through, asked for with strict durability', async () => {
  const device = await open(randomUUID());
  const transaction = vi.spyOn(IDBDatabase.prototype, 'transaction');

  await device.keep(edit('Lint'));

  const [stores, mode, options] = transaction.mock.calls[0] ?? [];
  expect([stores, mode, options]).toEqual([
    ['things', 'device'],
    'readwrite',
    { durability: 'strict' },
  ]);
});

test('in a full store what was read makes room, and what cannot be kept is told in words', async () => {
  const device = await open(randomUUID());
  await device.answers.put(TOM.id, '/api/ratings', []);
  const add = vi.spyOn(IDBObjectStore.prototype, 'add');
  const full = () => {
    throw new DOMException('no room', 'QuotaExceededError');
  };

  add.mockImplementationOnce(full);
  await device.keep(edit('Kept at the second try'));
  const answer = await device.answers.find(TOM.id, '/api/ratings');
  add.mockImplementation(full);
  const refusal = device.keep(edit('Not kept'));

  await expect(refusal).rejects.toMatchObject({
    name: 'KeepError',
    problem: 'full',
    message: expect.stringMatching(/no room left, so that was not kept/),
  });
  expect(answer).toBeUndefined();
  expect((await device.things.list(TOM.id, 'unsent')).map(({ payload }) => payload)).toMatchObject([
    { notes: 'Kept at the second try' },
  ]);
});

test('more than one sending carries is refused before it is kept', async () => {
  const device = await open(randomUUID());

  await expect(device.keep(edit('x'.repeat(50_000)))).rejects.toMatchObject({
    problem: 'too-large',
  });
  expect(await device.things.list(TOM.id, 'unsent')).toEqual([]);
});

test('nothing is kept for nobody', async () => {
  const device = createDevice({ name: randomUUID() });
  opened.push(device);

  await expect(device.keep(edit('Whose?'))).rejects.toMatchObject({ problem: 'nobody' });
});

test('another person neither has nor counts the first one’s things, but is told whose they are', async () => {
  const name = randomUUID();
  const toms = await open(name);
  await toms.keep(edit('Tom’s'));
  await toms.leave();

  const adas = await open(name, ADA);

  expect(await adas.things.list(ADA.id, 'unsent')).toEqual([]);
  expect(adas.unsent()).toEqual({
    unsent: 0,
    conflict: 0,
    refused: 0,
    others: [{ name: 'Tom Birkett', unsent: 1 }],
  });
});

test('signing out lets go of what was read and keeps what is not sent', async () => {
  const name = randomUUID();
  const device = await open(name);
  await device.keep(edit('Not sent'));
  await device.answers.put(TOM.id, '/api/rounds', { day: '2026-03-04' });

  await device.leave();

  expect(await device.keptSession()).toBeUndefined();
  expect(await device.answers.find(TOM.id, '/api/rounds')).toBeUndefined();
  expect(await device.things.list(TOM.id, 'unsent')).toHaveLength(1);
});

test('a tab hears of what another keeps', async () => {
  const name = randomUUID();
  const tabs = [1, 2].map(() =>
    createDevice({ name, channel: new BroadcastChannel(`tabs of ${name}`) }),
  );
  opened.push(...tabs);
  for (const tab of tabs) await tab.open(TOM, {});
  const heard = new Promise<void>((resolve) => tabs[1]!.subscribe(resolve));

  await tabs[0]!.keep(edit('Lint'));
  await heard;

  await expect.poll(() => tabs[1]!.unsent().unsent).toBe(1);
});

test('what was sent a month ago is let go of; what was not sent never is', async () => {
  const name = randomUUID();
  const device = await open(name, TOM, () => 0);
  const sent = await device.keep(edit('Sent'));
  const unsent = await device.keep(edit('Not sent'));
  await device.things.answer([{ id: sent.id, status: 'applied', answer: {} }]);

  await open(name, TOM, () => 29 * 86_400_000);
  const soon = await device.things.list(TOM.id, 'applied');
  await open(name, TOM, () => 31 * 86_400_000);

  expect(soon.map(({ id }) => id)).toEqual([sent.id]);
  expect(await device.things.list(TOM.id, 'applied')).toEqual([]);
  expect(await device.things.list(TOM.id, 'unsent')).toEqual([unsent]);
});

test('a final answer stays as it came first', async () => {
  const device = await open(randomUUID());
  const { id } = await device.keep(edit('Lint'));
  const conflict = { id, status: 'conflict' as const, server: 'theirs', device: 'mine' };

  await device.things.answer([{ id, status: 'waiting', message: '' }]);
  const waiting = await device.things.list(TOM.id, 'unsent');
  await device.things.answer([conflict]);
  await device.things.answer([{ id, status: 'applied', answer: {} }]);

  expect(waiting).toHaveLength(1);
  expect(await device.things.list(TOM.id, 'conflict')).toMatchObject([{ id, answer: conflict }]);
});
