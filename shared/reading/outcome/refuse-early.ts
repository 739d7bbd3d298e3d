import type { SampleLines } from '../layout/sample-lines.ts';
import type { ReadProblem } from '../log-reading.ts';
import type { LogText } from '../text/decode-text.ts';
import { foreignKind } from '../text/foreign-file.ts';
import { LONGEST_LINE, lineEnd, pastLineEnd } from '../text/split-lines.ts';
import { problem } from '../words/problem-words.ts';

const MOST_COLUMNS = 1000;

/** Why bytes can be no log, before anything is made of them; null where they may be one. */
export function refuseEarly(bytes: Uint8Array, text: LogText): ReadProblem | null {
  if (bytes.length === 0) return problem('empty-file');
  const foreign = foreignKind(bytes);
  const isUtf16 = text.encoding.startsWith('utf-16');
  if (foreign && !(foreign === 'binary' && isUtf16)) return problem(`${foreign}-file`);
  if (text.bytes.every((byte) => byte <= 32)) return problem('empty-file');
  if (text.mixedAt === null) return null;
  const row = rowOfByte(text.bytes, text.mixedAt);
  return problem('mixed-encoding', { row, say: text.mixedAt });
}

function rowOfByte(bytes: Uint8Array, at: number): number {
  let row = 1;
  let from = 0;
  for (;;) {
    const end = lineEnd(bytes, from);
    if (end >= at) return row;
    from = pastLineEnd(bytes, end);
    row++;
  }
}

/** Why the first lines can be no log: longer or wider than any table of readings. */
export function refuseLongLines({ head }: SampleLines): ReadProblem | null {
  for (const { row, text } of head) {
    if (text.length > LONGEST_LINE) return problem('line-too-long', { row, say: LONGEST_LINE });
    if (text.split(/[,;\t|]/, MOST_COLUMNS + 1).length > MOST_COLUMNS) {
      return problem('too-many-columns', { row, say: MOST_COLUMNS });
    }
  }
  return null;
}
