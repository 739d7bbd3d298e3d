import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { addGuard } from './add-guard.ts';
import { addCodes, addTurns, isRightSet } from './add-run.ts';
import { readArguments, type AccuracyArguments } from './arguments.ts';
import { inspectRun } from './inspect-run.ts';
import { makeRuns, type ReadRun } from './make-runs.ts';
import { findPeaksPlainly, judgePlainly } from './peak-finder.ts';
import { LEGEND, printRows } from './print-table.ts';
import { addTally, emptyTally, type Tally } from './tally.ts';
import { trueCodes, type TrueCodes } from './truth/true-codes.ts';

/** The engine, and beside it the plain peak finder, on seeded runs with known truth; see README.md. */
export function bench(args: string[]): void {
  const asked = readArguments(args);
  if (asked.inspect) {
    for (const run of makeRuns(asked)) inspectRun(run);
    return;
  }
  const tables = createTables();
  for (const run of makeRuns(asked)) judgeRun(run, tables, asked);
  printTables(tables, asked);
}

type Table = Map<string, Tally>;
type Tables = { methods: Table; codes: Table; plans: Table; plain: Table; plainCodes: Table };

function createTables(): Tables {
  const table = (): Table => new Map();
  return { methods: table(), codes: table(), plans: table(), plain: table(), plainCodes: table() };
}

function judgeRun(run: ReadRun, tables: Tables, asked: AccuracyArguments): void {
  const { seen, series, input } = run;
  const truth = trueCodes(seen);
  const code = truth.expected[0] ?? 'near a limit';

  const analysis = analyseRun(series, input);
  const found = analysis.findings.map((finding) => finding.code);
  const ours = emptyTally();
  addTurns(ours, [...analysis.cutOuts, ...analysis.resets], seen);
  addCodes(ours, found, truth);
  addGuard(ours, run, truth);
  addTo(tables.methods, seen.method.name, ours);
  addTo(tables.codes, code, ours);
  addTo(tables.plans, seen.plan.name, ours);

  const peaks = findPeaksPlainly(series);
  const plain = emptyTally();
  addTurns(plain, peaks, seen);
  addCodes(plain, [judgePlainly(series, peaks, input)], truth);
  addTo(tables.plain, seen.method.name, plain);
  addTo(tables.plainCodes, code, plain);
  if (asked.wrong) tellWrong(run, found, truth);
}

function addTo(table: Table, name: string, tally: Tally): void {
  const sum = table.get(name) ?? emptyTally();
  addTally(sum, tally);
  table.set(name, sum);
}

function tellWrong({ seed, seen }: ReadRun, found: string[], truth: TrueCodes): void {
  const headline = truth.headlines.some((code) => code === found[0]);
  if (headline && isRightSet(found as TrueCodes['expected'], truth)) return;
  const right = `${truth.expected.join(' ')}${truth.allowed.length > 0 ? ` (or ${truth.allowed.join(' ')})` : ''}`;
  console.log(
    `${headline ? 'set ' : 'HEAD'} seed ${seed} "${seen.plan.name}", ${seen.method.name}: ${found.join(' ')} for ${right}`,
  );
}

function printTables(tables: Tables, { from, seeds, plans }: AccuracyArguments): void {
  const rows = (table: Table) => [...table].map(([name, tally]) => ({ name, tally }));
  console.log(`\naccuracy, seeds ${from} to ${from + seeds - 1}\n${LEGEND}`);
  printRows('engine, by method', rows(tables.methods));
  printRows('engine, by expected headline', rows(tables.codes).sort(byName), false);
  if (plans) printRows('engine, by plan', rows(tables.plans), false);
  printRows('plain peak finder, by method', rows(tables.plain));
  printRows('plain peak finder, by headline', rows(tables.plainCodes).sort(byName), false);
}

function byName(a: { name: string }, b: { name: string }): number {
  return a.name < b.name ? -1 : 1;
}
