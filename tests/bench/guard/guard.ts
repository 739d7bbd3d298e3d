import { readArguments } from '../accuracy/arguments.ts';
import { addGuard } from '../accuracy/add-guard.ts';
import { makeRuns } from '../accuracy/make-runs.ts';
import { HAND_30_S, METHODS } from '../accuracy/methods.ts';
import { addTally, emptyTally, type Tally } from '../accuracy/tally.ts';
import { trueCodes } from '../accuracy/truth/true-codes.ts';

const BY_HAND = [...METHODS.filter(({ name }) => name.startsWith('hand')), HAND_30_S];
const NEEDED_LEAD_S = 20;

const LEGEND = `lead: seconds from cut-heat to the high limit on a runaway that nobody ends; late: leads under ${NEEDED_LEAD_S} s;
cut%, watch%: sound runs with cut-heat, with watch; turn%: cut-heat on machines that turn by themselves under the ceiling`;

/**
 * The guard alone, played along every run of the accuracy bench as a person would time it: `[seeds] [first seed]
 * [--plan X]`. The engine is not asked, so that a seed takes seconds.
 */
export function bench(args: string[]): void {
  const tallies = new Map(BY_HAND.map(({ name }) => [name, emptyTally()]));
  for (const run of makeRuns(readArguments(args), BY_HAND)) {
    const tally = tallies.get(run.seen.method.name);
    if (tally) addGuard(tally, run, trueCodes(run.seen));
  }
  console.log(`\n${LEGEND}\n`);
  console.log(lineOf(['by hand', ...COLUMNS.map(({ name }) => name)]));
  const all = emptyTally();
  for (const [name, tally] of tallies) {
    addTally(all, tally);
    console.log(lineOf([name, ...cellsOf(tally)]));
  }
  console.log(lineOf(['all', ...cellsOf(all)]));
}

const COLUMNS: { name: string; of: (tally: Tally) => string }[] = [
  { name: 'runaways', of: ({ leadsS }) => String(leadsS.length) },
  { name: 'least', of: ({ leadsS }) => seconds(sorted(leadsS)[0]) },
  { name: 'median', of: ({ leadsS }) => seconds(sorted(leadsS)[leadsS.length >> 1]) },
  { name: 'late', of: ({ leadsS }) => String(leadsS.filter((s) => s < NEEDED_LEAD_S).length) },
  { name: 'sound', of: ({ soundRuns }) => String(soundRuns) },
  { name: 'cut%', of: (tally) => share(tally.soundCut, tally.soundRuns) },
  { name: 'watch%', of: (tally) => share(tally.soundWatched, tally.soundRuns) },
  { name: 'turning', of: ({ turningRuns }) => String(turningRuns) },
  { name: 'turn%', of: (tally) => share(tally.turningCut, tally.turningRuns) },
];

function cellsOf(tally: Tally): string[] {
  return COLUMNS.map(({ of }) => of(tally));
}

function lineOf([name = '', ...cells]: string[]): string {
  return name.padEnd(12) + cells.map((cell) => cell.padStart(10)).join('');
}

function sorted(values: number[]): number[] {
  return [...values].sort((a, b) => a - b);
}

function seconds(value: number | undefined): string {
  return value === undefined ? '-' : value.toFixed(0);
}

function share(part: number, whole: number): string {
  return whole === 0 ? '-' : ((100 * part) / whole).toFixed(1);
}
