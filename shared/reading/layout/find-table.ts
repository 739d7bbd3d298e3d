import { findUnit } from '../cells/find-unit.ts';
import { splitCells, type Delimiter } from '../text/split-cells.ts';
import { cellKind, isTyped, type CellKind } from './cell-kind.ts';
import { likelyReadings, type DelimiterChoice, type SplitLine } from './choose-delimiter.ts';

/** One column's cells in the sampled rows of readings, in file order. */
export type SampleColumn = {
  index: number;
  kind: CellKind;
  cells: string[];
  /** How many of `cells` stand one below the other at the head of the file. */
  headCells: number;
};

export type Table = {
  delimiter: Delimiter;
  width: number;
  columns: SampleColumn[];
  /** Cells of the header, or null. */
  header: string[] | null;
  /** Cells of a row of units under the header, or null. */
  unitRow: string[] | null;
  /** Place of the first row of readings in the head lines. */
  firstLine: number;
  /** Lines above the header. */
  preamble: string[];
  /** Sampled lines from the first row of readings on, split. */
  lines: SplitLine[];
};

/**
 * Where the rows of readings begin, and which line above them is their header.
 *
 * @param headCount how many of the choice's lines are the head of the file
 * @returns null where no line of the head looks like a row of readings
 */
export function findTable(
  choice: DelimiterChoice,
  headLines: string[],
  headCount: number,
): Table | null {
  const { lines, width, delimiter } = choice;
  const kinds = columnKinds(likelyReadings(lines), width);
  const fits = lines.map((line) => fitsKinds(line, kinds));
  const firstLine = firstOf(fits, headCount);
  if (firstLine < 0) return null;
  const found = findHeader(headLines, firstLine, choice);
  return {
    delimiter,
    width,
    columns: kinds.map((kind, index) =>
      sampleColumn(index, kind, lines, fits, firstLine, headCount),
    ),
    header: found?.header ?? null,
    unitRow: found?.unitRow ?? null,
    firstLine: found ? found.to + 1 : firstLine,
    lines: lines.slice(firstLine),
    preamble: headLines.slice(0, found?.from ?? firstLine).filter((line) => line.trim() !== ''),
  };
}

function columnKinds(lines: SplitLine[], width: number): CellKind[] {
  return Array.from({ length: width }, (_, column) => {
    const counts = new Map<CellKind, number>();
    for (const line of lines) {
      const kind = line.kinds.length === width ? line.kinds[column]! : 'empty';
      if (!line.kinds.some(isTyped)) continue;
      if (kind !== 'empty' && kind !== 'open') counts.set(kind, (counts.get(kind) ?? 0) + 1);
    }
    const most = [...counts].sort((a, b) => b[1] - a[1])[0];
    return most?.[0] ?? 'empty';
  });
}

/** A row of readings: the right number of cells, each of its column's kind or without a reading. */
function fitsKinds({ kinds }: SplitLine, columns: CellKind[]): boolean {
  if (kinds.length < columns.length || kinds.length > columns.length + 1) return false;
  let typed = 0;
  for (const [i, column] of columns.entries()) {
    const kind = kinds[i]!;
    if (isTyped(kind) || kind === 'open') typed++;
    if (isTyped(column) && kind !== column && kind !== 'empty' && kind !== 'open') return false;
  }
  const isOne = columns.length === 1 || columns.filter(isTyped).length < 2;
  return kinds.some(isTyped) && (isOne || typed > 1);
}

/** A lone line that looks right above the table is preamble: most of what follows must fit too. */
function firstOf(fits: boolean[], headCount: number): number {
  for (let i = 0; i < headCount; i++) {
    if (!fits[i]) continue;
    const next = fits.slice(i, Math.min(i + 6, headCount));
    if (next.filter(Boolean).length * 2 > next.length) return i;
  }
  return fits.slice(0, headCount).indexOf(true);
}

function sampleColumn(
  index: number,
  kind: CellKind,
  lines: SplitLine[],
  fits: boolean[],
  firstLine: number,
  headCount: number,
): SampleColumn {
  const cells: string[] = [];
  let headCells = 0;
  for (let i = firstLine; i < lines.length; i++) {
    if (!fits[i]) continue;
    cells.push(lines[i]!.cells[index]!);
    if (i < headCount) headCells++;
  }
  return { index, kind, cells, headCells };
}

