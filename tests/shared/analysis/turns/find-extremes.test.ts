import fc from 'fast-check';
import { expect, test } from 'vitest';
import { findExtremes } from '#shared/analysis/turns/find-extremes.ts';

function places(tempsC: number[], thresholdK: number): string[] {
  return findExtremes(Float64Array.from(tempsC), thresholdK).map(
    ({ kind, slot }) => `${kind} ${slot}`,
  );
}

test('finds the extremes that stand out, with the record’s ends', () => {
  const tempsC = [20, 30, 45, 44, 46, 60, 52, 40, 41, 55, 54];

  expect(places(tempsC, 5)).toEqual(['valley 0', 'peak 5', 'valley 7', 'peak 9']);
});

test('a record that starts by falling starts with a peak', () => {
  expect(places([60, 50, 40, 55], 5)).toEqual(['peak 0', 'valley 2', 'peak 3']);
});

test('nothing swings in a record that keeps under the threshold', () => {
  expect(places([20, 21, 20, 22, 21], 5)).toEqual([]);
});

test('extremes alternate, and every swing between them reaches the threshold', () => {
  const temps = fc.array(fc.double({ min: 0, max: 100, noNaN: true }), { maxLength: 80 });
  fc.assert(
    fc.property(temps, fc.double({ min: 0.5, max: 40, noNaN: true }), (tempsC, thresholdK) => {
      const found = findExtremes(Float64Array.from(tempsC), thresholdK);
      for (let i = 1; i < found.length; i++) {
        expect(found[i]!.kind).not.toBe(found[i - 1]!.kind);
        const swing = Math.abs(found[i]!.tempC - found[i - 1]!.tempC);
        expect(swing).toBeGreaterThanOrEqual(thresholdK);
      }
    }),
  );
});
