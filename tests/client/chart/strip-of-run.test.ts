import { describe, expect, test } from 'vitest';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { letterNotes, stripOfRun } from '#client/chart/strip-of-run.ts';

const analysis: Analysis = {
  version: '1',
  samples: 1000,
  durationS: 1000,
  spikes: 0,
  gaps: [{ fromS: 10, toS: 40 }],
  noiseK: 0.1,
  cutOuts: [],
  resets: [],
  cycles: [],
  legs: [
    {
      kind: 'heating',
      fromS: 0,
      toS: 280,
      asymptoteC: null,
      asymptoteUK: null,
      tauS: null,
      tauUS: null,
      knee: null,
    },
  ],
  findings: [{ code: 'runaway', fromS: 715, toS: 942, evidence: {} }],
  outcome: 'stop',
  notJudged: null,
  guardAlarmS: 865,
};

describe('an analysis on paper', () => {
  const strip = stripOfRun({
    analysis,
    bands: null,
    marks: [
      { timeS: 281, kind: 'click' },
      { timeS: 720, kind: 'click' },
    ],
    notes: [],
  });

  test('a runaway is hatched and named by how long it went on', () => {
    expect(strip.hotSpans).toEqual([
      {
        fromS: 715,
        toS: 942,
        words: ['heat kept coming', '3:47 with no cut-out'],
        traceIsHot: true,
      },
    ]);
  });

  test('the click of a runaway and the guard’s alarm are in red', () => {
    expect(strip.marks).toEqual([
      { timeS: 281, word: 'click', isStop: false },
      { timeS: 720, word: 'click', isStop: true },
      { timeS: 865, word: 'cut the heat', isStop: true },
    ]);
  });

  test('heat is on while the exhaust rises, and gaps stay gaps', () => {
    expect(strip.heat).toEqual([{ fromS: 0, toS: 280 }]);
    expect(strip.gaps).toEqual([{ fromS: 10, toS: 40 }]);
  });
});

test('notes have letters in order of time, and go on after Z', () => {
  const notes = Array.from({ length: 28 }, (_, i) => ({ timeS: 1000 - i, tempC: 60, text: '' }));

  const lettered = letterNotes(notes);

  expect(lettered.map(({ letter }) => letter).slice(0, 3)).toEqual(['A', 'B', 'C']);
  expect(lettered.map(({ letter }) => letter).slice(25)).toEqual(['Z', 'AA', 'AB']);
  expect(lettered[0]?.timeS).toBe(973);
});