const UNIT_CELL =
  /^[([]?\s*(s|sec|secs|seconds?|ms|min|minutes?|h|hrs?|hours?|hh:mm(:ss)?|h:mm(:ss)?|mm?:ss|[ymd]{1,4}[-/.][ymd]{1,4}[-/.][ymd]{1,4}.*|%|% ?rh|v|mv|a|ma|w|kw|pa|hpa|-|#|no\.?)\s*[)\]]?$/i;

/** Lines between a header and the first good row: rows of readings that are damaged, or rules. */
const MOST_BETWEEN = 5;

type FoundHeader = { header: string[]; unitRow: string[] | null; from: number; to: number };

/** The nearest line of nothing but words above the readings, with a row of units under it or not. */
function findHeader(
  headLines: string[],
  firstLine: number,
  choice: DelimiterChoice,
): FoundHeader | null {
  let at = firstLine;
  let below: string[] | null = null;
  let mixed: FoundHeader | null = null;
  for (let passed = 0; passed <= MOST_BETWEEN; passed++) {
    at = lineAbove(headLines, at);
    if (at < 0) break;
    const cells = splitHeader(headLines[at]!, choice);
    const words = wordShare(cells, choice.width, headLines[at]!);
    const unitRow = below;
    below = areUnits(cells) ? cells : null;
    if (words === 0) continue;
    const to = unitRow ? lineBelow(headLines, at) : at;
    const found = { header: cells, unitRow, from: at, to };
    const upper = lineAbove(headLines, at);
    const isUnits = below !== null && upper >= 0;
    if (
      isUnits &&
      wordShare(splitHeader(headLines[upper]!, choice), choice.width, headLines[upper]!) > 0
    ) {
      continue;
    }
    if (words === 1) return found;
    mixed ??= found;
  }
  return mixed;
}

function areUnits(cells: string[]): boolean {
  const filled = cells.filter((cell) => cell !== '');
  const isUnit = (cell: string) =>
    UNIT_CELL.test(cell) || (findUnit(cell) !== null && cell.length < 12);
  return filled.length > 0 && filled.every(isUnit);
}

function lineAbove(lines: string[], index: number): number {
  let at = index - 1;
  while (at >= 0 && lines[at]!.trim() === '') at--;
  return at;
}

function lineBelow(lines: string[], index: number): number {
  let at = index + 1;
  while (lines[at]?.trim() === '') at++;
  return at;
}

function splitHeader(line: string, { delimiter, width }: DelimiterChoice): string[] {
  const split = splitCells(line.replace(/^\s*#\s*/, ''), delimiter);
  const cells = split.cells.map((cell) => cell.replace(/\s*\n\s*/g, ' '));
  return delimiter === ' ' && cells.length !== width ? line.trim().split(/\s{2,}|\t+/) : cells;
}

/** "M69.8" and "04/24/2026 2:05 P" are what damage makes of a reading and a stamp, and head no column. */
function isBrokenReading(cell: string): boolean {
  const digits = cell.replace(/\D/g, '').length;
  const hasWord = /[A-Za-zÀ-ÿ]{3}/.test(cell);
  return !hasWord && /\d[.:/-]\d/.test(cell) && digits * 2 >= cell.length;
}

/** The share of filled cells that are words; 0 where that, or their number, makes the line no header. */
function wordShare(cells: string[], width: number, line: string): number {
  if (/^sep=.\s*$/i.test(line)) return 0;
  const kinds = cells.map((cell) => (isBrokenReading(cell) ? 'number' : cellKind(cell)));
  // "No" over a column of numbers is a word, and no sensor that is open
  const isWord = (kind: CellKind) => kind === 'text' || kind === 'open';
  const words = kinds.includes('text') ? kinds.filter(isWord).length : 0;
  const filled = cells.filter((cell) => cell !== '').length;
  if (words <= filled * 0.5) return 0;
  if (width === 1) return cells.length === 1 && !/[:=]/.test(line) ? 1 : 0;
  return filled >= 2 && filled >= width * 0.5 ? words / filled : 0;
}
