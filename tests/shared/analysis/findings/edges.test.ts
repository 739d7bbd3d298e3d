import { describe, expect, test } from 'vitest';
import type { FindingCode } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING, type Rating } from '#shared/analysis/rating.ts';
import type { RunFacts } from '#shared/analysis/run-facts.ts';
import { findFindings } from '#shared/analysis/findings/find-findings.ts';
import { findPoints } from '#shared/analysis/find-points.ts';
import { gatherFacts } from '#shared/analysis/gather-facts.ts';
import { plainInput } from '../plain-input.ts';
import { cycles, heat, readRun } from './build-run.ts';

const ACCURACY_K = 2 / 1.8;
const input = plainInput({
  probe: { accuracyK: ACCURACY_K, calibrationUK: 0, correction: null, responseS: null },
  load: 'empty',
});
const facts = gatherFacts(
  readRun([...cycles([155, 155.4, 154.7, 155.2, 154.9]), heat(145, 40)], { everyS: 1, stepF: 0.1 }),
  input,
);

/** The run as it is, judged by a rating whose one band is moved by so many °F: the same as moving its points. */
function headlineWith(changes: Partial<Rating>): FindingCode {
  const rating = { ...DEFAULT_RATING, ...changes };
  const moved: RunFacts = {
    ...facts,
    input: { ...input, rating },
    ...findPoints(facts.extremes, { ...input, rating }, true),
  };
  const [first] = findFindings(moved);
  if (!first) throw new Error('a run has a finding');
  return first.code;
}

/** Headlines met on the way as a band moves from `fromF` to `toF` by a tenth of a degree a step, in order. */
function walk(point: 'opensC' | 'closesC', fromF: number, toF: number): FindingCode[] {
  const met: FindingCode[] = [];
  const steps = Math.round(Math.abs(toF - fromF) * 10);
  for (let step = 0; step <= steps; step++) {
    const byF = fromF + ((toF - fromF) * step) / steps;
    const code = headlineWith({ [point]: DEFAULT_RATING[point] + byF / 1.8 });
    if (met.at(-1) !== code) met.push(code);
  }
  return met;
}

describe('a run whose points are moved over a limit by tiny steps', () => {
  // Each band moves by its tolerance of 5 °F, its allowance of 10 where it has one, U, and a little more.
  test.each([
    ['opens high', 'opensC', -20, 'opens-high'],
    ['opens low', 'opensC', 9, 'opens-low'],
    ['closes high', 'closesC', -9, 'closes-high'],
    ['closes low', 'closesC', 19, 'closes-low'],
  ] as const)(
    'is too close before it %s, never in band and then at once',
    (_, point, toF, name) => {
      const met = walk(point, 0, toF);

      expect(met.slice(0, 2)).toEqual(['in-band', 'too-close']);
      expect(met.at(-1)).toBe(name);
      // A point or two may be outside a little before all of them together are.
      for (const code of met.slice(1, -1)) expect(['too-close', 'mixed']).toContain(code);
    },
  );

  test('stays too close for as long as the probe’s own doubt is wide, each way', () => {
    // U of ±2 °F rectangular, k = 2: 2·2/√3 = 2.3 °F (JCGM 100, 4.3.7), so too close from band − to band + 2.3 at least.
    const edgeF = 5;
    for (const offF of [-2, -1, 0, 1]) {
      const byF = edgeF + offF;
      expect(['in-band', 'too-close']).toContain(
        headlineWith({ opensC: DEFAULT_RATING.opensC + byF / 1.8 }),
      );
    }
    expect(headlineWith({ opensC: DEFAULT_RATING.opensC + (edgeF + 1) / 1.8 })).toBe('too-close');
  });
});
