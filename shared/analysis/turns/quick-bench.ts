import { firstAtOrAfter } from '../first-at-or-after.ts';
import type { BinnedView } from '../run-facts.ts';
import { CURVES, type TurnShape } from './turn-shape.ts';

const MOST_VALUES = 36;

type Columns = [Float64Array, Float64Array, Float64Array, Float64Array, Float64Array];

/** Room for the values of one fit and the columns of its design; lent from fit to fit. */
export type QuickBench = {
  count: number;
  /** Readings behind each value. */
  each: number;
  timesS: Float64Array;
  tempsC: Float64Array;
  /** Two curves before the switch, two after it, and how the turn moves with the switch. */
  columns: Columns;
};

export function createQuickBench(): QuickBench {
  const column = () => new Float64Array(MOST_VALUES);
  const columns: Columns = [column(), column(), column(), column(), column()];
  return { count: 0, each: 1, timesS: column(), tempsC: column(), columns };
}

/** Averages neighbouring readings to at most MOST_VALUES values. */
export function takeValues(
  view: BinnedView,
  task: { startS: number; endS: number },
  bench: QuickBench,
): number {
  const from = firstAtOrAfter(view.timesS, task.startS);
  const to = firstAtOrAfter(view.timesS, task.endS);
  const each = Math.max(1, Math.ceil((to - from) / MOST_VALUES));
  let count = 0;
  for (let i = from; i + each <= to; i += each) {
    let timeS = 0;
    let tempC = 0;
    for (let k = i; k < i + each; k++) {
      timeS += view.timesS[k]!;
      tempC += view.tempsC[k]!;
    }
    bench.timesS[count] = timeS / each;
    bench.tempsC[count] = tempC / each;
    count++;
  }
  bench.each = each;
  bench.count = count;
  return count;
}

/** The design's columns; in the first round, with no coefficients yet, the switch stays where it is. */
export function fillColumns(
  { count, timesS, columns }: QuickBench,
  { fromS, stepS, table, rows }: TurnShape,
  switchS: number,
  solution: Float64Array | null,
): void {
  const [a1, a2, b1, b2, moves] = columns;
  const [, s1 = 0, s2 = 0, s3 = 0, s4 = 0] = solution ?? [];
  for (let i = 0; i < count; i++) {
    const place = Math.max(0, Math.min(rows - 2, (timesS[i]! - switchS - fromS) / stepS));
    const row = Math.floor(place);
    const share = place - row;
    const at = row * CURVES;
    const d1 = table[at + CURVES + 1]! - table[at + 1]!;
    const d2 = table[at + CURVES + 2]! - table[at + 2]!;
    const d3 = table[at + CURVES + 3]! - table[at + 3]!;
    const d4 = table[at + CURVES + 4]! - table[at + 4]!;
    a1[i] = table[at + 1]! + share * d1;
    a2[i] = table[at + 2]! + share * d2;
    b1[i] = table[at + 3]! + share * d3;
    b2[i] = table[at + 4]! + share * d4;
    moves[i] = -(s1 * d1 + s2 * d2 + s3 * d3 + s4 * d4) / stepS;
  }
}

/**
 * Normal equations of the level, whose column is all ones, and the five columns. Written out, since a long record passes here tens of
 * thousands of times: every value is loaded once instead of nine times.
 */
export function normals({ count, each, tempsC, columns }: QuickBench, noiseK: number) {
  const [a1, a2, b1, b2, moves] = columns;
  let [s1, s2, s3, s4, s5, st] = [0, 0, 0, 0, 0, 0];
  let [s11, s12, s13, s14, s15, s1t] = [0, 0, 0, 0, 0, 0];
  let [s22, s23, s24, s25, s2t] = [0, 0, 0, 0, 0];
  let [s33, s34, s35, s3t] = [0, 0, 0, 0];
  let [s44, s45, s4t] = [0, 0, 0];
  let [s55, s5t] = [0, 0];
  for (let i = 0; i < count; i++) {
    const v1 = a1[i]!;
    const v2 = a2[i]!;
    const v3 = b1[i]!;
    const v4 = b2[i]!;
    const v5 = moves[i]!;
    const t = tempsC[i]!;
    s1 += v1;
    s2 += v2;
    s3 += v3;
    s4 += v4;
    s5 += v5;
    st += t;
    s11 += v1 * v1;
    s12 += v1 * v2;
    s13 += v1 * v3;
    s14 += v1 * v4;
    s15 += v1 * v5;
    s1t += v1 * t;
    s22 += v2 * v2;
    s23 += v2 * v3;
    s24 += v2 * v4;
    s25 += v2 * v5;
    s2t += v2 * t;
    s33 += v3 * v3;
    s34 += v3 * v4;
    s35 += v3 * v5;
    s3t += v3 * t;
    s44 += v4 * v4;
    s45 += v4 * v5;
    s4t += v4 * t;
    s55 += v5 * v5;
    s5t += v5 * t;
  }
  // prettier-ignore
  const matrix = Float64Array.of(
    count, 0, 0, 0, 0, 0,
    s1, s11, 0, 0, 0, 0,
    s2, s12, s22, 0, 0, 0,
    s3, s13, s23, s33, 0, 0,
    s4, s14, s24, s34, s44, 0,
    s5, s15, s25, s35, s45, s55,
  );
  const right = Float64Array.of(st, s1t, s2t, s3t, s4t, s5t);
  const weight = each / (noiseK * noiseK);
  for (let i = 0; i < matrix.length; i++) matrix[i]! *= weight;
  for (let i = 0; i < right.length; i++) right[i]! *= weight;
  return { matrix, right };
}
