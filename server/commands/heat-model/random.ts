/** A seeded source of numbers: the same seed gives the same run on every machine. */
export type Random = {
  /** Evenly spread in [low, high). */
  between: (low: number, high: number) => number;
  /** Normal with mean 0 and standard deviation 1. */
  gaussian: () => number;
  /** True in `share` of the draws. */
  chance: (share: number) => boolean;
};

/**
 * Mulberry32, a public-domain 32-bit generator: enough for test data, and ten lines. Its first draws from nearby
 * seeds are alike, so the seed is scrambled first.
 */
export function createRandom(seed: number): Random {
  let state = Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) >>> 0;

  function next(): number {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  }

  return {
    between: (low, high) => low + (high - low) * next(),
    gaussian: () => Math.sqrt(-2 * Math.log(1 - next())) * Math.cos(2 * Math.PI * next()),
    chance: (share) => next() < share,
  };
}
