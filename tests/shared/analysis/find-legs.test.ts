import { expect, test } from 'vitest';
import { gatherFacts } from '#shared/analysis/gather-facts.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { buildSeries, thermostatLegs } from '#tests/support/build-series.ts';
import { plainInput } from './plain-input.ts';

const CLEAN = {
  startC: 22,
  legs: thermostatLegs({ cycles: 4 }),
  lagS: 4,
  spacingS: 1,
  noiseK: 0.02,
};

test('legs are fitted with the asymptotes and time constants that they were made with', () => {
  const { legs } = gatherFacts(buildSeries(CLEAN).series, plainInput());

  // thermostatLegs heads for 92 °C with 220 s from cold and 120 s later, and for 25 °C with 110 s.
  const expected = {
    heating: { asymptoteC: 92, tauS: 120 },
    cooling: { asymptoteC: 25, tauS: 110 },
  };
  for (const { kind, fit, fromCold, to } of legs) {
    if (to.turnedBy === 'end') continue;
    const tauS = fromCold ? 220 : expected[kind].tauS;
    expect(Math.abs(fit!.asymptoteC - expected[kind].asymptoteC)).toBeLessThan(
      4 * fit!.asymptoteErrorK + 0.5,
    );
    expect(Math.abs(fit!.tauS - tauS)).toBeLessThan(4 * fit!.tauErrorS + 2);
  }
});

test('there is one leg between each extreme and the next, and only the first starts from cold', () => {
  const { legs, extremes, coldStart } = gatherFacts(buildSeries(CLEAN).series, plainInput());

  expect(legs).toHaveLength(extremes.length - 1);
  expect(coldStart).toBe(true);
  expect(legs.map(({ fromCold }) => fromCold).filter(Boolean)).toHaveLength(1);
  expect(legs[0]!.fromCold).toBe(true);
  for (const { knee } of legs) expect(knee).toBeNull();
});

test('a leg with readings missing says so', () => {
  const { series, turns } = buildSeries(CLEAN);
  const holeS = (turns[1]!.timeS + turns[2]!.timeS) / 2;
  const kept = [...series.timesS.keys()].filter((i) => Math.abs(series.timesS[i]! - holeS) > 6);

  const facts = gatherFacts(
    {
      timesS: Float64Array.from(kept, (i) => series.timesS[i]!),
      tempsC: Float64Array.from(kept, (i) => series.tempsC[i]!),
    },
    plainInput({ rating: DEFAULT_RATING }),
  );

  expect(facts.gaps).toHaveLength(1);
  expect(facts.legs.map(({ hasGap }) => hasGap).indexOf(true)).toBe(2);
});
