import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { chooseGridSteps } from '#client/chart/grid-steps.ts';
import { frameOf, PHONE_PLOT } from './frame-of.ts';

describe('the ruling of the paper', () => {
  // The steps are the form's own: 10 s × 2 °F and 60 s × 10 °F on a desk, 30 s × 5 °F on a phone.
  test('a desk has ten seconds and two degrees, ruled heavier each minute and ten degrees', () => {
    expect(chooseGridSteps(frameOf())).toMatchObject({
      minorS: 10,
      majorS: 60,
      labelS: 60,
      holeS: 60,
      minorDeg: 2,
      majorDeg: 10,
      labelDeg: 10,
    });
  });

  test('a phone has thirty seconds and five degrees', () => {
    const steps = chooseGridSteps(frameOf({ compact: true, plot: PHONE_PLOT }));

    expect(steps).toMatchObject({ minorS: 30, majorS: 60, labelS: 120, holeS: 60, labelDeg: 20 });
    expect(steps.minorDeg * (PHONE_PLOT.height / 144)).toBeGreaterThanOrEqual(4);
  });

  test('in °C the scale is ruled in one and five degrees', () => {
    expect(chooseGridSteps(frameOf({ unit: 'C' }))).toMatchObject({ minorDeg: 1, majorDeg: 5 });
  });

  test('minor lines never fall closer than 4 px, and major lines lie on minor ones', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 4, max: 86_400, noNaN: true }),
        fc.double({ min: 150, max: 3000, noNaN: true }),
        (spanS, width) => {
          const frame = frameOf({ toS: spanS, plot: { ...frameOf().plot, width } });

          const { minorS, majorS } = chooseGridSteps(frame);

          if (minorS < 21_600) expect((minorS * width) / spanS).toBeGreaterThanOrEqual(4);
          expect(majorS % minorS).toBe(0);
        },
      ),
    );
  });
});
