import { isInView, xOf, yOf, type Box, type Frame } from './frame.ts';
import { words, type Shape } from './shapes.ts';
import { noteWidthPx } from './text-width.ts';
import type { StripNote } from './strip.ts';

/** Where a note's words stand, and where its leader ends. */
export type PlacedNote = {
  note: StripNote;
  x: number;
  dotY: number;
  leaderY: number;
  /** Baseline of the first line. */
  textY: number;
  side: 'left' | 'right' | 'on';
  lines: string[];
};

/** Lowest and highest y of the trace between two x; null where it shows nothing. */
export type TraceReach = (fromX: number, toX: number) => { top: number; foot: number } | null;

const LINE_PX = 17;
const TEXT_PX = 14;
const GAP_PX = 7;
const LETTER_PX = 14;
/** Lines are tried wide, then narrow. */
const WIDE_PX = 240;
const NARROW_PX = 115;
const MOST_LINES = 3;

/** What the words of a note keep clear of, beside each other and the paper's edge. */
export type Obstacles = { reach: TraceReach; hatched: Box[] };

/**
 * Notes hang from their moment by an upright hairline, which cannot cross a trace that is a function of time.
 * The words take the first place that is clear: first shelf, right then left of the line; second shelf; upward.
 * On a falling end they hang upward first.
 */
export function placeNotes(frame: Frame, notes: StripNote[], obstacles: Obstacles): PlacedNote[] {
  const taken: Box[] = [];
  return notes
    .filter((note) => isInView(frame, note.timeS))
    .flatMap((note) => {
      const candidates = frame.compact
        ? hangLetter(frame, note)
        : hangWords(frame, note, isFallingEnd(frame, note, obstacles.reach));
      const costs = candidates.map((place) => costOf(frame, boxOf(place), taken, obstacles));
      const best = candidates[costs.indexOf(Math.min(...costs))];
      if (!best) return [];
      taken.push(boxOf(best));
      return [best];
    });
}

/** Nothing after it stands higher: there is paper above. */
function isFallingEnd(frame: Frame, note: StripNote, reach: TraceReach): boolean {
  const x = xOf(frame, note.timeS);
  const after = reach(x + 4, frame.plot.left + frame.plot.width);
  return after !== null && after.top > yOf(frame, note.tempC) + 1;
}

export function drawNotes(placed: PlacedNote[]): Shape[] {
  return placed.flatMap((place) => [
    {
      kind: 'line',
      path: [place.x, place.dotY, place.x, place.leaderY],
      ink: 'ink',
      widthPx: 0.9,
    } as const,
    {
      kind: 'disc',
      x: place.x,
      y: place.dotY,
      r: 2.6,
      fill: 'ink',
      rim: null,
      rimPx: 0,
    } as const,
    ...drawNoteWords(place),
  ]);
}

/** T0 + 32 °F, then 13 °F lower: the two shelves that notes stand on. */
function shelves(frame: Frame): number[] {
  const K_PER_F = 1 / 1.8;
  const shelf = (aboveF: number) => yOf(frame, frame.lowC + aboveF * K_PER_F);
  return [shelf(32), shelf(19)];
}

function hangWords(frame: Frame, note: StripNote, isUpFirst: boolean): PlacedNote[] {
  const wide = hangLines(frame, note, wrap(note.text, WIDE_PX));
  const narrow = hangLines(frame, note, wrap(note.text, NARROW_PX));
  const onShelves = [...wide.onShelves, ...narrow.onShelves];
  const upward = [...wide.upward, ...narrow.upward];
  return [...(isUpFirst ? [upward, onShelves] : [onShelves, upward]).flat(), ...narrow.close];
}

function hangLines(frame: Frame, note: StripNote, lines: string[]) {
  const x = xOf(frame, note.timeS);
  const dotY = yOf(frame, note.tempC);
  const tall = (lines.length - 1) * LINE_PX;
  const sides = ['right', 'left'] as const;
  const down = (textY: number) =>
    sides.map((side): PlacedNote => ({
      ...{ note, x, dotY, side, lines, textY },
      leaderY: textY + tall + 4,
    }));
  const up = (aboveY: number) => {
    const textY = Math.max(frame.plot.top + 24, dotY - aboveY - tall);
    return sides.map((side): PlacedNote => ({
      ...{ note, x, dotY, side, lines, textY },
      leaderY: textY - 12,
    }));
  };
  const below = shelves(frame).filter((y) => y > dotY + 14);
  return { onShelves: below.flatMap(down), upward: [34, 12].flatMap(up), close: down(dotY + 40) };
}

