import { afterEach, expect, test, vi } from 'vitest';
import { createServerClock } from '#client/device/server-clock.ts';

afterEach(() => void vi.useRealTimers());

const SENT = { deviceId: 'd', things: [] };

test('the server’s clock lay in the middle between question and answer', async () => {
  vi.useFakeTimers({ toFake: ['Date', 'performance'], now: 1_800_000_000_000 });
  const clock = createServerClock();
  const post = clock.watch(async () => {
    vi.advanceTimersByTime(400);
    return { serverNowMs: 1_800_000_005_000, answers: [] };
  });

  await post(SENT);

  expect(clock.last()).toMatchObject({ serverMs: 1_800_000_005_200, uMs: 200 });
});

test('an answer that the phone slept over says little of the server’s clock', async () => {
  vi.useFakeTimers({ toFake: ['Date', 'performance'], now: 1_800_000_000_000 });
  const clock = createServerClock();
  const post = clock.watch(async () => {
    // The monotonic clock stands still meanwhile.
    vi.setSystemTime(1_800_000_600_000);
    return { serverNowMs: 1_800_000_005_000, answers: [] };
  });

  await post(SENT);

  expect(clock.last()?.uMs).toBe(300_000);
});
