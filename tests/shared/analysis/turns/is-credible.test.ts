import { describe, expect, test } from 'vitest';
import { isCredible } from '#shared/analysis/turns/is-credible.ts';

/** A fit of a peak whose most extreme reading is 58 °C, between swings of 3 and 4 K, in noise of 0.7 K. */
function believed(tempC: number, uK: number, noiseK = 0.7): boolean {
  return isCredible({ tempC, uK, timeS: 100, switched: null }, 58, 3, 4, noiseK);
}

describe('a fit of a turn beside its readings', () => {
  test('is believed near them', () => {
    expect(believed(58.5, 0.5)).toBe(true);
  });

  test('is not believed hundreds of kelvins off, though its swing is no more than noise makes', () => {
    expect(believed(269, 0.5)).toBe(false);
    expect(believed(-150, 0.5)).toBe(false);
  });

  test('is not believed there however sure of itself', () => {
    expect(believed(269, 0.001, 0.05)).toBe(false);
  });

  test('is not believed where it knows less of the turn than its swing', () => {
    expect(believed(58.5, 3.5, 0.05)).toBe(false);
  });
});
