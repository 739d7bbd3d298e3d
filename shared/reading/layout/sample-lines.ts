import { lineEnd, pastLineEnd, takeLines, type Line } from '../text/split-lines.ts';

const HEAD_LINES = 300;
const MIDDLE_LINES = 80;
const MOST_TITLE_LINES = 4;
const TAIL_BYTES = 6_000;

/** Lines from the start of a file and, for judging its columns only, from its middle and its end. */
export type SampleLines = {
  head: Line[];
  rest: Line[];
  /** The head is the whole file. */
  isWhole: boolean;
};

type Decode = (bytes: Uint8Array, from: number, to: number) => string;

/** Row numbers are true in `head` and meaningless in `rest`. */
export function sampleLines(bytes: Uint8Array, decode: Decode): SampleLines {
  const head = joinTitles(takeLines(bytes, 0, 1, HEAD_LINES, decode));
  const after = (head.at(-1)?.to ?? 0) + 1;
  const rest: Line[] = [];
  const middle = nextLine(bytes, bytes.length >> 1);
  if (middle > after) rest.push(...takeLines(bytes, middle, 0, MIDDLE_LINES, decode));
  const tail = nextLine(bytes, bytes.length - TAIL_BYTES);
  if (tail > Math.max(after, (rest.at(-1)?.to ?? 0) + 1)) {
    rest.push(...takeLines(bytes, tail, 0, HEAD_LINES, decode));
  }
  return { head, rest, isWhole: after >= bytes.length };
}

/** Titles of several lines: where a cell's quote is open at the end of a line, the next lines belong to it. */
function joinTitles(lines: Line[]): Line[] {
  const joined: Line[] = [];
  for (let i = 0; i < lines.length; i++) {
    const more = endsInQuotes(lines[i]!.text) ? linesToClose(lines, i) : 0;
    const last = lines[i + more]!;
    const text = lines.slice(i, i + more + 1).map((line) => line.text);
    joined.push(more === 0 ? last : { ...lines[i]!, to: last.to, text: text.join('\n') });
    i += more;
  }
  return joined;
}

/** How many lines after `from` its open quote reaches over; 0 where none closes it, or one begins as a reading. */
function linesToClose(lines: Line[], from: number): number {
  let text = lines[from]!.text;
  for (let more = 1; more <= MOST_TITLE_LINES; more++) {
    const line = lines[from + more];
    if (!line || /^\s*"?[-+]?\d/.test(line.text)) return 0;
    text += `\n${line.text}`;
    if (!endsInQuotes(text)) return more;
  }
  return 0;
}

/** Whether a quote that began a cell is open at the end; an inch mark within a cell opens nothing. */
function endsInQuotes(text: string): boolean {
  if (!text.includes('"')) return false;
  let open = false;
  let atStart = true;
  for (let i = 0; i < text.length; i++) {
    const character = text[i]!;
    if (open && character === '"') {
      if (text[i + 1] === '"') i++;
      else open = false;
    } else if (!open && character === '"' && atStart) open = true;
    else if (!open) atStart = /[,;\t|]/.test(character) || (atStart && character === ' ');
  }
  return open;
}

function nextLine(bytes: Uint8Array, from: number): number {
  return pastLineEnd(bytes, lineEnd(bytes, Math.max(0, from)));
}
