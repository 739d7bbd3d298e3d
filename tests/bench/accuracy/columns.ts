import type { Tally } from './tally.ts';

/** One figure of the table: how it is worked out, written, and which way is worse; null where it does not apply. */
export type Column = {
  name: string;
  of: (tally: Tally) => number | null;
  digits: number;
  /** The worst of several methods: the least, the greatest, or the one furthest from a middle. */
  worst: 'least' | 'greatest' | { from: number };
};

const count = (name: string, of: (tally: Tally) => number): Column => ({
  name,
  of,
  digits: 0,
  worst: 'greatest',
});

export const COLUMNS: Column[] = [
  { name: 'runs', of: ({ runs }) => runs, digits: 0, worst: 'least' },
  { name: 'F1', of: f1Of, digits: 4, worst: 'least' },
  { name: 'err50', of: (t) => quantile(t.tempErrorsF, 0.5), digits: 2, worst: 'greatest' },
  { name: 'err95', of: (t) => quantile(t.tempErrorsF, 0.95), digits: 2, worst: 'greatest' },
  { name: 'time50', of: (t) => quantile(t.timeErrorsS, 0.5), digits: 2, worst: 'greatest' },
  { name: 'time95', of: (t) => quantile(t.timeErrorsS, 0.95), digits: 1, worst: 'greatest' },
  { name: 'u50', of: (t) => quantile(t.uF, 0.5), digits: 2, worst: 'greatest' },
  {
    name: 'cover',
    of: (t) => share(t.coveredTemps, t.uF.length),
    digits: 3,
    worst: { from: 0.955 },
  },
  { name: 'sw50', of: (t) => quantile(t.switchErrorsS, 0.5), digits: 2, worst: 'greatest' },
  { name: 'sw95', of: (t) => quantile(t.switchErrorsS, 0.95), digits: 1, worst: 'greatest' },
  {
    name: 'swcov',
    of: (t) => share(t.coveredSwitches, t.switchUS.length),
    digits: 3,
    worst: { from: 0.955 },
  },
  { name: 'head', of: (t) => share(t.rightHeadline, t.runs), digits: 4, worst: 'least' },
  { name: 'set', of: (t) => share(t.rightSet, t.runs), digits: 4, worst: 'least' },
  count('inband!', (t) => t.falselyInBand),
  count('alarm!', (t) => t.falseAlarms),
  count('missed', (t) => t.missedRunaways),
  count('cried', (t) => t.criedRunaways),
  { name: 'lead', of: (t) => quantile(t.leadsS, 0), digits: 0, worst: 'least' },
  { name: 'cut%', of: (t) => share(100 * t.soundCut, t.soundRuns), digits: 1, worst: 'greatest' },
  {
    name: 'watch%',
    of: (t) => share(100 * t.soundWatched, t.soundRuns),
    digits: 1,
    worst: 'greatest',
  },
  {
    name: 'turn%',
    of: (t) => share(100 * t.turningCut, t.turningRuns),
    digits: 1,
    worst: 'greatest',
  },
];

function f1Of({ hits, missed, invented }: Tally): number | null {
  const all = 2 * hits + missed + invented;
  return all === 0 ? null : (2 * hits) / all;
}

function share(part: number, whole: number): number | null {
  return whole === 0 ? null : part / whole;
}

function quantile(values: number[], at: number): number | null {
  if (values.length === 0) return null;
  const sorted = Float64Array.from(values).sort();
  return sorted[Math.floor(at * (sorted.length - 1))] ?? null;
}
