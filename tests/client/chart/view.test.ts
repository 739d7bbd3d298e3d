import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { clampView, isWhole, moveView, showTime, wholeView, zoomView } from '#client/chart/view.ts';

const view = fc
  .record({
    durationS: fc.double({ min: 10, max: 100_000, noNaN: true }),
    from: fc.double({ min: 0, max: 0.9, noNaN: true }),
    share: fc.double({ min: 0.05, max: 1, noNaN: true }),
  })
  .map(({ durationS, from, share }) => ({
    durationS,
    view: clampView({ fromS: from * durationS, toS: (from + share) * durationS }, durationS),
  }));

describe('the view', () => {
  test('never leaves the record, whatever is done to it', () => {
    fc.assert(
      fc.property(
        view,
        fc.double({ min: 0.001, max: 1000, noNaN: true }),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        ({ view, durationS }, factor, byS) => {
          const moved = moveView(zoomView(view, factor, view.fromS, durationS), byS, durationS);

          expect(moved.fromS).toBeGreaterThanOrEqual(-1e-6);
          expect(moved.toS).toBeLessThanOrEqual(durationS + 1e-6 * durationS);
          expect(moved.toS).toBeGreaterThan(moved.fromS);
        },
      ),
    );
  });

  test('the time under the finger stays there while zooming in', () => {
    const zoomed = zoomView({ fromS: 0, toS: 1000 }, 0.5, 250, 1000);

    expect(zoomed).toEqual({ fromS: 125, toS: 625 });
    expect((250 - zoomed.fromS) / 500).toBe(0.25);
  });

  test('moving keeps its length and stops at the ends', () => {
    expect(moveView({ fromS: 100, toS: 300 }, -500, 1000)).toEqual({ fromS: 0, toS: 200 });
    expect(moveView({ fromS: 100, toS: 300 }, 5000, 1000)).toEqual({ fromS: 800, toS: 1000 });
  });

  test('a time out of sight is brought in by the least move', () => {
    expect(showTime({ fromS: 100, toS: 300 }, 350, 1000)).toEqual({ fromS: 150, toS: 350 });
    expect(showTime({ fromS: 100, toS: 300 }, 250, 1000)).toEqual({ fromS: 100, toS: 300 });
  });

  test('the whole run is known as such', () => {
    expect(isWhole(wholeView(1082), 1082)).toBe(true);
    expect(isWhole({ fromS: 0, toS: 900 }, 1082)).toBe(false);
  });
});
