import { isTyped } from './cell-kind.ts';
import type { SplitLine } from './choose-delimiter.ts';
import type { SampleColumn, Table } from './find-table.ts';

/** A number of cells that so few rows have is damage. */
const FEW = 0.02;

/**
 * How few and how many cells a row of readings may have: as few as leave out only last columns of words or of
 * nothing, and only where sampled rows do; as many as are common.
 *
 * @param named columns that the header names
 */
export function cellSpan(
  { columns, width, lines }: Table,
  named: number,
): { neededCells: number; mostCells: number } {
  const floor = named > width ? width : typedWidth(columns, width);
  const counts = new Map<number, number>();
  for (const line of lines) {
    if (line.cells.length < floor || !startsAs(line, columns)) continue;
    counts.set(line.cells.length, (counts.get(line.cells.length) ?? 0) + 1);
  }
  const all = [...counts.values()].reduce((sum, n) => sum + n, 0);
  const common = [...counts].filter(([, n]) => n > 1 && n > all * FEW).map(([count]) => count);
  const neededCells = common.length > 0 ? Math.max(floor, Math.min(width, ...common)) : floor;
  return { neededCells, mostCells: Math.max(named, width, ...common) };
}

/** All but the last columns of words, or of nothing. */
function typedWidth(columns: SampleColumn[], width: number): number {
  let needed = width;
  while (needed > 1 && ['text', 'empty'].includes(columns[needed - 1]!.kind)) needed--;
  return needed;
}

function startsAs({ kinds }: SplitLine, columns: SampleColumn[]): boolean {
  return columns.every(({ kind }, i) => {
    const own = kinds[i];
    return !isTyped(kind) || own === undefined || own === kind || own === 'empty' || own === 'open';
  });
}
