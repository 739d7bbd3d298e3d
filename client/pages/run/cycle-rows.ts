import type { Analysis, Finding, Point } from '#shared/analysis/analysis.ts';

/** A cut-out, the reset after it, and how long heat was on before and off after. */
export type CycleRow = {
  number: number;
  onS: number | null;
  cutOut: Point | null;
  offS: number | null;
  reset: Point | null;
  /** Set on a last rise that ended in no cut-out of its own. */
  runaway: Finding | null;
};

/** Rows in order of time; the first heat from cold has its on-time from the start of the record. */
export function cycleRowsOf(analysis: Analysis): CycleRow[] {
  const cutOuts = [...analysis.cutOuts].sort((a, b) => a.timeS - b.timeS);
  const resets = [...analysis.resets].sort((a, b) => a.timeS - b.timeS);
  const rows = cutOuts.map((cutOut, i): CycleRow => {
    const nextS = cutOuts[i + 1]?.timeS ?? Infinity;
    const reset = resets.find(({ timeS }) => timeS > cutOut.timeS && timeS < nextS) ?? null;
    const before = resets.filter(({ timeS }) => timeS < cutOut.timeS).at(-1);
    return {
      number: i + 1,
      onS: cutOut.timeS - (before?.timeS ?? 0),
      cutOut,
      offS: reset ? reset.timeS - cutOut.timeS : null,
      reset,
      runaway: null,
    };
  });
  const runaway = analysis.findings.find(({ code }) => code === 'runaway');
  const lastReset = resets.at(-1);
  const lastCutOut = cutOuts.at(-1);
  if (!runaway || (lastCutOut && lastCutOut.timeS > runaway.fromS)) return rows;
  const onS = runaway.toS - (lastReset?.timeS ?? 0);
  return [
    ...rows,
    { number: rows.length + 1, onS, cutOut: null, offS: null, reset: null, runaway },
  ];
}
