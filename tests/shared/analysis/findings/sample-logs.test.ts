import { expect, test } from 'vitest';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { STORIES } from '#server/commands/heat-model/sample-logs.ts';
import { tellStory } from '#server/commands/heat-model/sample-story.ts';
import { inputOf, seriesOf } from '#tests/bench/accuracy/story-input.ts';

test.each(STORIES.map((story) => [story.file, story] as const))(
  '%s has the headline and the outcome of its story',
  (_, story) => {
    const { readings, marks } = tellStory(story);

    const analysis = analyseRun(seriesOf(readings), inputOf(story, marks));

    expect(analysis.findings[0]?.code).toBe(story.headline);
    expect(analysis.outcome).toBe(story.outcome);
  },
);
