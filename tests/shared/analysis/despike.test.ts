import fc from 'fast-check';
import { expect, test } from 'vitest';
import { despike } from '#shared/analysis/despike.ts';
import type { Series } from '#shared/analysis/series.ts';
import { buildThermostatRun } from '#tests/support/build-series.ts';

function withReading({ timesS, tempsC }: Series, i: number, tempC: number): Series {
  const changed = tempsC.slice();
  changed[i] = tempC;
  return { timesS, tempsC: changed };
}

const { series } = buildThermostatRun({ noiseK: 0.1 });

test('sets one wild reading aside, up or down, and gives back the others', () => {
  const place = fc.integer({ min: 3, max: series.timesS.length - 4 });
  const offK = fc.oneof(
    fc.double({ min: 8, max: 400, noNaN: true }),
    fc.double({ min: -200, max: -8, noNaN: true }),
  );
  fc.assert(
    fc.property(place, offK, (i, byK) => {
      const cleaned = despike(withReading(series, i, series.tempsC[i]! + byK), 0.1);
      expect(cleaned.spikes).toBe(1);
      expect([...cleaned.series.timesS]).toEqual([...series.timesS].filter((_, k) => k !== i));
    }),
    { numRuns: 60 },
  );
});

test('leaves a clean record as it is', () => {
  const cleaned = despike(series, 0.1);

  expect(cleaned.spikes).toBe(0);
  expect(cleaned.series).toBe(series);
});

test('two readings that agree are no spike', () => {
  const twice = withReading(withReading(series, 300, 120), 301, 120);

  expect(despike(twice, 0.1).spikes).toBe(0);
});

test('two wild readings with one good one between them are both set aside', () => {
  const twice = withReading(withReading(series, 300, 150), 302, 150);

  expect(despike(twice, 0.1).spikes).toBe(2);
});

test('takes a sharp peak between readings 15 s apart for what it is', () => {
  // A saw by hand: one reading on each turn and one on each flank.
  const timesS = Float64Array.from({ length: 40 }, (_, i) => i * 15);
  const tempsC = timesS.map((_, i) => [55, 62, 68, 60][i % 4]!);

  expect(despike({ timesS, tempsC }, 0.2).spikes).toBe(0);
});

test('a wild first or last reading is set aside too', () => {
  const last = series.timesS.length - 1;

  expect(despike(withReading(series, 0, 300), 0.1).spikes).toBe(1);
  expect(despike(withReading(series, last, -80), 0.1).spikes).toBe(1);
});
