import { expect, test } from 'vitest';
import { pt100Ohm, pt100Temp } from '#shared/probes/pt100.ts';
import { PT100_TABLE } from '#tests/fixtures/published/pt100-table.ts';

test('a Pt100 lies on the table of IEC 60751 to its last digit', () => {
  for (const [tempC, ohm] of PT100_TABLE) {
    expect(Math.abs(pt100Ohm(tempC) - ohm)).toBeLessThan(0.005001);
  }
});

test.each([
  // Recomputed from the published coefficients: the older IPTS-68 ones differ in the second decimal at 100 °C.
  [-200, 18.5201],
  [-30, 88.2217],
  [100, 138.5055],
  [850, 390.4811],
  [(155 - 32) / 1.8, 126.437056],
  [(250 - 32) / 1.8, 146.486784],
])('a Pt100 at %d °C has %d ohm', (tempC, ohm) => {
  expect(pt100Ohm(tempC)).toBeCloseTo(ohm, 4);
});

test('the quadratic is solved as published', () => {
  expect(pt100Temp(119.4)).toBeCloseTo(50.00747, 5);
  expect(pt100Temp(138.51)).toBeCloseTo(100.01186, 5);
});

test('a temperature comes back from its resistance on both branches', () => {
  for (let tempC = -200; tempC <= 850; tempC += 1.7) {
    expect(pt100Temp(pt100Ohm(tempC))).toBeCloseTo(tempC, 9);
  }
});

test.each([-200.1, 850.1, Number.NaN])('a Pt100 refuses %d °C', (tempC) => {
  expect(() => pt100Ohm(tempC)).toThrow(RangeError);
});

test.each([18.5, 390.5, Number.NaN])('a Pt100 refuses %d ohm', (ohm) => {
  expect(() => pt100Temp(ohm)).toThrow(RangeError);
});
