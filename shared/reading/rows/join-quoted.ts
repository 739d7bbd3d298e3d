import type { Delimiter } from '../text/split-cells.ts';
import { splitCells } from '../text/split-cells.ts';
import { lineEnd, pastLineEnd } from '../text/split-lines.ts';

/** A note of more lines than this is a quote that nobody closed. */
const MOST_LINES = 12;

/** A row whose quoted cell holds line ends (RFC 4180 section 2 rule 6), and where it ends. */
export type JoinedRow = { cells: string[]; to: number; lines: string[] };

/**
 * The row that begins with an open quote at `from`, with the lines that the quote reaches over.
 *
 * @returns null where no quote closes it within a few lines
 */
export function joinQuoted(
  bytes: Uint8Array,
  from: number,
  delimiter: Delimiter,
  decode: (bytes: Uint8Array, from: number, to: number) => string,
): JoinedRow | null {
  let to = lineEnd(bytes, from);
  let text = decode(bytes, from, to);
  const lines: string[] = [];
  while (lines.length < MOST_LINES) {
    const next = pastLineEnd(bytes, to);
    if (next >= bytes.length) return null;
    to = lineEnd(bytes, next);
    const line = decode(bytes, next, to);
    lines.push(line);
    text += `\n${line}`;
    const { cells, unclosed } = splitCells(text, delimiter);
    if (!unclosed) return { cells, to, lines };
  }
  return null;
}
