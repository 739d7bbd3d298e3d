import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { readLog } from '#shared/reading/read-log.ts';
import { STORIES } from '#server/commands/heat-model/sample-logs.ts';
import { tellStory } from '#server/commands/heat-model/sample-story.ts';
import { inputOf } from '#tests/bench/accuracy/story-input.ts';

const folder = join(import.meta.dirname, '../../../../sample-logs');
const stories = STORIES.map((story) => [story.file, story] as const);

function readSample(file: string) {
  const outcome = readLog(readFileSync(join(folder, file)));
  if (outcome.kind !== 'read') throw new Error(`${file} was not read: ${outcome.kind}`);
  return outcome.reading;
}

test.each(stories)('%s is read with no question, in its own unit', (file, story) => {
  const { channelUnit, series } = readSample(file);

  expect(channelUnit).toBe(story.method === 'hand' ? 'F' : story.method.unit);
  expect(series.timesS.length).toBeGreaterThan(30);
});

test.each(stories)('%s has the headline and the outcome of its story', (file, story) => {
  const { marks } = tellStory(story);

  const analysis = analyseRun(readSample(file).series, inputOf(story, marks));

  expect(analysis.findings[0]?.code).toBe(story.headline);
  expect(analysis.outcome).toBe(story.outcome);
});
