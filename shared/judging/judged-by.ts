import type { Probe, Rating } from '../analysis/rating.ts';
import type { StoredProbe, StoredRating } from '../schemas/ratings.ts';
import type { JudgedBy } from '../schemas/runs.ts';
import { toCelsius, toKelvinStep } from '../units.ts';

/** Where no safety is specified: 196 °F, and the heat must be cut 6 °F under it (common practice). */
const DEFAULT_HIGH_LIMIT_C = toCelsius(196, 'F');
const CEILING_UNDER_LIMIT_K = toKelvinStep(6, 'F');

/** What a run is judged by, in °C: the rating and the safety that watches the exhaust. null where it never closes again. */
export function judgedBy(rating: StoredRating, limit: StoredRating | null): JudgedBy | null {
  if (rating.closes === null) return null;
  const highLimitC = limit ? toCelsius(limit.opens, limit.unit) : DEFAULT_HIGH_LIMIT_C;
  return {
    ratingId: rating.id,
    name: rating.name,
    opensC: toCelsius(rating.opens, rating.unit),
    opensTolK: toKelvinStep(rating.opensTol, rating.unit),
    closesC: toCelsius(rating.closes, rating.unit),
    closesTolK: toKelvinStep(rating.closesTol ?? rating.opensTol, rating.unit),
    overshootK: toKelvinStep(rating.overshoot, rating.unit),
    undershootK: toKelvinStep(rating.undershoot, rating.unit),
    highLimitC,
    ceilingC: highLimitC - CEILING_UNDER_LIMIT_K,
  };
}

export function ratingOf(judged: JudgedBy | null): Rating | null {
  if (!judged) return null;
  const { opensC, opensTolK, closesC, closesTolK, overshootK, undershootK } = judged;
  const { highLimitC, ceilingC } = judged;
  return {
    opensC,
    opensTolK,
    closesC,
    closesTolK,
    overshootK,
    undershootK,
    highLimitC,
    ceilingC,
  };
}

/** How good the probe is, in K and s; an unnamed probe claims nothing. */
export function probeOf(probe: StoredProbe | null): Probe {
  if (!probe) return { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null };
  return {
    accuracyK: toKelvinStep(probe.accuracy, probe.unit),
    calibrationUK: toKelvinStep(probe.calibrationU ?? 0, probe.unit),
    correction: null,
    responseS: probe.responseS,
  };
}
