import { describe, expect, test } from 'vitest';
import {
  boilingPointC,
  boilingSlopeKPerHPa,
  saturationTempK,
  standardPressureHPa,
} from '#shared/probes/boiling-point.ts';

describe('the boiling point of water', () => {
  test.each([
    // IAPWS R7-97(2012), table 36: values for the verification of programs.
    [0.1, 372.755919],
    [1, 453.035632],
    [10, 584.149488],
  ])('at %d MPa is %d K', (pressureMPa, tempK) => {
    expect(Math.abs(saturationTempK(pressureMPa) - tempK)).toBeLessThan(5.001e-7);
  });

  test('is 99.97 °C at a standard atmosphere', () => {
    // ITS-90: 99.974 °C at 101 325 Pa (from memory).
    expect(boilingPointC(1013.25)).toBeCloseTo(99.974, 2);
  });

  test('falls by about a third of a kelvin for a hundred metres', () => {
    // 1 K for about 36 hPa near sea level (common practice).
    expect(1 / boilingSlopeKPerHPa(1013.25)).toBeCloseTo(36, 0);
    expect(boilingPointC(1013.25) - boilingPointC(standardPressureHPa(1000))).toBeCloseTo(3.3, 1);
  });

  test.each([499, 1101, Number.NaN])('is refused at %d hPa', (pressureHPa) => {
    expect(() => boilingPointC(pressureHPa)).toThrow(RangeError);
  });

  test('is refused beyond the saturation line', () => {
    expect(() => saturationTempK(22.1)).toThrow(RangeError);
    expect(() => saturationTempK(0.0006)).toThrow(RangeError);
  });
});

describe('the usual pressure at an altitude', () => {
  test.each([
    // The standard atmosphere of ISO 2533 (table values from memory), hPa.
    [0, 1013.25],
    [500, 954.61],
    [1000, 898.76],
    [2000, 795.01],
    [3000, 701.21],
  ])('%d m: %d hPa', (altitudeM, pressureHPa) => {
    expect(Math.abs(standardPressureHPa(altitudeM) - pressureHPa)).toBeLessThan(0.15);
  });

  test.each([-401, 5001, Number.NaN])('is refused at %d m', (altitudeM) => {
    expect(() => standardPressureHPa(altitudeM)).toThrow(RangeError);
  });
});
