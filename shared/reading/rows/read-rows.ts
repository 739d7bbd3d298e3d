import type { ReadProblem } from '../log-reading.ts';
import type { Layout } from '../layout/layout.ts';
import { roleOfName } from '../layout/column-roles.ts';
import { problem } from '../words/problem-words.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { splitCells } from '../text/split-cells.ts';
import { LONGEST_BYTES, LONGEST_LINE, lineEnd, pastLineEnd } from '../text/split-lines.ts';
import type { LogText } from '../text/decode-text.ts';
import { joinQuoted, type JoinedRow } from './join-quoted.ts';
import { QuickRow } from './quick-row.ts';
import { planRow, type RowPlan } from './row-plan.ts';
import { RowStore } from './row-store.ts';
import { readSlowRow, type SlowRow } from './slow-row.ts';

const PROGRESS_ROWS = 65_536;

export type RowsInput = {
  text: LogText;
  layout: Layout;
  decode: (bytes: Uint8Array, from: number, to: number) => string;
  onProgress?: ((done: number) => void) | undefined;
  /** Only the careful reader: for tests, which hold the two against each other. */
  carefulOnly?: boolean;
};

/** Things met on the way that are told once, each with its first row. */
export type RowFacts = {
  headersAgain: number[];
  convertedRow: number | null;
  bareRow: number | null;
  /** Readings with other decimals than their column's, by temperature column. */
  oddForms: { count: number; row: number | null }[];
  /** What the first reading's zone adds, for the wall clock. */
  offsetTicks: number;
  /** Rows read by the careful reader. */
  carefulRows: number;
};

export type RowsResult =
  { kind: 'rows'; store: RowStore; facts: RowFacts } | { kind: 'problem'; problem: ReadProblem };

/** Every row of readings of a file, by its layout. */
export function readRows(input: RowsInput): RowsResult {
  const reader = new RowsReader(input);
  const found = reader.readAll();
  return found ?? { kind: 'rows', store: reader.store, facts: reader.facts };
}

class RowsReader {
  readonly store: RowStore;
  readonly facts: RowFacts = {
    headersAgain: [],
    convertedRow: null,
    bareRow: null,
    oddForms: [],
    offsetTicks: 0,
    carefulRows: 0,
  };
  private readonly input: RowsInput;
  private readonly plan: RowPlan;
  private readonly quick: QuickRow | null;
  /** The row that was read last, where its quotes reach over lines. */
  private joined: JoinedRow | null = null;

  constructor(input: RowsInput) {
    const { text, layout } = input;
    this.input = input;
    this.plan = planRow(layout);
    this.facts.oddForms = layout.tempColumns.map(() => ({ count: 0, row: null }));
    const lineBytes = Math.max(4, lineEnd(text.bytes, layout.firstByte) - layout.firstByte);
    const likely = Math.ceil((text.bytes.length / lineBytes) * 1.05);
    this.store = new RowStore(layout.tempColumns.length, likely);
    this.quick = input.carefulOnly
      ? null
      : new QuickRow(text.bytes, this.plan, suffixBytes(layout.cellSuffix, text));
  }

  readAll(): RowsResult | null {
    const { text, layout, onProgress } = this.input;
    const { bytes } = text;
    const { quick } = this;
    let at = layout.firstByte;
    let row = layout.firstRow;
    let untilProgress = PROGRESS_ROWS;
    while (at < bytes.length) {
      if (quick !== null && quick.read(at)) {
        this.pushQuick(quick, row);
        at = pastLineEnd(bytes, quick.at);
      } else {
        const to = lineEnd(bytes, at);
        const wrong = this.readCarefully(at, to, row);
        if (wrong) return { kind: 'problem', problem: wrong };
        at = pastLineEnd(bytes, this.joined?.to ?? to);
        row += this.joined?.lines.length ?? 0;
      }
      row++;
      if (--untilProgress === 0) {
        untilProgress = PROGRESS_ROWS;
        onProgress?.(at / bytes.length);
      }
    }
    return null;
  }

  private pushQuick(quick: QuickRow, row: number): void {
    const { store } = this;
    const { clock } = this.plan.layout;
    store.reserve();
    const n = store.count;
    if (n === 0) this.facts.offsetTicks = quick.offsetTicks;
    store.ticks[n] = clock.kind === 'rows' ? this.rowOrder() * clock.intervalTicks : quick.ticks;
    store.rows[n] = row;
    const { temps } = quick;
    for (let k = 0; k < temps.length; k++) store.temps[k]![n] = temps[k]!;
    if (quick.anyEmpty) this.noteEmpty(temps, row);
    if (quick.anyOdd) this.noteOdd(quick.decimals, row);
    store.count = n + 1;
  }

  private noteEmpty(temps: Float64Array, row: number): void {
    for (let k = 0; k < temps.length; k++) {
      if (Number.isNaN(temps[k])) this.store.noReading[k]!.add(row, SKIP_WORDS.noReading(''));
    }
  }

