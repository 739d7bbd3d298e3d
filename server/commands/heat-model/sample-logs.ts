import { FAULTY_STORIES } from './faulty-stories.ts';
import { OUT_OF_BAND_STORIES } from './out-of-band-stories.ts';
import { tellStory, type SampleStory } from './sample-story.ts';
import { SOUND_STORIES } from './sound-stories.ts';

export const STORIES: SampleStory[] = [...SOUND_STORIES, ...FAULTY_STORIES, ...OUT_OF_BAND_STORIES];

/** Every sample log and expected.json, as bytes: the same ones each time. */
export function makeSampleLogs(): { name: string; bytes: Uint8Array }[] {
  const told = STORIES.map((story) => ({ story, ...tellStory(story) }));
  const expected = told.map(({ story, marks }) => expectedEntry(story, marks));
  const json = `${JSON.stringify(expected, null, 2)}\n`;
  return [
    ...told.map(({ story, bytes }) => ({ name: story.file, bytes })),
    { name: 'expected.json', bytes: Buffer.from(json) },
  ];
}

function expectedEntry(story: SampleStory, marks: ReturnType<typeof tellStory>['marks']) {
  return {
    file: story.file,
    story: story.story,
    headline: story.headline,
    outcome: story.outcome,
    fuel: story.fuel,
    about: story.rating,
    probe: story.probe,
    marks,
    roomF: Math.round(story.machine.roomC * 1.8 + 32),
    load: story.load,
    duct: story.duct,
    setting: 'high',
    minCycles: 3,
    unit: story.method === 'hand' ? 'F' : story.method.unit,
    clock: story.layout.clock,
    startedAt: story.startedAt.replace('Z', ''),
  };
}
