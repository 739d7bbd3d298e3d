import { splitCells, type Delimiter } from '../text/split-cells.ts';
import { cellKind, isTyped, type CellKind } from './cell-kind.ts';

/** The order in which equal candidates win. */
const CANDIDATES: Delimiter[] = [';', '\t', ',', '|', ' '];

/** What lines with one number count against lines with two. */
const WEAK = 0.01;

export type SplitLine = { cells: string[]; kinds: CellKind[] };
export type DelimiterChoice = { delimiter: Delimiter; width: number; lines: SplitLine[] };

/**
 * The delimiter under which most lines fall into the same number of cells that are numbers and times.
 *
 * @returns null where no line holds a number or a time; width 1 where lines hold one each
 */
export function chooseDelimiter(lines: string[]): DelimiterChoice | null {
  const told = /^sep=(.)\s*$/i.exec(lines[0] ?? '')?.[1];
  const candidates = CANDIDATES.filter((d) => (told ?? d) === d && isCommon(lines, d));
  let best: (DelimiterChoice & { score: number }) | null = null;
  for (const delimiter of candidates) {
    const split = lines.map((line) => splitLine(line, delimiter));
    const { score, width } = scoreLines(split);
    if (score > 0 && width > 1 && score > (best?.score ?? 0) * 1.02) {
      best = { delimiter, width, lines: split, score };
    }
  }
  if (best) return best;
  const single = lines.map((line) => splitLine(line, ';'));
  const { score } = scoreLines(single);
  return score > 0 ? { delimiter: ';', width: 1, lines: single } : null;
}

/** A delimiter is in every row of readings, and those may be few under a long preamble. */
function isCommon(lines: string[], delimiter: Delimiter): boolean {
  const filled = lines.filter((line) => line.trim() !== '');
  return filled.filter((line) => line.includes(delimiter)).length >= filled.length * 0.03;
}

export function splitLine(line: string, delimiter: Delimiter): SplitLine {
  const { cells } = splitCells(line, delimiter);
  return { cells, kinds: cells.map(cellKind) };
}

/**
 * Lines with two numbers or times are readings; where there are none, those with one may be. A preamble
 * of "Setting 12, 4" has one, however long it is.
 */
export function likelyReadings(lines: SplitLine[]): SplitLine[] {
  const strong = lines.filter(({ kinds }) => {
    const typed = kinds.filter((kind) => isTyped(kind) || kind === 'open').length;
    return typed > 1 && kinds.some(isTyped);
  });
  return strong.length >= Math.max(2, lines.length * 0.03) ? strong : lines;
}

function scoreLines(lines: SplitLine[]): { score: number; width: number } {
  const scores = new Map<number, number>();
  const likely = likelyReadings(lines);
  const weight = likely === lines ? WEAK : 1;
  for (const line of likely) {
    const quality = lineQuality(line);
    const width = line.cells.length;
    if (quality > 0) scores.set(width, (scores.get(width) ?? 0) + quality * weight);
  }
  let best = { score: 0, width: 0 };
  for (const [width, score] of scores) {
    if (score > best.score) best = { score, width };
  }
  return best;
}

/** 1 where every filled cell is a number or a time; 0 where fewer than half are. */
function lineQuality({ cells, kinds }: SplitLine): number {
  let filled = 0;
  let typed = 0;
  for (const [i, kind] of kinds.entries()) {
    if (kind === 'empty') continue;
    filled++;
    if (kind === 'open') typed += 0.8;
    // "10 200" may be one number or two cells
    else if (isTyped(kind)) typed += kind === 'number' && /\s/.test(cells[i]!) ? 0.5 : 1;
  }
  return filled > 0 && kinds.some(isTyped) && typed >= filled * 0.4 ? typed / filled : 0;
}
