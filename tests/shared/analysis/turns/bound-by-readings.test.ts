import { describe, expect, test } from 'vitest';
import { boundByReadings } from '#shared/analysis/turns/bound-by-readings.ts';

const timesS = Float64Array.of(0, 10, 20, 30, 40, 50);

describe('what the readings beside a turn say of it', () => {
  // Up 1 K/s and down 2 K/s: the lines 50 + t and 104 − 2·(t − 24) + … meet at t = 24, 74 °C.
  const peakC = Float64Array.of(50, 60, 70, 62, 42, 22);

  test('a peak lies between the highest reading and where the two lines meet', () => {
    const { lowC, highC } = boundByReadings(timesS, peakC, 2, 1);

    expect(lowC).toBe(70);
    expect(highC).toBeCloseTo(74, 9);
  });

  test('a valley is a peak upside down', () => {
    const { lowC, highC } = boundByReadings(
      timesS,
      peakC.map((tempC) => 100 - tempC),
      2,
      -1,
    );

    expect(lowC).toBeCloseTo(26, 9);
    expect(highC).toBe(30);
  });

  test('beside the record’s end only the reading is known', () => {
    expect(boundByReadings(timesS.slice(0, 3), Float64Array.of(50, 60, 50), 1, 1)).toEqual({
      lowC: 60,
      highC: 60,
    });
  });
});
