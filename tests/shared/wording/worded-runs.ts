import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { STORIES } from '#server/commands/heat-model/sample-logs.ts';
import { tellStory, type SampleStory } from '#server/commands/heat-model/sample-story.ts';
import { inputOf, ratingOf, seriesOf } from '#tests/bench/accuracy/story-input.ts';
import type { Rating } from '#shared/analysis/rating.ts';

export type WordedRun = { story: SampleStory; analysis: Analysis; rating: Rating };

/** Every sample log, judged: at least one for each code. */
export const RUNS: WordedRun[] = STORIES.map((story) => {
  const { readings, marks } = tellStory(story);
  return {
    story,
    analysis: analyseRun(seriesOf(readings), inputOf(story, marks)),
    rating: ratingOf(story.rating),
  };
});
