import type { Decimal } from '../cells/parse-number.ts';
import type { DateOrder } from '../clock/parse-stamp.ts';
import type { LogColumn } from '../log-reading.ts';
import type { Delimiter } from '../text/split-cells.ts';

/** How a row's time is written. Columns are 0-based; see parse-stamp.ts for ticks. */
export type Clock =
  | { kind: 'stamp'; column: number; order: DateOrder }
  | { kind: 'date-time'; dateColumn: number; column: number; order: DateOrder }
  | { kind: 'time-of-day'; column: number; minutesToo: boolean }
  | { kind: 'minutes'; column: number; hoursFirst: boolean }
  | { kind: 'elapsed'; column: number; ticksPerUnit: number }
  | { kind: 'unix'; column: number; ticksPerUnit: number }
  | { kind: 'serial'; column: number; firstDayTicks: number }
  | { kind: 'rows'; intervalTicks: number };

/** A file's plan, decided before its rows are read. */
export type Layout = {
  delimiter: Delimiter;
  decimal: Decimal;
  columns: LogColumn[];
  clock: Clock;
  /** The clock in words for people. */
  clockWords: string;
  /** Temperature columns in file order. */
  tempColumns: number[];
  /** What follows the number in each cell of a temperature column, " °F"; "" where nothing does. */
  cellSuffix: string;
  /** Decimals that nearly every reading has, by temperature column; -1 where they vary. */
  usualDecimals: number[];
  /** Cells from here on may be missing without a doubt about which one is. */
  neededCells: number;
  /** A row with more cells than this, filled or not, has one too many. */
  mostCells: number;
  /** Header cells, trimmed; null where there is no header. */
  header: string[] | null;
  /** Row number and byte of the first row of readings. */
  firstRow: number;
  firstByte: number;
  preamble: string[];
};
