export type Part = { fromS: number; toS: number };

/** A pause at least this long, and this many usual steps, parts a record into runs. */
const PAUSE_S = 600;
const PAUSE_STEPS = 20;

/** Where long pauses part a record; one span for the whole where there are none. Times in s, strictly rising. */
export function findParts(timesS: Float64Array): Part[] {
  const n = timesS.length;
  if (n === 0) return [];
  const usualS = (timesS[n - 1]! - timesS[0]!) / Math.max(1, n - 1);
  const pauseS = Math.max(PAUSE_S, Math.min(usualS, medianStepS(timesS)) * PAUSE_STEPS);

  const parts: Part[] = [];
  let fromS = timesS[0]!;
  for (let i = 1; i < n; i++) {
    if (timesS[i]! - timesS[i - 1]! < pauseS) continue;
    parts.push({ fromS, toS: timesS[i - 1]! });
    fromS = timesS[i]!;
  }
  parts.push({ fromS, toS: timesS[n - 1]! });
  return parts;
}

/** From at most 1,001 steps, evenly taken: enough for a threshold, and quick on a million. */
function medianStepS(timesS: Float64Array): number {
  const stride = Math.max(1, Math.floor(timesS.length / 1001));
  const steps: number[] = [];
  for (let i = stride; i < timesS.length; i += stride) steps.push(timesS[i]! - timesS[i - 1]!);
  steps.sort((a, b) => a - b);
  return steps[Math.floor(steps.length / 2)] ?? 0;
}
