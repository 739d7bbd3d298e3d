/** Between which temperatures the readings place a turn, °C. */
export type TurnBounds = { lowC: number; highC: number };

/**
 * Bounds a turn by the readings beside it alone. It is no less extreme than the most extreme reading; and no more so
 * than where the lines through the two readings before and the two after meet, since legs slow down towards a turn.
 *
 * @param at place of the most extreme reading
 * @param sign 1 for a peak, −1 for a valley
 */
export function boundByReadings(
  timesS: Float64Array,
  tempsC: Float64Array,
  at: number,
  sign: 1 | -1,
): TurnBounds {
  const readC = tempsC[at]!;
  let beyond = 0;
  for (const from of [at - 1, at]) {
    const meetC = crossing(timesS, tempsC, from);
    if (meetC !== null) beyond = Math.max(beyond, sign * (meetC - readC));
  }
  return sign > 0 ? { lowC: readC, highC: readC + beyond } : { lowC: readC - beyond, highC: readC };
}

/** Where the line through the two readings up to `from` meets the one through the two after it; null if not between. */
function crossing(timesS: Float64Array, tempsC: Float64Array, from: number): number | null {
  if (from < 1 || from + 2 >= timesS.length) return null;
  const before = slope(timesS, tempsC, from - 1);
  const after = slope(timesS, tempsC, from + 1);
  const fromC = tempsC[from]!;
  const gapS = timesS[from + 1]! - timesS[from]!;
  const sinceS = (tempsC[from + 1]! - fromC - after * gapS) / (before - after);
  return sinceS > 0 && sinceS < gapS ? fromC + before * sinceS : null;
}

/** Slope from one reading to the next, K/s. */
function slope(timesS: Float64Array, tempsC: Float64Array, from: number): number {
  return (tempsC[from + 1]! - tempsC[from]!) / (timesS[from + 1]! - timesS[from]!);
}
