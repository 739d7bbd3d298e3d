/**
 * How much of a fast probe is kept. The engine locates a turn to 0.08 °F from one reading a second and gains little from
 * more; ten writes a second, each through to the storage, would hold up the page and fill the queue.
 *
 * A bit under the second, so that a probe of one a second loses nothing to the line's jitter.
 */
const EVERY_S = 0.9;
/** A run holds 20,000 things at most (hand-run.ts): from the half of it on, after some 2½ hours, every tenth second. */
const HALF_FULL = 10_000;
const EVERY_S_WHEN_FULL = 9.9;

/** In words for the page. */
export const KEEP_RATE_WORDS = 'Of a faster probe, one reading a second is kept.';

/**
 * Whether a live reading is kept.
 *
 * @param sinceS since the last one that was kept, s; Infinity before the first
 * @param n how many things the run holds
 */
export function isWorthKeeping(sinceS: number, n: number): boolean {
  return sinceS >= (n < HALF_FULL ? EVERY_S : EVERY_S_WHEN_FULL);
}
