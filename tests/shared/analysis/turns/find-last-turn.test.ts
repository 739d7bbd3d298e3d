import { describe, expect, test } from 'vitest';
import { prepareRecord } from '#shared/analysis/gather-facts.ts';
import type { Series } from '#shared/analysis/series.ts';
import { buildSeries, buildThermostatRun } from '#tests/support/build-series.ts';

const SWING_K = 4 / 1.8;

/** A run at 10 s, cut off so long after its fourth turn (a reset). */
function endedAfter(seed: number, afterS: number): { series: Series; lastS: number } {
  const { series, turns } = buildThermostatRun({ spacingS: 10, noiseK: 0.1, seed });
  const lastS = turns[3]!.timeS;
  const kept = series.timesS.filter((timeS) => timeS <= lastS + afterS).length;
  return {
    series: { timesS: series.timesS.slice(0, kept), tempsC: series.tempsC.slice(0, kept) },
    lastS,
  };
}

function turnsOf(series: Series) {
  return prepareRecord(series, SWING_K).extremes.filter(({ turnedBy }) => turnedBy === 'machine');
}

describe('a record that ends just after a turn', () => {
  test.each([1, 2, 3])('shows the reset that one or two readings tell of (seed %i)', (seed) => {
    // The last reading, 9.4 s after the turn, is 1.3 K above it; the swing is complete (2.2 K) some 3 s later.
    const { series, lastS } = endedAfter(seed, 17);

    const turns = turnsOf(series);

    expect(turns).toHaveLength(4);
    expect(Math.abs(turns[3]!.timeS - lastS)).toBeLessThan(8);
  });

  test.each([1, 2, 3])('shows none while the exhaust still falls (seed %i)', (seed) => {
    const { series } = endedAfter(seed, -12);

    expect(turnsOf(series)).toHaveLength(3);
  });

  test('does not take one wild last reading for a turn', () => {
    const { series } = endedAfter(1, -12);
    const tempsC = Float64Array.from(series.tempsC);
    tempsC[tempsC.length - 1]! += 6;

    expect(turnsOf({ ...series, tempsC })).toHaveLength(3);
  });

  test.each([1, 2, 3, 4])('shows none in the level minutes after a last fall (seed %i)', (seed) => {
    // Heat that stays on: 146 to 155 °F and no way down, as a coil on its box holds the exhaust.
    const legs = [
      { asymptoteC: 90, tauS: 120, untilC: 68 },
      { asymptoteC: 60, tauS: 15, untilC: 63 },
      { asymptoteC: 68.3, tauS: 160, untilC: 68.299 },
    ];
    const { series } = buildSeries({
      startC: 21,
      legs,
      lagS: 2,
      spacingS: 0.5,
      noiseK: 0.1,
      seed,
    });

    expect(turnsOf(series)).toHaveLength(2);
    const highestC = series.tempsC.reduce((most, tempC) => Math.max(most, tempC));
    for (const { tempC } of prepareRecord(series, SWING_K).extremes) {
      expect(tempC).toBeGreaterThan(20);
      expect(tempC).toBeLessThan(highestC + 1);
    }
  });
});
