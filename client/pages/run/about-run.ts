import type { Point } from '#shared/analysis/analysis.ts';
import type { JudgedBy, RunPage } from '#shared/schemas/runs.ts';
import { fromKelvinStep, type DisplayUnit } from '#shared/units.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { formatRated } from '#shared/wording/format.ts';

/** What the words for a run depend on. */
export function aboutOf(
  run: Pick<RunPage, 'machine' | 'pairs' | 'conditions' | 'analysis'>,
  unit: DisplayUnit,
): About {
  const { fuel, control } = run.machine;
  const ducts = run.pairs.duct ? (['on', 'off'] as const) : [run.conditions.duct];
  return { unit, judgedBy: run.analysis.judgedBy, fuel, control, ducts: [...ducts] };
}

/** "opens 155 ± 5, closes 130 ± 5", in the reader’s unit. */
export function judgedWords(judgedBy: JudgedBy, unit: DisplayUnit): string {
  const band = (midC: number, tolK: number) =>
    formatRated(midC, unit).replace(
      `\u00a0°${unit}`,
      `\u00a0±\u00a0${plainStep(fromKelvinStep(tolK, unit))}`,
    );
  const { opensC, opensTolK, closesC, closesTolK } = judgedBy;
  return `opens ${band(opensC, opensTolK)}, closes ${band(closesC, closesTolK)}`;
}

function plainStep(step: number): string {
  return step.toFixed(1).replace(/\.0$/, '');
}

/** Every turning point with what the probe adds, in order of time. */
export function pointsOf({ analysis: { analysis } }: RunPage): Point[] {
  return [...analysis.cutOuts, ...analysis.resets].sort((a, b) => a.timeS - b.timeS);
}

/** Smallest and largest U of the run's points, K; null where there are none. */
export function uncertaintyReach(points: Point[]): { leastK: number; mostK: number } | null {
  if (points.length === 0) return null;
  const all = points.map((point) => point.uTotalK);
  return { leastK: Math.min(...all), mostK: Math.max(...all) };
}