  private noteOdd(decimals: ArrayLike<number>, row: number): void {
    const { usualDecimals } = this.plan.layout;
    for (const [k, form] of this.facts.oddForms.entries()) {
      const usual = usualDecimals[k]!;
      if (usual < 0 || decimals[k]! < 0 || decimals[k] === usual) continue;
      form.count++;
      form.row ??= row;
    }
  }

  private rowOrder(): number {
    return this.store.count + this.store.unread.count;
  }

  private readCarefully(from: number, to: number, row: number): ReadProblem | null {
    const { input, store, plan, facts } = this;
    const { layout } = plan;
    this.joined = null;
    if (to - from > LONGEST_BYTES) return problem('line-too-long', { row, say: LONGEST_LINE });
    const line = input.decode(input.text.bytes, from, to);
    if (line.trim() === '') return null;
    if (line.includes('\0')) return problem('nul-inside', { row });
    facts.carefulRows++;
    const own = splitCells(line, layout.delimiter);
    this.joined = own.unclosed ? this.joinNote(from) : null;
    const cells = this.joined?.cells ?? own.cells;
    const unclosed = own.unclosed && this.joined === null;
    if (cells.every((cell) => cell === '')) {
      store.passedOver.add(row, SKIP_WORDS.emptyRow());
      return null;
    }
    if (layout.header && sameCells(cells, layout.header)) {
      facts.headersAgain.push(row);
      store.passedOver.add(row, SKIP_WORDS.headerAgain());
      return null;
    }
    if (isOtherHeader(cells)) return problem('columns-change', { row, value: line.trim() });
    const read = readSlowRow(cells, plan, this.rowOrder());
    const why = rejection(cells, unclosed, layout, read);
    if (why !== null) store.unread.add(row, why);
    else return this.pushSlow(read, cells, row);
    return null;
  }

  /** A note of several lines; null where a line of it is a reading, so that a stray quote costs its own row only. */
  private joinNote(from: number): JoinedRow | null {
    const { text, layout, decode } = this.input;
    const joined = joinQuoted(text.bytes, from, layout.delimiter, decode);
    if (!joined || !this.isRow(joined.cells)) return null;
    const isReading = (line: string) => {
      const { cells } = splitCells(line, layout.delimiter);
      return cells.length > 1 && this.isRow(cells);
    };
    return joined.lines.some(isReading) ? null : joined;
  }

  private isRow(cells: string[]): boolean {
    const { layout } = this.plan;
    return rejection(cells, false, layout, readSlowRow(cells, this.plan, 0)) === null;
  }

  private pushSlow(read: SlowRow, cells: string[], row: number): ReadProblem | null {
    const { store, facts, plan } = this;
    if (read.tooLargeColumn !== null) {
      const column = plan.layout.columns[read.tooLargeColumn]!.name;
      const value = cells[read.tooLargeColumn]!.slice(0, 40);
      return problem('number-too-large', { row, column, value });
    }
    store.reserve();
    const n = store.count;
    if (n === 0) facts.offsetTicks = read.offsetTicks;
    if (read.converted) facts.convertedRow ??= row;
    if (read.bareTemps) facts.bareRow ??= row;
    store.ticks[n] = read.ticks;
    store.rows[n] = row;
    for (const [k, temp] of read.temps.entries()) {
      store.temps[k]![n] = temp;
      const why = read.whyNot[k];
      if (why) store.noReading[k]!.add(row, why);
    }
    this.noteOdd(read.decimals, row);
    store.count = n + 1;
    return null;
  }
}

/** Why a row cannot be a reading; null where it can. */
function rejection(cells: string[], unclosed: boolean, layout: Layout, read: SlowRow) {
  if (unclosed) return SKIP_WORDS.unclosedQuote();
  if (read.why !== null) return read.why;
  const width = layout.columns.length;
  const filled = cells.findLastIndex((cell) => cell !== '') + 1;
  if (cells.length < layout.neededCells || filled > width) {
    return SKIP_WORDS.cellCount(Math.max(filled, Math.min(cells.length, width)), width);
  }
  if (cells.length > layout.mostCells) return SKIP_WORDS.cellCount(cells.length, width);
  return null;
}

function sameCells(cells: string[], header: string[]): boolean {
  return cells.length === header.length && cells.every((cell, i) => cell === header[i]);
}

/** Words for a time and for a temperature, and no digit between them, far below the header. */
function isOtherHeader(cells: string[]): boolean {
  if (cells.length < 2 || cells.some((cell) => /^\s*[-+]?\d/.test(cell))) return false;
  const roles = cells.map(roleOfName);
  return roles.includes('time') && roles.includes('temperature');
}

function suffixBytes(suffix: string, { encoding }: LogText): Uint8Array {
  if (encoding !== 'windows-1252') return new TextEncoder().encode(suffix);
  const bytes = Uint8Array.from(suffix, (c) => c.charCodeAt(0));
  return bytes;
}
