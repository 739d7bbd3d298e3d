import type { Encoding } from './decode-text.ts';

const LF = 10;
const CR = 13;

/** No line of a log has more characters ... */
export const LONGEST_LINE = 100_000;
/** ... and UTF-8 spends four octets on one at most; what is longer is not made text of. */
export const LONGEST_BYTES = 4 * (LONGEST_LINE + 1);

/** Where the line that starts at `from` ends: the place of its LF or CR, or the end of the bytes. */
export function lineEnd(bytes: Uint8Array, from: number): number {
  let at = from;
  const n = bytes.length;
  while (at < n && bytes[at] !== LF && bytes[at] !== CR) at++;
  return at;
}

/** Where the next line starts, past LF, CR, CR LF or CR CR LF. */
export function pastLineEnd(bytes: Uint8Array, end: number): number {
  if (bytes[end] !== CR) return end + 1;
  if (bytes[end + 1] === LF) return end + 2;
  return bytes[end + 1] === CR && bytes[end + 2] === LF ? end + 3 : end + 1;
}

/** Text of a span of bytes; a Windows-1252 or ASCII span never fails, a broken UTF-8 one shows U+FFFD. */
export function textDecoderFor(
  encoding: Encoding,
): (bytes: Uint8Array, from: number, to: number) => string {
  const decoder = new TextDecoder(encoding === 'windows-1252' ? 'windows-1252' : 'utf-8');
  return (bytes, from, to) => {
    let text = '';
    for (let i = from; i < to; i++) {
      const code = bytes[i]!;
      if (code > 127) return decoder.decode(bytes.subarray(from, to));
      text += String.fromCharCode(code);
    }
    return text;
  };
}

export type Line = { row: number; from: number; to: number; text: string };

/** Up to `most` lines from byte `from`, the first of them having row number `row`. */
export function takeLines(
  bytes: Uint8Array,
  from: number,
  row: number,
  most: number,
  decode: (bytes: Uint8Array, from: number, to: number) => string,
): Line[] {
  const lines: Line[] = [];
  let at = from;
  while (at < bytes.length && lines.length < most) {
    const to = lineEnd(bytes, at);
    const text = decode(bytes, at, Math.min(to, at + LONGEST_BYTES));
    lines.push({ row: row + lines.length, from: at, to, text });
    at = pastLineEnd(bytes, to);
  }
  return lines;
}
