import type { Analysis, AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';

/** The engine itself, whichever version. */
export type AnalyseRun = (series: Series, input: AnalysisInput) => Analysis;

/** What the worker is sent, and what it says to it. */
export type EngineTask = { id: number; series: Series; input: AnalysisInput };
export type EngineAnswer = { id: number } & ({ analysis: Analysis } | { problem: string });

/** Said by the worker once it runs. */
export const READY = 'ready';

/** One run judged; what the engine refuses is told, not thrown. */
export function answerTask({ id, series, input }: EngineTask, analyse: AnalyseRun): EngineAnswer {
  try {
    return { id, analysis: analyse(series, input) };
  } catch (error) {
    return { id, problem: error instanceof Error ? error.message : String(error) };
  }
}

declare global {
  /** The engine on the page's own thread, once the worker's file was imported there. */
  var analyseRunHere: AnalyseRun | undefined;
}
