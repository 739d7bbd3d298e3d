import { decimalsOf, parseNumber, type Decimal } from '../cells/parse-number.ts';
import type { SampleColumn } from './find-table.ts';

const FEWEST = 10;
/** A column keeps one form where no more than this share of its readings has another. */
const ODD = 0.02;

/** The decimals that nearly every reading of a column is written with; -1 where they vary, or are too few to say. */
export function usualDecimals({ cells }: SampleColumn, decimal: Decimal): number {
  const times = new Map<number, number>();
  let all = 0;
  for (const cell of cells) {
    if (parseNumber(cell, decimal).kind !== 'number') continue;
    const decimals = decimalsOf(cell, decimal);
    times.set(decimals, (times.get(decimals) ?? 0) + 1);
    all++;
  }
  const [usual, most] = [...times].sort((a, b) => b[1] - a[1])[0] ?? [-1, 0];
  return all >= FEWEST && all - most <= Math.max(1, all * ODD) ? usual : -1;
}
