import { AppError } from '#server/errors.ts';

const MOST_FAILED = 20;
const WINDOW_MS = 60_000;

export type OpenLimit = ReturnType<typeof createOpenLimit>;

/** So many links that do not open, a minute and address; a good link costs nothing. */
export function createOpenLimit(now: () => Date) {
  let windowStartMs = 0;
  const failed = new Map<string, number>();

  function failedBy(address: string): number {
    const nowMs = now().getTime();
    if (nowMs - windowStartMs >= WINDOW_MS) {
      windowStartMs = nowMs;
      failed.clear();
    }
    return failed.get(address) ?? 0;
  }

  return {
    /** @throws {AppError} 429 where this address tried too many */
    check(address: string): void {
      if (failedBy(address) < MOST_FAILED) return;
      throw new AppError(429, 'too-many-tries', 'Too many tries. Wait a minute, then try again.');
    },
    countFailed(address: string): void {
      failed.set(address, failedBy(address) + 1);
    },
  };
}
