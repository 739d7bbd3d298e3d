import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';

/** The command's defaults. */
export function plainInput(changes: Partial<AnalysisInput> = {}): AnalysisInput {
  return {
    rating: DEFAULT_RATING,
    probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
    marks: [],
    load: null,
    roomC: null,
    minCycles: 3,
    swingK: 4 / 1.8,
    reference: null,
    ...changes,
  };
}
