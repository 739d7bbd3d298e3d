/** A span of a record, s. */
export type Part = { fromS: number; toS: number };

/** A pause of ten minutes parts two runs of a dryer: common practice, its longest off-time is shorter. */
const LONG_PAUSE_S = 600;
/** ... and is never less than this many of the record's own steps. */
const LONG_PAUSE_STEPS = 20;
const MIN_READINGS = 3;

/**
 * The spans that long pauses part a record into, in order; one for the whole where there is no such pause.
 * A part of fewer than 3 readings is no run and is left out.
 *
 * @param timesS s, strictly rising, n >= 1
 */
export function findParts(timesS: Float64Array): Part[] {
  const n = timesS.length;
  const pauseS = Math.max(LONG_PAUSE_S, LONG_PAUSE_STEPS * medianStepS(timesS));
  const parts: Part[] = [];
  let from = 0;
  for (let i = 1; i <= n; i++) {
    if (i < n && timesS[i]! - timesS[i - 1]! <= pauseS) continue;
    if (i - from >= MIN_READINGS) parts.push({ fromS: timesS[from]!, toS: timesS[i - 1]! });
    from = i;
  }
  return parts.length > 0 ? parts : [{ fromS: timesS[0] ?? 0, toS: timesS[n - 1] ?? 0 }];
}

/** Median time between readings, from at most 20,001 of them; 0 for fewer than 2 readings. */
export function medianStepS(timesS: Float64Array): number {
  const n = timesS.length - 1;
  if (n < 1) return 0;
  const stride = Math.max(1, Math.floor(n / 20_000));
  const steps = new Float64Array(Math.floor((n - 1) / stride) + 1);
  for (let k = 0; k < steps.length; k++) {
    steps[k] = timesS[k * stride + 1]! - timesS[k * stride]!;
  }
  steps.sort();
  return steps[steps.length >> 1]!;
}
