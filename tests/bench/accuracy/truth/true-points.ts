import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';
import { probeAt } from '#server/commands/heat-model/take-readings.ts';
import type { SeenRun } from '../see-run.ts';

/** A turning point without noise. */
export type TruePoint = { timeS: number; tempC: number; switchTempC: number };

/** The points that a run is judged by, and how well its method knows them, K (expanded). */
export type TruePoints = {
  allCutOuts: TruePoint[];
  /** Without the first after a cold start where there are more. */
  cutOuts: TruePoint[];
  resets: TruePoint[];
  /** Of one point from the readings, and of the probe, common to all. */
  pointUK: number;
  probeUK: number;
};

export function truePoints(seen: SeenRun, turns: TrueTurn[]): TruePoints {
  const of = (kind: TrueTurn['kind']) =>
    turns.filter((turn) => turn.kind === kind).map((turn) => toPoint(seen, turn));
  const allCutOuts = of('cut-out');
  const fromCold = seen.plan.recordFromS === 0;
  return {
    allCutOuts,
    cutOuts: fromCold && allCutOuts.length > 1 ? allCutOuts.slice(1) : allCutOuts,
    resets: of('reset'),
    pointUK: seen.method.pointUK,
    // ±a rectangular, expanded (JCGM 100, 4.3.7).
    probeUK: (2 * seen.plan.accuracyK) / Math.sqrt(3),
  };
}

function toPoint({ run }: SeenRun, { timeS, tempC, switchTimeS }: TrueTurn): TruePoint {
  return { timeS, tempC, switchTempC: probeAt(run, switchTimeS) };
}

export function mean(values: number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

export function middle(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}
