import { describe, expect, test } from 'vitest';
import { cutOutTrend } from '#shared/analysis/findings/cut-out-trend.ts';
import { findDrifting } from '#shared/analysis/findings/drifting.ts';
import { findScattered } from '#shared/analysis/findings/scattered.ts';
import { buildFacts, turnsAt } from './build-facts.ts';

/** The first, from cold, is not judged: whatever it is. */
const after = (judgedF: number[], uF = 0.2) =>
  buildFacts(turnsAt([170, ...judgedF], 130).map((turn) => ({ ...turn, uF })));

describe('the line through judged cut-outs', () => {
  test('leaves the first from cold out', () => {
    expect(cutOutTrend(after([155, 155, 155, 155]))).toMatchObject({ cutOuts: 4, totalK: 0 });
  });

  test('of 152, 155, 154, 157, 159 °F has the slope and standard error of least squares', () => {
    const trend = cutOutTrend(after([152, 155, 154, 157, 159], 0))!;

    // By hand: Sxx = 10, Sxy = 16, slope 1.6 °F; residuals −0.2, 1.2, −1.4, 0, 0.4 → squares 3.6, s = √(3.6/3).
    expect(trend.slopePerCycleK).toBeCloseTo(1.6 / 1.8, 9);
    expect(trend.slopeErrorK).toBeCloseTo(Math.sqrt(1.2 / 10) / 1.8, 9);
    // t = 4.6188 with 3 degrees, two-sided, by the closed form of Student's t for 3 degrees (DLMF 8.17):
    // p = 1 − (2/π)(θ + sin θ cos θ), θ = arctan(t/√3).
    const angle = Math.atan(1.6 / Math.sqrt(0.12) / Math.sqrt(3));
    const p = 1 - (2 / Math.PI) * (angle + Math.sin(angle) * Math.cos(angle));
    expect(trend.pValue).toBeCloseTo(p, 8);
  });

  test('is none through three points', () => {
    expect(cutOutTrend(after([150, 155, 160]))).toBeNull();
  });

  test('counts the points’ own uncertainty where they happen to lie on a line', () => {
    const trend = cutOutTrend(after([150, 152, 154, 156], 6))!;

    // Own standard deviation 3 °F over √Sxx = √5.
    expect(trend.slopeErrorK).toBeCloseTo(3 / 1.8 / Math.sqrt(5), 9);
    expect(trend.ownSdK).toBe(0);
  });
});

describe('drifting', () => {
  // The tolerance is 5 °F: four judged cut-outs move by three steps in all.
  test.each([
    [1.6, undefined],
    [1.7, 'drifting'],
    [-1.7, 'drifting'],
  ])('by %s °F a cycle over four judged cut-outs is %s', (stepF, code) => {
    const judgedF = [0, 1, 2, 3].map((i) => 155 + i * stepF);

    expect(findDrifting(after(judgedF))?.code).toBe(code);
  });

  test('is not said of points that are worse known than they move', () => {
    expect(findDrifting(after([150, 152, 154, 156], 6))).toBeNull();
  });

  test('needs a rating', () => {
    const facts = after([150, 154, 158, 162]);

    expect(findDrifting({ ...facts, input: { ...facts.input, rating: null } })).toBeNull();
  });
});

describe('scattered', () => {
  // Of 155 ± d in the order + − − +, the line is level and s² = 4d²/2, so s = d·√2.
  test.each([
    [2.8, undefined],
    [2.9, 'scattered'],
  ])('cut-outs %s °F to either side, s = √2 of it against 4: %s', (dF, code) => {
    const judgedF = [155 + dF, 155 - dF, 155 - dF, 155 + dF];

    expect(findScattered(after(judgedF, 0))?.code).toBe(code);
  });

  test('takes the points’ own uncertainty off first', () => {
    const judgedF = [158, 152, 152, 158];

    // s² = 18 °F²; own (U/2)² = 2.25 leaves s = 3.97 °F, under 4.
    expect(findScattered(after(judgedF, 3))).toBeNull();
    expect(findScattered(after(judgedF, 1))?.evidence.sdK).toBeCloseTo(Math.sqrt(17.75) / 1.8, 9);
  });

  test('a steady climb does not scatter', () => {
    expect(findScattered(after([140, 150, 160, 170]))).toBeNull();
  });
});