function hangLetter(frame: Frame, note: StripNote): PlacedNote[] {
  const x = xOf(frame, note.timeS);
  const dotY = yOf(frame, note.tempC);
  const lines = [note.letter];
  const [shelf] = shelves(frame);
  const at = (textY: number, leaderY: number): PlacedNote => ({
    ...{ note, x, dotY, textY, leaderY, lines },
    side: 'on',
  });
  const up = Math.max(frame.plot.top + 16, dotY - 36);
  const places = [at(up, up + 4), at(dotY + 44, dotY + 32)];
  return shelf && shelf > dotY + 14 ? [at(shelf, shelf - 12), ...places] : places;
}

function boxOf({ x, textY, side, lines }: PlacedNote): Box {
  const width = widthOf(lines) + GAP_PX;
  const top = textY - TEXT_PX;
  const height = lines.length * LINE_PX + 2;
  if (side === 'on') return { left: x - 7, width: 14, top, height };
  return { left: side === 'right' ? x : x - width, width, top, height };
}

/** The first line has the letter before it. */
function widthOf(lines: string[]): number {
  return Math.max(
    ...lines.map((line, i) => noteWidthPx(line, TEXT_PX) + (i === 0 ? LETTER_PX : 0)),
  );
}

/** Pixels of trouble: a word off the paper or on another is worse than one on the trace. */
function costOf(frame: Frame, box: Box, taken: Box[], obstacles: Obstacles): number {
  const { plot } = frame;
  const offPaper =
    Math.max(0, plot.left - box.left) +
    Math.max(0, box.left + box.width - plot.left - plot.width) +
    Math.max(0, plot.top - box.top) +
    Math.max(0, box.top + box.height - plot.top - plot.height);
  const onOthers = taken.filter((other) => overlaps(box, other)).length;
  const onHatching = obstacles.hatched.filter((hatched) => overlaps(box, hatched)).length;
  const trace = obstacles.reach(box.left, box.left + box.width);
  const onTrace =
    trace && trace.top < box.top + box.height && trace.foot > box.top
      ? Math.min(box.top + box.height, trace.foot) - Math.max(box.top, trace.top)
      : 0;
  return offPaper * 20 + onOthers * 2000 + onTrace * 10 + onHatching * 100;
}

function overlaps(a: Box, b: Box): boolean {
  return (
    a.left < b.left + b.width &&
    b.left < a.left + a.width &&
    a.top < b.top + b.height &&
    b.top < a.top + a.height
  );
}

function drawNoteWords({ x, textY, side, lines, note }: PlacedNote): Shape[] {
  const letter = { voice: 'gothic', weight: 700, sizePx: 14, stretch: 'normal' } as const;
  const text = { voice: 'serif', weight: 400, sizePx: TEXT_PX, stretch: 'normal' } as const;
  const ink = { ink: 'ink', haloPx: 5 } as const;
  if (side === 'on') {
    return [words(note.letter, { x, y: textY }, { ...letter, ...ink, align: 'center' })];
  }
  const align = side === 'right' ? 'left' : 'right';
  const textX = side === 'right' ? x + GAP_PX : x - GAP_PX;
  const first = lines[0] ?? '';
  const letterX = side === 'right' ? textX : textX - noteWidthPx(first, TEXT_PX) - LETTER_PX;
  return [
    words(note.letter, { x: letterX, y: textY }, { ...letter, ...ink, align: 'left' }),
    ...lines.map((line, i) => {
      const indentPx = i === 0 && side === 'right' ? LETTER_PX : 0;
      const at = { x: textX + indentPx, y: textY + i * LINE_PX };
      return words(line, at, { ...text, ...ink, align });
    }),
  ];
}

/** Lines of about one length: as narrow as their number allows. */
function wrap(text: string, widthPx: number): string[] {
  const lines = wrapWithin(text, widthPx);
  for (let px = widthPx - 8; px > 40; px -= 8) {
    const narrower = wrapWithin(text, px);
    if (narrower.length > lines.length || narrower.at(-1)?.endsWith('…')) break;
    lines.splice(0, lines.length, ...narrower);
  }
  return lines;
}

/** At most three lines of a width; what does not fit ends in dots and stands whole in the list. */
export function wrapWithin(text: string, widthPx: number): string[] {
  const lines: string[] = [];
  for (const word of text.split(/\s+/)) {
    const longer = lines.length > 0 ? `${lines.at(-1)} ${word}` : word;
    const roomPx = lines.length <= 1 ? widthPx - LETTER_PX : widthPx;
    if (lines.length > 0 && noteWidthPx(longer, TEXT_PX) <= roomPx) {
      lines[lines.length - 1] = longer;
    } else lines.push(word);
  }
  if (lines.length <= MOST_LINES) return lines;
  return [...lines.slice(0, MOST_LINES - 1), `${lines[MOST_LINES - 1] ?? ''}…`];
}
