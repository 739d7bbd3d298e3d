import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Rating } from '#shared/analysis/rating.ts';
import type { Mark, Series } from '#shared/analysis/series.ts';
import { toCelsius, toKelvinStep } from '#shared/units.ts';
import type { SampleRating, SampleStory } from '#server/commands/heat-model/sample-story.ts';
import type { Readings } from '#server/commands/heat-model/take-readings.ts';

/** Readings as a series: silent ones left out, °C, from the first. */
export function seriesOf({ unit, timesS, temps }: Readings): Series {
  const kept = timesS.map((_, i) => i).filter((i) => temps[i] !== null);
  const firstS = timesS[kept[0] ?? 0] ?? 0;
  return {
    timesS: Float64Array.from(kept, (i) => (timesS[i] ?? 0) - firstS),
    tempsC: Float64Array.from(kept, (i) => toCelsius(temps[i] ?? 0, unit)),
  };
}

/** What a story is judged by, as the command would be told. */
export function inputOf(
  story: Pick<SampleStory, 'rating' | 'probe' | 'load' | 'machine'>,
  marks: Mark[],
): AnalysisInput {
  return {
    rating: ratingOf(story.rating),
    probe: {
      accuracyK: toKelvinStep(story.probe.accuracyF, 'F'),
      calibrationUK: 0,
      correction: null,
      responseS: story.probe.responseS,
    },
    marks,
    load: story.load,
    roomC: story.machine.roomC,
    minCycles: 3,
    swingK: toKelvinStep(4, 'F'),
    reference: null,
  };
}

/** A rating of the shop's list in °C; the ceiling lies 6 °F under the high limit. */
export function ratingOf(rating: SampleRating): Rating {
  return {
    opensC: toCelsius(rating.opens, 'F'),
    opensTolK: toKelvinStep(rating.opensTol, 'F'),
    closesC: toCelsius(rating.closes, 'F'),
    closesTolK: toKelvinStep(rating.closesTol, 'F'),
    overshootK: toKelvinStep(rating.overshoot, 'F'),
    undershootK: toKelvinStep(rating.undershoot, 'F'),
    highLimitC: toCelsius(rating.highLimit, 'F'),
    ceilingC: toCelsius(rating.highLimit - 6, 'F'),
  };
}
