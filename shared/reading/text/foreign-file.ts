/** Kinds of file that are not a log, told by their first bytes. */
export type ForeignKind =
  'spreadsheet' | 'archive' | 'pdf' | 'picture' | 'web-page' | 'json' | 'binary';

const MAGIC: { kind: ForeignKind; bytes: number[] }[] = [
  { kind: 'spreadsheet', bytes: [0xd0, 0xcf, 0x11, 0xe0] },
  { kind: 'archive', bytes: [0x1f, 0x8b] },
  { kind: 'archive', bytes: [0x37, 0x7a, 0xbc, 0xaf] },
  { kind: 'archive', bytes: [0x52, 0x61, 0x72, 0x21] },
  { kind: 'archive', bytes: [0x42, 0x5a, 0x68] },
  { kind: 'pdf', bytes: [0x25, 0x50, 0x44, 0x46] },
  { kind: 'picture', bytes: [0xff, 0xd8, 0xff] },
  { kind: 'picture', bytes: [0x89, 0x50, 0x4e, 0x47] },
  { kind: 'picture', bytes: [0x47, 0x49, 0x46, 0x38] },
];

/** What the file is instead of a log; null where its first bytes could be one. Nothing is ever unpacked. */
export function foreignKind(bytes: Uint8Array): ForeignKind | null {
  if (startsWith(bytes, [0x50, 0x4b, 3, 4]) || startsWith(bytes, [0x50, 0x4b, 5, 6])) {
    return holdsWorkbook(bytes) ? 'spreadsheet' : 'archive';
  }
  for (const { kind, bytes: magic } of MAGIC) {
    if (startsWith(bytes, magic)) return kind;
  }
  const head = asciiHead(bytes).trimStart().toLowerCase();
  if (/^(<!doctype html|<html|<\?xml|<table)/.test(head)) return 'web-page';
  if (/^(\{\s*"|\[\s*[[{])/.test(head)) return 'json';
  return isMostlyControl(bytes) ? 'binary' : null;
}

function startsWith(bytes: Uint8Array, magic: number[]): boolean {
  return magic.every((byte, i) => bytes[i] === byte);
}

function asciiHead(bytes: Uint8Array): string {
  let text = '';
  for (let i = 0; i < Math.min(bytes.length, 512); i++) {
    const code = bytes[i]!;
    if (code > 0 && code < 128) text += String.fromCharCode(code);
  }
  return text;
}

/** A workbook is a zip whose first names say so. */
function holdsWorkbook(bytes: Uint8Array): boolean {
  const head = asciiHead(bytes.subarray(0, 512));
  return /\[Content_Types\]|xl\/|_rels\/|mimetypeapplication\/vnd\.oasis/.test(head);
}

/** Control characters other than tab, line ends and NUL hardly occur in text. */
function isMostlyControl(bytes: Uint8Array): boolean {
  const n = Math.min(bytes.length, 4096);
  let control = 0;
  for (let i = 0; i < n; i++) {
    const code = bytes[i]!;
    if (code > 0 && code < 32 && code !== 9 && code !== 10 && code !== 13) control++;
  }
  return n > 0 && control > n * 0.1;
}
