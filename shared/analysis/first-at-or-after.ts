/** In fewer times than this halving alone is as quick. */
const MANY = 64;
const FIRST_REACH = 8;

/**
 * Place of the first time that is not before `timeS` in strictly rising times; their number where all are before.
 *
 * In many times the search starts where an even spacing would put it: readings come nearly evenly, and halving a
 * million of them reads twenty far places.
 */
export function firstAtOrAfter(timesS: ArrayLike<number>, timeS: number): number {
  const n = timesS.length;
  if (n < MANY) return halve(timesS, timeS, 0, n);
  const firstS = timesS[0]!;
  const lastS = timesS[n - 1]!;
  if (timeS <= firstS) return 0;
  if (timeS > lastS) return n;
  const guess = Math.floor(((timeS - firstS) / (lastS - firstS)) * (n - 1));
  let reach = FIRST_REACH;
  if (timesS[guess]! < timeS) {
    let low = guess + 1;
    for (; low + reach < n && timesS[low + reach]! < timeS; reach *= 2) low += reach;
    return halve(timesS, timeS, low, Math.min(n, low + reach));
  }
  let high = guess;
  for (; high > reach && timesS[high - reach]! >= timeS; reach *= 2) high -= reach;
  return halve(timesS, timeS, Math.max(0, high - reach), high);
}

/** The same where the place is known to lie from `low` to `high`. */
function halve(timesS: ArrayLike<number>, timeS: number, low: number, high: number): number {
  while (low < high) {
    const middle = (low + high) >> 1;
    if (timesS[middle]! < timeS) low = middle + 1;
    else high = middle;
  }
  return low;
}
