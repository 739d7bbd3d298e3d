import { describe, expect, test } from 'vitest';
import {
  thermocoupleEmf,
  thermocoupleTemp,
  thermocoupleTempWithTerminals,
} from '#shared/probes/thermocouple.ts';
import { THERMOCOUPLE_TYPES, THERMOCOUPLES } from '#shared/probes/thermocouple-functions.ts';
import { polynomial } from '#shared/probes/polynomial.ts';
import { THERMOCOUPLE_TABLE } from '#tests/fixtures/published/thermocouple-tables.ts';

describe('the voltage of a thermocouple', () => {
  test.each(THERMOCOUPLE_TYPES)('type %s lies on the published table to its last digit', (type) => {
    const column = 1 + THERMOCOUPLE_TYPES.indexOf(type);
    for (const row of THERMOCOUPLE_TABLE) {
      // Half of the table's last digit.
      expect(Math.abs(thermocoupleEmf(type, row[0]) - row[column]!)).toBeLessThan(0.0005001);
    }
  });

  test.each([
    // Recomputed from the published functions at the °F settings of a dryer, and seen in another's documentation
    // (pypi.org/project/thermocouples_reference: K at 42, 54 and −3.14159 °C).
    ['K', 42, 1.6938477049901346, 12],
    ['K', 54, 2.18822176, 8],
    ['K', -3.14159, -0.12369326, 8],
    ['K', (155 - 32) / 1.8, 2.782055, 6],
    ['J', (155 - 32) / 1.8, 3.560331, 6],
    ['T', (155 - 32) / 1.8, 2.834871, 6],
    ['K', (250 - 32) / 1.8, 4.96539, 6],
    ['J', (250 - 32) / 1.8, 6.421161, 6],
    ['T', (250 - 32) / 1.8, 5.282038, 6],
  ] as const)('type %s at %d °C is %d mV', (type, tempC, emfMV, digits) => {
    expect(thermocoupleEmf(type, tempC)).toBeCloseTo(emfMV, digits);
  });

  test.each([
    ['K', -200, -5.891],
    ['K', 1372, 54.886],
    ['J', -210, -8.095],
    ['J', 760, 42.919],
    ['T', -200, -5.603],
    ['T', 400, 20.872],
  ] as const)('type %s at the far end of %d °C is %d mV', (type, tempC, emfMV) => {
    // NIST SRD 60; the ends of J and T above 0 °C stand in the published inverse ranges, the others from memory.
    expect(Math.abs(thermocoupleEmf(type, tempC) - emfMV)).toBeLessThan(0.0005001);
  });
});

describe('the temperature of a thermocouple', () => {
  test.each(THERMOCOUPLE_TYPES)('type %s comes back from its voltage to a billionth', (type) => {
    const { pieces } = THERMOCOUPLES[type];
    const high = pieces.at(-1)!.toC;
    for (let tempC = -200; tempC <= high; tempC += 0.73) {
      expect(thermocoupleTemp(type, thermocoupleEmf(type, tempC))).toBeCloseTo(tempC, 8);
    }
  });

  test.each([
    // Errors that NIST states for its inverse polynomials over these ranges, °C.
    ['K', -0.05, 0.04],
    ['J', -0.04, 0.04],
    ['T', -0.03, 0.03],
  ] as const)(
    'type %s agrees with the published inverse within its stated error',
    (type, low, high) => {
      const { coefficients } = THERMOCOUPLES[type].inverse;
      for (let tempC = 0; tempC <= 400; tempC += 0.5) {
        const error = polynomial(coefficients, thermocoupleEmf(type, tempC)) - tempC;
        expect(error).toBeGreaterThan(low);
        expect(error).toBeLessThan(high);
      }
    },
  );

  test('is found by adding voltages where the terminals are warm, not temperatures', () => {
    // pypi.org/project/thermocouple-its90: K, 4.096 mV with terminals at 25 °C is 124.3 °C; adding 25 gives 125.0.
    expect(thermocoupleTempWithTerminals('K', 4.096, 25)).toBeCloseTo(124.30995, 4);
    // pypi.org/project/thermocouples_reference: K, 1.1 mV with terminals at 23 °C.
    expect(thermocoupleTempWithTerminals('K', 1.1, 23)).toBeCloseTo(49.907928030075773, 8);
    expect(thermocoupleTempWithTerminals('K', 1.9032, 22)).toBeCloseTo((155 - 32) / 1.8, 4);
  });
});

describe('what no thermocouple gives', () => {
  test.each([
    ['K', -270.1],
    ['K', 1372.1],
    ['J', 760.1],
    ['T', 400.1],
    ['T', Number.NaN],
  ] as const)('type %s refuses %d °C', (type, tempC) => {
    expect(() => thermocoupleEmf(type, tempC)).toThrow(RangeError);
  });

  test.each([
    ['K', 54.9],
    ['J', -8.1],
    ['T', 20.9],
    ['K', Number.NaN],
  ] as const)('type %s refuses %d mV', (type, emfMV) => {
    expect(() => thermocoupleTemp(type, emfMV)).toThrow(RangeError);
  });
});
