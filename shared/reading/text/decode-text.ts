import type { LogReading } from '../log-reading.ts';

export type Encoding = LogReading['encoding'];

/** A file's text as bytes in which every ASCII character is its own byte. */
export type LogText = {
  /** UTF-8 or Windows-1252, without a byte order mark. */
  bytes: Uint8Array;
  encoding: Encoding;
  /** UTF-16 was recognised by its zero bytes, not by a mark. */
  guessedUtf16: boolean;
  /** NUL bytes taken off the end. */
  nulTail: number;
  /** First byte that fits no single encoding, in `bytes`; null where all is well. */
  mixedAt: number | null;
};

/**
 * Finds the encoding of a log and turns UTF-16 into UTF-8; other bytes are used as they are.
 *
 * @param bytes the whole file
 * @param chosen an encoding that a person named, where the bytes leave a choice
 */
export function decodeText(bytes: Uint8Array, chosen?: string): LogText {
  const mark = markOf(bytes);
  const bare = bytes.subarray(mark.length);
  const utf16 = mark.encoding ?? utf16ByZeros(bare);
  if (utf16 === 'utf-16le' || utf16 === 'utf-16be') {
    const text = withoutNulTail(fromUtf16(bare, utf16 === 'utf-16le'));
    return { ...text, encoding: utf16, guessedUtf16: mark.encoding === null, mixedAt: null };
  }
  const text = withoutNulTail(bare);
  const high = surveyHighBytes(text.bytes);
  const single = chosen === 'windows-1252' || (high.wellFormed === 0 && high.loneAt !== null);
  return {
    bytes: high.lineSeparators > 0 && !single ? withPlainLineEnds(text.bytes) : text.bytes,
    nulTail: text.nulTail,
    encoding: single ? 'windows-1252' : 'utf-8',
    guessedUtf16: false,
    mixedAt: high.wellFormed > 0 && chosen !== 'windows-1252' ? high.loneAt : null,
  };
}

function markOf(bytes: Uint8Array): { length: number; encoding: Encoding | null } {
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) {
    return { length: 3, encoding: 'utf-8' };
  }
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return { length: 2, encoding: 'utf-16le' };
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return { length: 2, encoding: 'utf-16be' };
  return { length: 0, encoding: null };
}

/** Text of digits in UTF-16 has a zero in every second byte: which half tells the byte order. */
function utf16ByZeros(bytes: Uint8Array): Encoding | null {
  const n = Math.min(bytes.length, 4096) & ~1;
  let even = 0;
  let odd = 0;
  for (let i = 0; i < n; i += 2) {
    if (bytes[i] === 0) even++;
    if (bytes[i + 1] === 0) odd++;
  }
  const most = n * 0.4;
  const few = n * 0.05;
  if (n >= 8 && odd > most && even < few) return 'utf-16le';
  return n >= 8 && even > most && odd < few ? 'utf-16be' : null;
}

function withoutNulTail(bytes: Uint8Array): { bytes: Uint8Array; nulTail: number } {
  let end = bytes.length;
  while (end > 0 && bytes[end - 1] === 0) end--;
  return { bytes: bytes.subarray(0, end), nulTail: bytes.length - end };
}

function fromUtf16(bytes: Uint8Array, littleEndian: boolean): Uint8Array {
  const out = new Uint8Array((bytes.length >> 1) * 3);
  const low = littleEndian ? 0 : 1;
  let to = 0;
  for (let i = 0; i + 1 < bytes.length; i += 2) {
    let code = bytes[i + low]! | (bytes[i + 1 - low]! << 8);
    if (code >= 0xd800 && code < 0xdc00 && i + 3 < bytes.length) {
      const second = bytes[i + 2 + low]! | (bytes[i + 3 - low]! << 8);
      code = 0x10000 + ((code & 0x3ff) << 10) + (second & 0x3ff);
      i += 2;
    }
    if (code === 0x2028) code = 10;
    to = putUtf8(out, to, code);
  }
  return out.subarray(0, to);
}

function putUtf8(out: Uint8Array, at: number, code: number): number {
  if (code < 0x80) {
    out[at] = code;
    return at + 1;
  }
  if (code < 0x800) {
    out[at] = 0xc0 | (code >> 6);
    out[at + 1] = 0x80 | (code & 63);
    return at + 2;
  }
  if (code < 0x10000) {
    out[at] = 0xe0 | (code >> 12);
    out[at + 1] = 0x80 | ((code >> 6) & 63);
    out[at + 2] = 0x80 | (code & 63);
    return at + 3;
  }
  out[at] = 0xf0 | (code >> 18);
  out[at + 1] = 0x80 | ((code >> 12) & 63);
  out[at + 2] = 0x80 | ((code >> 6) & 63);
  out[at + 3] = 0x80 | (code & 63);
  return at + 4;
}

type HighBytes = { wellFormed: number; loneAt: number | null; lineSeparators: number };

/** Counts UTF-8 sequences and finds the first byte over 127 that belongs to none. */
function surveyHighBytes(bytes: Uint8Array): HighBytes {
  const found: HighBytes = { wellFormed: 0, loneAt: null, lineSeparators: 0 };
  let at = nextHighByte(bytes, 0);
  while (at < bytes.length) {
    const length = sequenceLength(bytes, at);
    if (length === 0) {
      found.loneAt ??= at;
      at = nextHighByte(bytes, at + 1);
      continue;
    }
    found.wellFormed++;
    if (isLineSeparator(bytes, at)) found.lineSeparators++;
    at = nextHighByte(bytes, at + length);
  }
  return found;
}

/** Four bytes at a time where the memory allows: most logs have no byte over 127 at all. */
function nextHighByte(bytes: Uint8Array, from: number): number {
  const n = bytes.length;
  let at = from;
  while (at < n && (bytes.byteOffset + at) % 4 !== 0) {
    if (bytes[at]! > 127) return at;
    at++;
  }
  if (at >= n) return n;
  const words = new Int32Array(bytes.buffer, bytes.byteOffset + at, (n - at) >> 2);
  let word = 0;
  while (word < words.length && (words[word]! & 0x80808080) === 0) word++;
  at += word * 4;
  while (at < n && bytes[at]! <= 127) at++;
  return at;
}

/** Length of the well-formed UTF-8 sequence at `at` (RFC 3629); 0 where there is none. */
function sequenceLength(bytes: Uint8Array, at: number): number {
  const lead = bytes[at]!;
  const length = lead >= 0xc2 && lead < 0xe0 ? 2 : lead < 0xf0 ? 3 : 4;
  if (lead < 0xc2 || lead > 0xf4 || at + length > bytes.length) return 0;
  for (let i = 1; i < length; i++) {
    if ((bytes[at + i]! & 0xc0) !== 0x80) return 0;
  }
  const second = bytes[at + 1]!;
  if (lead === 0xe0 && second < 0xa0) return 0;
  if (lead === 0xf0 && second < 0x90) return 0;
  return length;
}

function isLineSeparator(bytes: Uint8Array, at: number): boolean {
  return bytes[at] === 0xe2 && bytes[at + 1] === 0x80 && bytes[at + 2] === 0xa8;
}

/** U+2028 ends a line in some editors; here it becomes a line feed. */
function withPlainLineEnds(bytes: Uint8Array): Uint8Array {
  const out = new Uint8Array(bytes.length);
  let to = 0;
  for (let i = 0; i < bytes.length; i++) {
    if (isLineSeparator(bytes, i)) {
      out[to++] = 10;
      i += 2;
    } else {
      out[to++] = bytes[i]!;
    }
  }
  return out.subarray(0, to);
}
