import { expect, test } from 'vitest';
import { binRecord } from '#shared/analysis/bin-record.ts';
import { buildThermostatRun, seededNormal } from '#tests/support/build-series.ts';

test('a quick probe is averaged into slots of half a second', () => {
  const { series } = buildThermostatRun({ spacingS: 0.05, cycles: 2 });

  const view = binRecord(series, 0.05, 0.01, 2);

  expect(view.widthS).toBe(0.5);
  const slots = series.timesS.at(-1)! / 0.5;
  expect(Math.abs(view.timesS.length - slots)).toBeLessThanOrEqual(1);
  const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);
  const wholeMean = sum(series.tempsC) / series.tempsC.length;
  expect(sum(view.tempsC) / view.tempsC.length).toBeCloseTo(wholeMean, 1);
});

test('a slow probe is left as it is', () => {
  const { series } = buildThermostatRun({ spacingS: 2 });

  const view = binRecord(series, 2, 0.01, 2);

  expect(view.timesS).toBe(series.timesS);
  expect(view.smoothC).toBe(series.tempsC);
});

test('noise that could make swings is smoothed to what it says', () => {
  const normal = seededNormal(3);
  const timesS = Float64Array.from({ length: 4000 }, (_, i) => i);
  const tempsC = timesS.map(() => 60 + normal());

  const view = binRecord({ timesS, tempsC }, 1, 1, 2.2);

  let squares = 0;
  for (const tempC of view.smoothC) squares += (tempC - 60) ** 2;
  const sd = Math.sqrt(squares / view.smoothC.length);
  expect(sd / view.smoothNoiseK).toBeGreaterThan(0.9);
  expect(sd / view.smoothNoiseK).toBeLessThan(1.15);
});

test('smoothing does not reach over a gap', () => {
  const timesS = Float64Array.from({ length: 200 }, (_, i) => (i < 100 ? i : i + 600));
  const tempsC = timesS.map((timeS) => (timeS < 300 ? 40 : 70));

  const { smoothC } = binRecord({ timesS, tempsC }, 1, 2, 2.2);

  expect(Math.max(...smoothC.slice(0, 100))).toBe(40);
  expect(Math.min(...smoothC.slice(100))).toBe(70);
});
