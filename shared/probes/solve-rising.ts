/** Steps; Newton needs 3 to 5, halving alone about 50. */
const MOST_STEPS = 100;

/**
 * Where a steadily rising function reaches a value: Newton's rule, halved where it would leave the bracket.
 *
 * @param at the function and its slope
 * @param value to reach; must lie between the function's values at the ends
 * @param guess to start from
 * @returns x to about 1e-12 of the bracket
 */
export function solveRising(
  at: (x: number) => { value: number; slope: number },
  value: number,
  { low, high, guess }: { low: number; high: number; guess: number },
): number {
  const enoughX = 1e-12 * (high - low);
  let x = Math.min(high, Math.max(low, guess));
  for (let i = 0; i < MOST_STEPS; i++) {
    const here = at(x);
    if (here.value > value) high = x;
    else low = x;
    const newton = x - (here.value - value) / here.slope;
    const next = newton >= low && newton <= high ? newton : (low + high) / 2;
    if (Math.abs(next - x) <= enoughX) return next;
    x = next;
  }
  return x;
}
