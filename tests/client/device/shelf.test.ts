import 'fake-indexeddb/auto';
import { randomUUID } from 'node:crypto';
import { afterEach, expect, test, vi } from 'vitest';
import { ApiError } from '#client/api/http.ts';
import { createAsOf } from '#client/device/as-of.ts';
import { createDevice } from '#client/device/device.ts';
import { createShelf } from '#client/device/shelf.ts';

const TOM = { id: '11111111-1111-4111-8111-111111111111', name: 'Tom Birkett' };
const ADA = { id: '22222222-2222-4222-8222-222222222222', name: 'Ada Quill' };
const ROUNDS = '/api/rounds';

async function build() {
  let nowMs = 1_000;
  const device = createDevice({ name: randomUUID(), nowMs: () => nowMs });
  await device.open(TOM, {});
  const asOf = createAsOf();
  const late: string[] = [];
  const shelf = createShelf(device, asOf, (url) => late.push(url));
  const answers = (answer: unknown) => () => Promise.resolve(answer);
  const fails = (status: number) => () =>
    Promise.reject(new ApiError(status, { code: 'x', message: `status ${status}` }));
  const laidBy = (url: string) =>
    expect.poll(() => device.answers.find(device.person()?.id ?? '', url)).toBeDefined();
  return {
    device,
    asOf,
    shelf,
    late,
    answers,
    fails,
    laidBy,
    setNow: (ms: number) => (nowMs = ms),
  };
}

const asIs = (answer: unknown) => answer;

afterEach(() => void vi.useRealTimers());

test('an answer is given again, with its age, while the server cannot be asked', async () => {
  const { shelf, asOf, answers, fails, laidBy, setNow } = await build();
  await shelf(ROUNDS, answers({ day: 'Monday' }), asIs);
  await laidBy(ROUNDS);
  setNow(9_000);

  for (const status of [0, 502, 503, 504]) {
    expect(await shelf(ROUNDS, fails(status), asIs)).toEqual({ day: 'Monday' });
    expect(asOf.times().get(ROUNDS)).toBe(1_000);
  }
  await shelf(ROUNDS, answers({ day: 'Tuesday' }), asIs);

  expect(asOf.times().size).toBe(0);
});

test('a refusal is a refusal, whatever lies here', async () => {
  const { shelf, answers, fails, laidBy } = await build();
  await shelf(ROUNDS, answers({}), asIs);
  await laidBy(ROUNDS);

  for (const status of [401, 403, 404, 500]) {
    await expect(shelf(ROUNDS, fails(status), asIs)).rejects.toMatchObject({ status });
  }
});

test('nothing but what the screens on site need is laid by', async () => {
  const { shelf, device, answers, fails } = await build();
  const urls = ['/api/people', '/api/customers', '/api/jobs?find=ida', '/api/shop', '/api/homes'];
  for (const url of urls) await shelf(url, answers({ secret: true }), asIs);

  for (const url of urls) {
    expect(await device.answers.find(TOM.id, url)).toBeUndefined();
    await expect(shelf(url, fails(0), asIs)).rejects.toMatchObject({ status: 0 });
  }
});

test('what an older version put there in another shape is as good as not there', async () => {
  const { shelf, answers, fails, laidBy } = await build();
  await shelf(ROUNDS, answers({ days: [] }), asIs);
  await laidBy(ROUNDS);
  const strict = () => {
    throw new TypeError('not of this shape');
  };

  await expect(shelf(ROUNDS, fails(0), strict)).rejects.toMatchObject({ status: 0 });
});

test('one person is not given what another read', async () => {
  const { shelf, device, answers, fails, laidBy } = await build();
  await shelf(ROUNDS, answers({ day: 'Tom’s' }), asIs);
  await laidBy(ROUNDS);

  await device.open(ADA, {});

  await expect(shelf(ROUNDS, fails(0), asIs)).rejects.toMatchObject({ status: 0 });
  expect(await device.answers.find(TOM.id, ROUNDS)).toBeUndefined();
});

test('on a line that hangs, what lies here is shown after four seconds and the answer follows', async () => {
  const { shelf, asOf, late, answers, laidBy } = await build();
  await shelf(ROUNDS, answers({ day: 'Monday' }), asIs);
  await laidBy(ROUNDS);
  let arrive: (answer: unknown) => void = () => {};
  const hangs = () => new Promise((resolve) => (arrive = resolve));
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'], shouldAdvanceTime: true });

  const shown = shelf(ROUNDS, hangs, asIs);
  await vi.waitFor(() => expect(vi.getTimerCount()).toBeGreaterThan(0));
  await vi.advanceTimersByTimeAsync(4_100);
  const first = await shown;
  const age = asOf.times().get(ROUNDS);
  arrive({ day: 'Tuesday' });
  await vi.waitFor(() => expect(late).toEqual([ROUNDS]));

  expect([first, age]).toEqual([{ day: 'Monday' }, 1_000]);
  expect(asOf.times().size).toBe(0);
});

test('on a line that hung once the next pages are shown at once, until something answers', async () => {
  const { shelf, answers, laidBy } = await build();
  const [visit, machine] = ['/api/visits/1', '/api/machines/1'];
  for (const url of [ROUNDS, visit, machine]) {
    await shelf(url, answers({ url }), asIs);
    await laidBy(url);
  }
  const hangs = () => new Promise(() => {});
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'], shouldAdvanceTime: true });
  const shownAfter = async (url: string, ms: number) => {
    let isShown = false;
    void shelf(url, hangs, asIs).then(() => (isShown = true));
    const before = vi.getTimerCount();
    await vi.waitFor(() => expect(vi.getTimerCount()).toBeGreaterThan(before));
    await vi.advanceTimersByTimeAsync(ms);
    return isShown;
  };

  expect(await shownAfter(ROUNDS, 3_000)).toBe(false);
  await vi.advanceTimersByTimeAsync(1_500);
  expect(await shownAfter(visit, 400)).toBe(true);
  await shelf(machine, answers({}), asIs);
  expect(await shownAfter(visit, 400)).toBe(false);
});
