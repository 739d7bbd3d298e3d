import type { Analysis, AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';

/** The engine, in a chunk of its own: it comes when a run is ended. */
export async function analyseOnDevice(series: Series, input: AnalysisInput): Promise<Analysis> {
  const { analyseRun } = await import('#shared/analysis/analyse-run.ts');
  return analyseRun(series, input);
}
