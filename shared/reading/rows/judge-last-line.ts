import type { Layout } from '../layout/layout.ts';
import { splitCells } from '../text/split-cells.ts';
import { takeLines } from '../text/split-lines.ts';
import type { LogText } from '../text/decode-text.ts';

/** `cut-off`: power was lost while it was written; `unsure`: nothing tells whether it is whole. */
export type LastLine = 'whole' | 'unsure' | 'cut-off';

const LOOK_BACK_BYTES = 4_000;
const FEWEST_LINES = 4;

/**
 * Whether the last line is whole, where the file does not end with a line end. The lines before it say
 * how many cells a line has, and how many digits its last number.
 */
export function judgeLastLine(
  { bytes }: LogText,
  layout: Layout,
  decode: (bytes: Uint8Array, from: number, to: number) => string,
): LastLine {
  const last = bytes.at(-1);
  if (last === undefined || last === 10 || last === 13) return 'whole';
  const from = Math.max(layout.firstByte, bytes.length - LOOK_BACK_BYTES);
  const lines = takeLines(bytes, from, 0, Infinity, decode).map(({ text }) => text);
  const earlier = lines.slice(1, -1).filter((line) => line.trim() !== '');
  if (earlier.length < FEWEST_LINES) return 'unsure';
  const own = splitCells(lines.at(-1)!, layout.delimiter).cells;
  const others = earlier.map((line) => splitCells(line, layout.delimiter).cells);
  if (others.every((cells) => cells.length > own.length)) return 'cut-off';
  return judgeLastCell(own, others, layout);
}

function judgeLastCell(own: string[], others: string[][], layout: Layout): LastLine {
  const column = own.length - 1;
  const role = layout.columns[column]?.role;
  if (role !== 'temperature' && role !== 'time') return 'whole';
  const shapes = new Set(others.map((cells) => decimalsOf(cells[column] ?? '')));
  const [usual] = shapes;
  if (shapes.size !== 1 || usual === undefined || usual === 0) return 'unsure';
  return decimalsOf(own[column]!) === usual ? 'whole' : 'cut-off';
}

/** Characters after the last mark: "70.25" and "10:05:07" have two. */
function decimalsOf(cell: string): number {
  return /[.,:](\d*\D*)$/.exec(cell)?.[1]?.length ?? 0;
}
