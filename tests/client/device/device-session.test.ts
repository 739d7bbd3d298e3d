import 'fake-indexeddb/auto';
import { afterEach, expect, test, vi } from 'vitest';
import { ApiError } from '#client/api/http.ts';
import { asOf } from '#client/device/as-of.ts';
import { leaveDevice, readSession } from '#client/device/device-session.ts';
import { thisDevice } from '#client/device/this-device.ts';

type TomsSession = { person: { id: string; name: string } };

const TOM: TomsSession = { person: { id: '11111111-1111-4111-8111-111111111111', name: 'Tom' } };

const check = (answer: unknown) => answer as TomsSession;
const answers = () => Promise.resolve(TOM);
const fails = (status: number) => () =>
  Promise.reject(new ApiError(status, { code: 'x', message: `status ${status}` }));

afterEach(async () => {
  vi.useRealTimers();
  await leaveDevice();
});

test('who was signed in last is who works without signal, also where a proxy says the server is away', async () => {
  await readSession(answers, check);

  for (const status of [0, 502, 503, 504]) {
    expect(await readSession(fails(status), check)).toEqual(TOM);
    expect(asOf.times().has('/api/session')).toBe(true);
  }
});

test('on a line that hangs the page opens for who was signed in last, and the late answer counts', async () => {
  await readSession(answers, check);
  let arrive: (session: TomsSession) => void = () => {};
  const hangs = () => new Promise<TomsSession>((resolve) => (arrive = resolve));
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'], shouldAdvanceTime: true });

  const opening = readSession(hangs, check);
  await vi.advanceTimersByTimeAsync(4_100);

  expect(await opening).toEqual(TOM);
  expect(thisDevice.person()?.name).toBe('Tom');
  expect(asOf.times().has('/api/session')).toBe(true);
  arrive(TOM);
  await vi.waitFor(() => expect(asOf.times().has('/api/session')).toBe(false));
});

test('a session that the server knows no longer opens nothing, nor does it later without signal', async () => {
  await readSession(answers, check);

  await expect(readSession(fails(401), check)).rejects.toMatchObject({ status: 401 });
  await expect(readSession(fails(0), check)).rejects.toMatchObject({ status: 0 });
});
