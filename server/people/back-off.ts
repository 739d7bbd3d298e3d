import { createHmac } from 'node:crypto';
import { TooManyError } from '#server/errors.ts';
import type { Failures, SignInFailuresRepository } from './sign-in-failures-repository.ts';

const FREE_TRIES = 5;
const FIRST_PAUSE_MS = 1000;
const LONGEST_PAUSE_MS = 15 * 60_000;
/** After a day without a try the count starts anew. */
const FORGET_AFTER_MS = 24 * 3_600_000;

export type BackOff = ReturnType<typeof createBackOff>;

/** Counts tries by what was typed as e-mail, whether there is such a person or not. */
export function createBackOff(tries: SignInFailuresRepository, now: () => Date, pepper: Buffer) {
  const key = (email: string) =>
    createHmac('sha256', pepper).update(email.trim().toLowerCase()).digest('hex');

  return {
    /**
     * Counts a try as failed before the password is looked at, so that many at once gain nothing.
     * @throws {TooManyError} while it must wait
     */
    async startTry(email: string): Promise<{ failures: number }> {
      const nowMs = now().getTime();
      const before = await tries.change(key(email), (earlier) => counted(earlier, nowMs));
      const waitMs = (before?.blockedUntilMs ?? 0) - nowMs;
      if (waitMs > 0) throw tooManyTries(waitMs);
      await tries.forgetBefore(nowMs - FORGET_AFTER_MS);
      return { failures: (before?.failures ?? 0) + 1 };
    },

    async succeeded(email: string): Promise<void> {
      await tries.forget(key(email));
    },

    isLocking: (failures: number) => failures >= FREE_TRIES,
  };
}

/** Undefined while blocked: waiting out a pause is not made longer by trying. */
function counted(earlier: Failures | undefined, nowMs: number): Failures | undefined {
  if (earlier && earlier.blockedUntilMs > nowMs) return undefined;
  const isStale = !earlier || earlier.lastAtMs < nowMs - FORGET_AFTER_MS;
  const failures = (isStale ? 0 : earlier.failures) + 1;
  return { failures, lastAtMs: nowMs, blockedUntilMs: nowMs + pauseMs(failures) };
}

/** The fifth failure costs 1 s, each further one twice as long, up to 15 min. */
export function pauseMs(failures: number): number {
  if (failures < FREE_TRIES) return 0;
  return Math.min(FIRST_PAUSE_MS * 2 ** (failures - FREE_TRIES), LONGEST_PAUSE_MS);
}

function tooManyTries(waitMs: number): TooManyError {
  const seconds = Math.ceil(waitMs / 1000);
  const wait = seconds < 60 ? `${seconds} s` : `${Math.ceil(seconds / 60)} min`;
  const message = `Too many tries. Wait ${wait}, then try again.`;
  return new TooManyError('too-many-tries', message, seconds);
}
