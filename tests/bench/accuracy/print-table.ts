import { COLUMNS, type Column } from './columns.ts';
import { addTally, emptyTally, type Tally } from './tally.ts';

export type Row = { name: string; tally: Tally };

const NAME_WIDTH = 37;

/** What the columns say, for whoever reads the table for the first time. */
export const LEGEND =
  'errors in °F and s (50, 95: median, 95th percentile); u, cover: expanded uncertainty of a turn and how often it holds;\n' +
  'sw…: switch instants, s; head, set: share of runs with the right first code, and with the right codes and no others;\n' +
  'inband!: faulty runs called in-band; alarm!: sound runs called faulty; missed, cried: runaways;\n' +
  'guard: lead = least seconds from cut-heat to the high limit; cut%, watch%: sound runs with cut-heat, with watch;\n' +
  'turn%: runs of machines that turn by themselves under the ceiling with cut-heat';

export function printRows(title: string, rows: Row[], withTotals = true): void {
  console.log(
    `\n${title.padEnd(NAME_WIDTH)}${COLUMNS.map(({ name }) => name.padStart(8)).join('')}`,
  );
  for (const row of rows) console.log(lineOf(row));
  if (!withTotals) return;
  const sum = emptyTally();
  for (const { tally } of rows) addTally(sum, tally);
  console.log(lineOf({ name: 'all', tally: sum }));
  console.log(worstLine(rows));
}

function lineOf({ name, tally }: Row): string {
  return name.padEnd(NAME_WIDTH) + COLUMNS.map((column) => cell(column, column.of(tally))).join('');
}

function worstLine(rows: Row[]): string {
  const cells = COLUMNS.map((column) => {
    const values = rows.map(({ tally }) => column.of(tally)).filter((value) => value !== null);
    return cell(column, values.length === 0 ? null : worstOf(column, values));
  });
  return 'worst'.padEnd(NAME_WIDTH) + cells.join('');
}

function worstOf({ worst }: Column, values: number[]): number {
  if (worst === 'least') return Math.min(...values);
  if (worst === 'greatest') return Math.max(...values);
  return values.reduce((furthest, value) =>
    Math.abs(value - worst.from) > Math.abs(furthest - worst.from) ? value : furthest,
  );
}

function cell({ digits }: Column, value: number | null): string {
  return (value === null ? '-' : value.toFixed(digits)).padStart(8);
}
