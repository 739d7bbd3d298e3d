/** Place of the first time that is not before `timeS` in strictly rising times; their number where all are before. */
export function firstAtOrAfter(timesS: ArrayLike<number>, timeS: number): number {
  let low = 0;
  let high = timesS.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (timesS[middle]! < timeS) low = middle + 1;
    else high = middle;
  }
  return low;
}
