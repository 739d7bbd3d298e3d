/** What one way of judging did on one method's runs. */
export type Tally = {
  runs: number;
  right: number;
  falselyInBand: number;
  falseAlarms: number;
  falseRunaways: number;
  missedRunaways: number;
  hits: number;
  missed: number;
  invented: number;
  errorsF: number[];
  uF: number[];
  covered: number;
  switchErrorsS: number[];
};

export function emptyTally(): Tally {
  return {
    runs: 0,
    right: 0,
    falselyInBand: 0,
    falseAlarms: 0,
    falseRunaways: 0,
    missedRunaways: 0,
    hits: 0,
    missed: 0,
    invented: 0,
    errorsF: [],
    uF: [],
    covered: 0,
    switchErrorsS: [],
  };
}

/** Prints a line a method for the engine, and under it the same for the plain peak finder. */
export function printTallies(
  tallies: { name: string; ours: Tally; plain: Tally }[],
  what: string,
): void {
  console.log(`\naccuracy, ${what}; errors in °F, switches in s; r/c = runaways missed/cried`);
  console.log(
    'method        runs    F1     err50  err95  u50    cover  sw50   right  inband! alarm! r/c',
  );
  for (const { name, ours } of tallies) console.log(lineOf(name, ours));
  console.log(lineOf('all', sumOf(tallies.map(({ ours }) => ours))));
  console.log('plain peak finder');
  for (const { name, plain } of tallies) console.log(lineOf(name, plain));
  console.log(lineOf('all', sumOf(tallies.map(({ plain }) => plain))));
}

function lineOf(name: string, tally: Tally): string {
  const f1 = (2 * tally.hits) / (2 * tally.hits + tally.missed + tally.invented);
  const cells = [
    tally.runs.toFixed(0),
    f1.toFixed(4),
    quantile(tally.errorsF, 0.5),
    quantile(tally.errorsF, 0.95),
    quantile(tally.uF, 0.5),
    tally.uF.length > 0 ? (tally.covered / tally.uF.length).toFixed(3) : '-',
    quantile(tally.switchErrorsS, 0.5),
    (tally.right / tally.runs).toFixed(3),
    tally.falselyInBand.toFixed(0),
    tally.falseAlarms.toFixed(0),
    `${tally.missedRunaways}/${tally.falseRunaways}`,
  ];
  return name.padEnd(14) + cells.map((cell) => cell.padEnd(7)).join('');
}

function quantile(values: number[], share: number): string {
  if (values.length === 0) return '-';
  const sorted = [...values].sort((a, b) => a - b);
  return (sorted[Math.floor(share * (sorted.length - 1))] ?? 0).toFixed(2);
}

function sumOf(tallies: Tally[]): Tally {
  const sum = emptyTally();
  for (const tally of tallies) {
    for (const key of COUNTS) sum[key] += tally[key];
    for (const key of LISTS) sum[key].push(...tally[key]);
  }
  return sum;
}

const COUNTS = [
  'runs',
  'right',
  'falselyInBand',
  'falseAlarms',
  'falseRunaways',
  'missedRunaways',
  'hits',
  'missed',
  'invented',
  'covered',
] as const;
const LISTS = ['errorsF', 'uF', 'switchErrorsS'] as const;
