import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import { fitLeg } from '#shared/analysis/fit-leg.ts';
import type { Series } from '#shared/analysis/series.ts';

// Records of heated things measured by others; not part of the project, so skipped where they are absent.
const FOLDER = resolve('../shared/data');
const PROBE = { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null };

function lines(file: string): string[] {
  return readFileSync(`${FOLDER}/${file}`, 'utf8').split(/\r?\n/).filter(Boolean);
}

/** Sorted by time, one reading a stamp. */
function toSeries(rows: [number, number][]): Series {
  const sorted = rows
    .filter(([timeS, tempC]) => Number.isFinite(timeS + tempC))
    .sort((a, b) => a[0] - b[0])
    .filter(([timeS], i, all) => i === 0 || timeS > all[i - 1]![0]);
  return {
    timesS: Float64Array.from(sorted, ([timeS]) => timeS - sorted[0]![0]),
    tempsC: Float64Array.from(sorted, ([, tempC]) => tempC),
  };
}

function waterBath(file: string): Series {
  const rows = lines(file)
    .slice(1)
    .map((line): [number, number] => {
      const cells = line.split(',');
      return [Date.parse(cells[5]!) / 1000, Number(cells[1])];
    });
  return toSeries(rows);
}

describe.skipIf(!existsSync(FOLDER))('real records (skipped: ../shared/data is absent)', () => {
  test.each([
    // Their notes count 31, 10 and 16 peaks by eye on swings of about half a kelvin.
    ['sousvide-70.csv', 31],
    ['sousvide-60.csv', 10],
    ['sousvide-53.csv', 16],
  ])('%s: a water bath on a relay has about %i peaks', (file, peaks) => {
    const { cutOuts } = findTurnsOnly(waterBath(file), 0.3, PROBE);

    expect(Math.abs(cutOuts.length - peaks)).toBeLessThanOrEqual(Math.ceil(0.1 * peaks));
  });

  test('a heated plate’s step has the time constant that its reference fit has', () => {
    const rows = lines('step-halogen.csv').map((line): [number, number] => {
      const [timeS, , tempC] = line.trim().split(/\s+/).map(Number) as [number, number, number];
      return [timeS, tempC];
    });
    const { timesS, tempsC } = toSeries(rows);

    // The reference: step from 0 to 400 s, T∞ = 189.922 °C, τ = 62.61 s, rmse 1.763 K.
    const fit = fitLeg(timesS, tempsC, { fromS: 0, toS: 400, guessTauS: null })!;

    expect(Math.abs(fit.asymptoteC - 189.922)).toBeLessThan(3);
    expect(Math.abs(fit.tauS / 62.61 - 1)).toBeLessThan(0.25);
  });
});
