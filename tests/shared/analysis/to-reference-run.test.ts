import { describe, expect, test } from 'vitest';
import { toReferenceRun } from '#shared/analysis/to-reference-run.ts';
import { toCelsius } from '#shared/units.ts';
import { cool, cycles, heat, judge, readRun } from './findings/build-run.ts';

const probe = { everyS: 1, stepF: 0.1 };

describe('toReferenceRun', () => {
  const clean = judge(
    readRun([...cycles([155, 155, 155, 155]), heat(155, 90), cool(140, 20)], probe),
  );

  test('gives the middle times and swing of a clean run', () => {
    const reference = toReferenceRun(clean, true);

    // As built: 90 s of heat, 45 s of fall, from 155 to 130 °F.
    expect(reference?.onS).toBeCloseTo(90, -0.5);
    expect(reference?.offS).toBeCloseTo(45, -0.5);
    expect((reference?.swingK ?? 0) * 1.8).toBeCloseTo(25, 0);
    expect(reference?.cycles).toBe(4);
  });

  test('gives a fall that takes as long as the run’s own', () => {
    const fall = toReferenceRun(clean, true)?.fall;

    // First-order from 155 towards 75 °F: 45 s to 130, so τ = 45 / ln(80 / 55), and from 150 to 135 °F τ·ln(75 / 60).
    const tauS = 45 / Math.log(80 / 55);
    const takesS =
      fall &&
      fall.tauS *
        Math.log((toCelsius(150, 'F') - fall.asymptoteC) / (toCelsius(135, 'F') - fall.asymptoteC));
    expect(takesS).toBeCloseTo(tauS * Math.log(75 / 60), 0);
  });

  test('gives no fall where the air went another way', () => {
    expect(toReferenceRun(clean, false)).toMatchObject({ cycles: 4, fall: null });
  });

  test('a run with a fault is no measure', () => {
    const hot = judge(readRun([...cycles([180, 180, 180, 180]), heat(180, 90)], probe));

    expect(hot.findings[0]?.code).toBe('opens-high');
    expect(toReferenceRun(hot, true)).toBeNull();
  });
});
