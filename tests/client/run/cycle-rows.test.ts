import { describe, expect, test } from 'vitest';
import type { Analysis, Point } from '#shared/analysis/analysis.ts';
import { cycleRowsOf } from '#client/pages/run/cycle-rows.ts';

function point(kind: Point['kind'], timeS: number): Point {
  return {
    ...{ kind, timeS, tempC: 60, uK: 0.1, uTotalK: 0.2, judged: true, call: null },
    ...{ probability: null, switchTimeS: null, switchTempC: null, switchUS: null },
  };
}

function analysisOf(cutOutsS: number[], resetsS: number[], runawayFromS?: number): Analysis {
  return {
    ...{ version: '1', samples: 1, durationS: 1000, spikes: 0, gaps: [], noiseK: 0.1 },
    cutOuts: cutOutsS.map((timeS) => point('cut-out', timeS)),
    resets: resetsS.map((timeS) => point('reset', timeS)),
    ...{ cycles: [], legs: [], outcome: 'not-proven', notJudged: null, guardAlarmS: null },
    findings:
      runawayFromS === undefined
        ? []
        : [{ code: 'runaway', fromS: runawayFromS, toS: 942, evidence: {} }],
  };
}

describe('cycles as rows', () => {
  test('each cut-out has the reset after it, and the times on and off', () => {
    const rows = cycleRowsOf(analysisOf([278, 423], [320, 468]));

    expect(rows.map(({ onS, offS }) => [onS, offS])).toEqual([
      [278, 42],
      [103, 45],
    ]);
  });

  test('a last cut-out without a reset has none', () => {
    const [, last] = cycleRowsOf(analysisOf([278, 423], [320]));

    expect(last).toMatchObject({ reset: null, offS: null });
  });

  test('a cut-out whose reset was not seen does not borrow the next one', () => {
    const [first, second] = cycleRowsOf(analysisOf([278, 423], [468]));

    expect(first).toMatchObject({ reset: null, offS: null });
    expect(second).toMatchObject({ offS: 45 });
  });

  test('heat that kept coming is a row of its own, without a cut-out', () => {
    const last = cycleRowsOf(analysisOf([278], [638], 715)).at(-1);

    expect(last).toMatchObject({ number: 2, cutOut: null, onS: 304 });
  });
});
