import { lineEnd, pastLineEnd, takeLines, type Line } from '../text/split-lines.ts';

const HEAD_LINES = 300;
const MIDDLE_LINES = 80;
const TAIL_BYTES = 6_000;

/** Lines from the start of a file and, for judging its columns only, from its middle and its end. */
export type SampleLines = { head: Line[]; rest: Line[] };

type Decode = (bytes: Uint8Array, from: number, to: number) => string;

/** Row numbers are true in `head` and meaningless in `rest`. */
export function sampleLines(bytes: Uint8Array, decode: Decode): SampleLines {
  const head = takeLines(bytes, 0, 1, HEAD_LINES, decode);
  const after = (head.at(-1)?.to ?? 0) + 1;
  const rest: Line[] = [];
  const middle = nextLine(bytes, bytes.length >> 1);
  if (middle > after) rest.push(...takeLines(bytes, middle, 0, MIDDLE_LINES, decode));
  const tail = nextLine(bytes, bytes.length - TAIL_BYTES);
  if (tail > Math.max(after, (rest.at(-1)?.to ?? 0) + 1)) {
    rest.push(...takeLines(bytes, tail, 0, HEAD_LINES, decode));
  }
  return { head, rest };
}

function nextLine(bytes: Uint8Array, from: number): number {
  return pastLineEnd(bytes, lineEnd(bytes, Math.max(0, from)));
}
