/** One thing that happened to a file. `at` is a place in the whole file. */
export type Damage = { kind: DamageKind; at: number; bytes: Uint8Array };

export const DAMAGE_KINDS = [
  'bit flipped',
  'byte replaced',
  'mark replaced',
  'mark added',
  'digit replaced',
  'digit added',
  'byte lost',
  'bytes swapped',
  'cut off',
  'line end lost',
  'line doubled',
] as const;
export type DamageKind = (typeof DAMAGE_KINDS)[number];

/** Bytes that mean something to a reader of tables. */
const MARKS = [...',;\t|"\'\n\r .:-+/eETZFCK°\0'].map((mark) => mark.charCodeAt(0));
const ZERO = 48;
const LF = 10;
/** Header and last line are hit more often than their length would have it. */
const HEAD_BYTES = 200;
const TAIL_BYTES = 40;

/** One damage of a random kind at a random place. */
export function damageLog(whole: Uint8Array, random: () => number): Damage {
  const kind = DAMAGE_KINDS[Math.floor(random() * DAMAGE_KINDS.length)]!;
  return damageAt(whole, kind, placeIn(whole.length, random), random);
}

function placeIn(length: number, random: () => number): number {
  const where = random();
  if (where < 0.2) return Math.floor(random() * Math.min(HEAD_BYTES, length));
  if (where < 0.3) return Math.max(0, length - 1 - Math.floor(random() * TAIL_BYTES));
  return Math.floor(random() * length);
}

/** That kind of damage at that place, or at the next place where it can be. */
export function damageAt(
  whole: Uint8Array,
  kind: DamageKind,
  at: number,
  random: () => number,
): Damage {
  const mark = MARKS[Math.floor(random() * MARKS.length)]!;
  const digit = ZERO + Math.floor(random() * 10);
  switch (kind) {
    case 'bit flipped':
      return { kind, at, bytes: spliced(whole, at, 1, [whole[at]! ^ (1 << (random() * 8))]) };
    case 'byte replaced':
      return { kind, at, bytes: spliced(whole, at, 1, [Math.floor(random() * 256)]) };
    case 'mark replaced':
      return { kind, at, bytes: spliced(whole, at, 1, [mark]) };
    case 'mark added':
      return { kind, at, bytes: spliced(whole, at, 0, [mark]) };
    case 'digit replaced':
      return { kind, at, bytes: spliced(whole, at, 1, [digit]) };
    case 'digit added':
      return { kind, at, bytes: spliced(whole, at, 0, [digit]) };
    case 'byte lost':
      return { kind, at, bytes: spliced(whole, at, 1, []) };
    case 'bytes swapped':
      return {
        kind,
        at,
        bytes: spliced(whole, at, 2, [whole[at + 1] ?? whole[at]!, whole[at]!]),
      };
    case 'cut off':
      return { kind, at, bytes: whole.slice(0, at) };
    case 'line end lost':
      return lineEndLost(whole, at);
    case 'line doubled':
      return lineDoubled(whole, at);
  }
}

export function spliced(whole: Uint8Array, at: number, less: number, more: number[]): Uint8Array {
  return Uint8Array.from([...whole.subarray(0, at), ...more, ...whole.subarray(at + less)]);
}

function lineEndLost(whole: Uint8Array, from: number): Damage {
  const at = Math.max(whole.indexOf(LF, from), 0);
  const before = whole[at - 1] === 13 ? at - 1 : at;
  return { kind: 'line end lost', at, bytes: spliced(whole, before, at - before + 1, []) };
}

function lineDoubled(whole: Uint8Array, from: number): Damage {
  const at = whole.lastIndexOf(LF, from) + 1;
  const end = whole.indexOf(LF, from);
  const line = [...whole.subarray(at, end < 0 ? whole.length : end + 1)];
  return { kind: 'line doubled', at, bytes: spliced(whole, at, 0, line) };
}
