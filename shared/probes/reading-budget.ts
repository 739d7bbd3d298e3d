import { correctionErrorAt } from '../analysis/correct-series.ts';
import type { Probe } from '../analysis/rating.ts';
import {
  combineUncertainty,
  ofLag,
  ofRepeats,
  ofResolution,
  rectangular,
  type CombinedUncertainty,
  type UncertaintyPart,
} from './combine-uncertainty.ts';

/** All that makes one reading of a probe uncertain. */
export type ReadingToWeigh = {
  tempC: number;
  probe: Probe;
  /** Step of the display, K; 0 where it is not known. */
  resolutionK: number;
  /** How fast the air moves, K/s; 0 at a turn. */
  rateKPerS: number;
  /** Several readings of the same air, °C; fewer than 2 say nothing of repeatability. */
  repeatsC: readonly number[];
};

export type ReadingBudget = CombinedUncertainty & { parts: UncertaintyPart[] };

/** The uncertainty budget of one reading, part by part; parts of nothing are left out (JCGM 100:2008, clause 8). */
export function readingBudget({
  tempC,
  probe,
  resolutionK,
  rateKPerS,
  repeatsC,
}: ReadingToWeigh): ReadingBudget {
  const { accuracyK, calibrationUK, correction, responseS } = probe;
  const repeats = repeatsC.length < 2 ? null : ofRepeats(repeatsC);
  const all: UncertaintyPart[] = [
    stated('accuracy', rectangular(accuracyK)),
    stated('correction', correction ? correctionErrorAt(correction, tempC) : 0),
    stated('calibration', calibrationUK / 2),
    stated('resolution', ofResolution(resolutionK)),
    stated('lag', responseS === null ? 0 : ofLag(rateKPerS, responseS)),
    { name: 'repeats', standard: repeats?.standard ?? 0, degrees: repeats?.degrees ?? Infinity },
  ];
  const parts = all.filter(({ standard }) => standard > 0);
  return { ...combineUncertainty(parts), parts };
}

function stated(name: string, standard: number): UncertaintyPart {
  return { name, standard, degrees: Infinity };
}
