import { isInView, xOf, yOf, type Box, type Frame } from './frame.ts';
import { words, type Shape } from './shapes.ts';
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
/** Besley 14 px; measured generously, since a canvas is not at hand where notes are laid out. */
const CHARACTER_PX = 7.4;
const GAP_PX = 7;
const LINE_CHARACTERS = 27;
const MOST_LINES = 3;

/**
 * Notes hang from their moment by an upright hairline, which cannot cross a trace that is a function of time.
 * The words take the first place that is free of the paper's edge, other notes and the trace: first shelf, right then
 * left of the line; second shelf; then upward.
 */
export function placeNotes(frame: Frame, notes: StripNote[], reach: TraceReach): PlacedNote[] {
  const taken: Box[] = [];
  return notes
    .filter((note) => isInView(frame, note.timeS))
    .map((note) => {
      const candidates = frame.compact ? hangLetter(frame, note) : hangWords(frame, note);
      const costs = candidates.map((place) => costOf(frame, boxOf(place), taken, reach));
      const best = candidates[costs.indexOf(Math.min(...costs))] ?? candidates[0]!;
      taken.push(boxOf(best));
      return best;
    });
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

function hangWords(frame: Frame, note: StripNote): PlacedNote[] {
  const lines = wrap(`${note.letter} ${note.text}`);
  const x = xOf(frame, note.timeS);
  const dotY = yOf(frame, note.tempC);
  const tall = (lines.length - 1) * LINE_PX;
  const down = (textY: number, side: PlacedNote['side']): PlacedNote => ({
    ...{ note, x, dotY, side, lines, textY },
    leaderY: textY + tall + 4,
  });
  const up = (side: PlacedNote['side']): PlacedNote => {
    const textY = Math.max(frame.plot.top + 24, dotY - 48 - tall);
    return { ...{ note, x, dotY, side, lines, textY }, leaderY: textY - 12 };
  };
  const below = shelves(frame).filter((y) => y > dotY + 14);
  return [
    ...below.flatMap((y) => [down(y, 'right'), down(y, 'left')]),
    up('right'),
    up('left'),
    down(dotY + 40, 'right'),
    down(dotY + 40, 'left'),
  ];
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
  const longest = Math.max(...lines.map((line) => line.length));
  const width = longest * CHARACTER_PX + GAP_PX;
  const top = textY - TEXT_PX;
  const height = lines.length * LINE_PX + 2;
  if (side === 'on') return { left: x - 7, width: 14, top, height };
  return { left: side === 'right' ? x : x - width, width, top, height };
}

/** Pixels of trouble: a word off the paper or on another is worse than one on the trace. */
function costOf(frame: Frame, box: Box, taken: Box[], reach: TraceReach): number {
  const { plot } = frame;
  const offPaper =
    Math.max(0, plot.left - box.left) +
    Math.max(0, box.left + box.width - plot.left - plot.width) +
    Math.max(0, plot.top - box.top) +
    Math.max(0, box.top + box.height - plot.top - plot.height);
  const onOthers = taken.filter((other) => overlaps(box, other)).length;
  const trace = reach(box.left, box.left + box.width);
  const onTrace =
    trace && trace.top < box.top + box.height && trace.foot > box.top
      ? Math.min(box.top + box.height, trace.foot) - Math.max(box.top, trace.top)
      : 0;
  return offPaper * 20 + onOthers * 2000 + onTrace * 10;
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
  return lines.flatMap((line, i) => {
    const y = textY + i * LINE_PX;
    if (i > 0) return [words(line, { x: textX, y }, { ...text, ...ink, align })];
    const rest = line.slice(note.letter.length + 1);
    const letterX = side === 'right' ? textX : textX - rest.length * CHARACTER_PX * 0.93 - 4;
    return [
      words(rest, { x: side === 'right' ? textX + 14 : textX, y }, { ...text, ...ink, align }),
      words(
        note.letter,
        { x: letterX, y },
        { ...letter, ...ink, align: side === 'right' ? 'left' : 'right' },
      ),
    ];
  });
}

/** At most three lines of about 27 characters; what does not fit ends in dots and stands whole in the list. */
export function wrap(text: string): string[] {
  const lines: string[] = [];
  for (const word of text.split(/\s+/)) {
    const last = lines.at(-1);
    if (last !== undefined && last.length + 1 + word.length <= LINE_CHARACTERS) {
      lines[lines.length - 1] = `${last} ${word}`;
    } else lines.push(word);
  }
  if (lines.length <= MOST_LINES) return lines;
  return [...lines.slice(0, MOST_LINES - 1), `${lines[MOST_LINES - 1] ?? ''}…`];
}
