import { TooManyError } from '#server/errors.ts';

const MOST_FAILED = 20;
const WINDOW_MS = 60_000;

export type OpenLimit = ReturnType<typeof createOpenLimit>;

/** So many links that do not open, a minute and address; a good link costs nothing. */
export function createOpenLimit(now: () => Date) {
  let windowStartMs = 0;
  const failed = new Map<string, number>();

  function failedBy(address: string): number {
    const nowMs = now().getTime();
    // A clock that was set back begins a new minute too.
    if (nowMs < windowStartMs || nowMs - windowStartMs >= WINDOW_MS) {
      windowStartMs = nowMs;
      failed.clear();
    }
    return failed.get(address) ?? 0;
  }

  return {
    /** @throws {TooManyError} where this address tried too many */
    check(address: string): void {
      if (failedBy(address) < MOST_FAILED) return;
      const message = 'Too many tries. Wait a minute, then try again.';
      throw new TooManyError('too-many-tries', message, WINDOW_MS / 1000);
    },
    countFailed(address: string): void {
      failed.set(address, failedBy(address) + 1);
    },
  };
}
