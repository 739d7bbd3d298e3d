import { describe, expect, test } from 'vitest';
import { classAccuracy, classesOf } from '#shared/probes/probe-class.ts';

describe('a class of a probe', () => {
  test.each([
    // IEC 60584-1:2013 and ASTM E230/E230M-12 as suppliers restate them; each pair lies either side of a change-over.
    ['K', 'iec-1', 68.33, 1.5],
    ['K', 'iec-1', 400, 1.6],
    ['K', 'iec-2', 68.33, 2.5],
    ['K', 'iec-2', 400, 3],
    ['K', 'iec-3', -200, 3],
    ['J', 'iec-1', 500, 2],
    ['J', 'iec-2', 333, 2.5],
    ['T', 'iec-1', 68.33, 0.5],
    ['T', 'iec-1', 125, 0.5],
    ['T', 'iec-1', 150, 0.6],
    ['T', 'iec-2', 200, 1.5],
    ['T', 'iec-3', -100, 1.5],
    ['K', 'astm-standard', 100, 2.2],
    ['K', 'astm-standard', 400, 3],
    ['K', 'astm-standard', -200, 4],
    ['K', 'astm-special', 275, 1.1],
    ['K', 'astm-special', 500, 2],
    ['J', 'astm-standard', 100, 2.2],
    ['J', 'astm-special', 100, 1.1],
    ['T', 'astm-standard', 100, 1],
    ['T', 'astm-standard', -100, 1.5],
    ['T', 'astm-special', 200, 0.8],
    // IEC 60751:2008: the sum of both terms.
    ['pt100', 'pt-aa', 100, 0.27],
    ['pt100', 'pt-a', 200, 0.55],
    ['pt100', 'pt-b', 400, 2.3],
    ['pt100', 'pt-b', -100, 0.8],
    ['pt100', 'pt-c', 100, 1.6],
    ['pt100', 'pt-a', (155 - 32) / 1.8, 0.2867],
  ] as const)('%s %s at %d °C: ± %d K', (sensor, name, tempC, halfK) => {
    expect(classAccuracy(sensor, name, tempC)).toBeCloseTo(halfK, 4);
  });

  test('is refused where the sensor has none, or it does not reach', () => {
    expect(() => classAccuracy('J', 'iec-3', 0)).toThrow(RangeError);
    expect(() => classAccuracy('pt100', 'pt-aa', 300)).toThrow(RangeError);
    expect(() => classAccuracy('K', 'iec-1', Number.NaN)).toThrow(RangeError);
  });

  test('belongs to the sensors that its standard names', () => {
    expect(classesOf('J')).toEqual(['iec-1', 'iec-2', 'astm-standard', 'astm-special']);
    expect(classesOf('pt100')).toEqual(['pt-aa', 'pt-a', 'pt-b', 'pt-c']);
  });
});
