import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { prepareRecord } from '#shared/analysis/gather-facts.ts';
import type { Extreme } from '#shared/analysis/run-facts.ts';
import type { Series } from '#shared/analysis/series.ts';
import { toKelvinStep } from '#shared/units.ts';
import {
  buildSeries,
  buildThermostatRun,
  seededNormal,
  type BuildOptions,
  type BuiltTurn,
} from '#tests/support/build-series.ts';
import { buildTwoPacedRun } from '#tests/support/build-two-paced-run.ts';

const SWING_K = toKelvinStep(4, 'F');

function turnsOf(series: Series): Extreme[] {
  return prepareRecord(series, SWING_K).extremes.filter(({ turnedBy }) => turnedBy === 'machine');
}

function kinds(turns: { kind: string }[]): string {
  return turns.map(({ kind }) => kind[0]).join('');
}

/** Errors of located turns against the closed form, where there is one for each. */
function errorsOf(found: Extreme[], turns: BuiltTurn[]) {
  expect(kinds(found)).toBe(kinds(turns));
  return found.map((extreme, i) => ({
    timeS: Math.abs(extreme.timeS - turns[i]!.timeS),
    tempK: Math.abs(extreme.tempC - turns[i]!.tempC),
    isCovered: Math.abs(extreme.tempC - turns[i]!.tempC) <= extreme.uK,
    switchS: Math.abs((extreme.switched?.timeS ?? Infinity) - turns[i]!.switchTimeS),
  }));
}

function medianOf(values: number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
}

describe('turning points against turns known in closed form', () => {
  // One lag alone is the furthest from the three that are believed in, which shows in the switch instants (last column, s).
  test.each<[string, Partial<BuildOptions>, number, number]>([
    ['a quick probe', { spacingS: 0.2, noiseK: 0.1 }, 0.05, 1],
    ['a probe at 1 s', { spacingS: 1, noiseK: 0.1 }, 0.05, 1],
    ['a probe at 2 s', { spacingS: 2, noiseK: 0.15 }, 0.1, 1.2],
    ['a probe at 5 s', { spacingS: 5, noiseK: 0.15 }, 0.15, 2.6],
    ['a coarse scale', { spacingS: 1, noiseK: 0.1, roundingK: 1 / 1.8 }, 0.12, 1.6],
    ['a noisy probe', { spacingS: 1, noiseK: 0.85 }, 0.3, 2.5],
    ['a stopwatch', { spacingS: 15, noiseK: 0.2, roundingK: 0.5 / 1.8 }, 0.35, 5],
  ])('%s finds all of them, near their temperatures', (_, options, mostK, mostS) => {
    for (const seed of [3, 4]) {
      const { series, turns } = buildThermostatRun({ ...options, seed });

      const errors = errorsOf(turnsOf(series), turns);

      expect(medianOf(errors.map(({ tempK }) => tempK))).toBeLessThan(mostK);
      expect(medianOf(errors.map(({ switchS }) => switchS))).toBeLessThan(mostS);
    }
  });

  test('the stated uncertainty covers the error about 95 times in 100', () => {
    let covered = 0;
    let all = 0;
    for (let seed = 1; seed <= 12; seed++) {
      const noiseK = [0.06, 0.2, 0.5][seed % 3]!;
      const { series, turns } = buildThermostatRun({ spacingS: 2, noiseK, seed });
      for (const { isCovered } of errorsOf(turnsOf(series), turns)) {
        all++;
        if (isCovered) covered++;
      }
    }

    // Three standard deviations of a binomial share at n = 132, p = 0.95.
    expect(covered / all).toBeGreaterThan(0.89);
  });

  test('readings lost round a turn leave it found, with more uncertainty', () => {
    const { series, turns } = buildThermostatRun({ noiseK: 0.1 });
    const { timeS } = turns[4]!;
    const kept = [...series.timesS.keys()].filter((i) => Math.abs(series.timesS[i]! - timeS) > 8);
    const torn = {
      timesS: Float64Array.from(kept, (i) => series.timesS[i]!),
      tempsC: Float64Array.from(kept, (i) => series.tempsC[i]!),
    };

    const whole = turnsOf(series);
    const found = turnsOf(torn);

    expect(errorsOf(found, turns)[4]!.timeS).toBeLessThan(3);
    expect(found[4]!.uK).toBeGreaterThan(whole[4]!.uK);
  });
});

describe('a stopwatch and few readings a cycle', () => {
  const legs: BuildOptions['legs'] = [{ asymptoteC: 92, tauS: 220, untilC: 62 }];
  for (let i = 0; i < 12; i++) {
    legs.push({ asymptoteC: 25, tauS: 110, untilC: 50 }, { asymptoteC: 92, tauS: 110, untilC: 62 });
  }
  legs.push({ asymptoteC: 25, tauS: 110, untilC: 49 });
  const swingK = 62 - 50;

  // 16 s is left out: there each cycle of 80 s is read at the same five places, and nothing shows what lies between.
  test.each([13, 15, 17, 18])(
    'at %i s no uncertainty is wilder than half a swing, and most cover',
    (spacingS) => {
      let covered = 0;
      let all = 0;
      for (let seed = 1; seed <= 8; seed++) {
        const options = { startC: 22, legs, lagS: 3, spacingS, noiseK: 0.1, roundingK: 0.5 / 1.8 };
        const { series, turns } = buildSeries({ ...options, seed });
        for (const { timeS, tempC, uK } of turnsOf(series)) {
          const near = [...turns].sort(
            (a, b) => Math.abs(a.timeS - timeS) - Math.abs(b.timeS - timeS),
          );
          expect(uK).toBeLessThan(0.55 * swingK);
          all++;
          if (Math.abs(tempC - near[0]!.tempC) <= uK) covered++;
        }
      }

      expect(all).toBeGreaterThan(100);
      expect(covered / all).toBeGreaterThan(0.88);
    },
  );
});

test('legs of two time constants, which no fit of first-order ones follows, are still covered', () => {
  let covered = 0;
  let all = 0;
  for (let seed = 1; seed <= 6; seed++) {
    const { series, turnsC } = buildTwoPacedRun(seed);
    for (const [i, { tempC, uK }] of turnsOf(series).entries()) {
      all++;
      if (Math.abs(tempC - turnsC[i]!) <= uK) covered++;
    }
  }

  expect(all).toBe(6 * 9);
  // Three standard deviations of a binomial share at n = 54, p = 0.95.
  expect(covered / all).toBeGreaterThan(0.86);
});

describe('what is no turning point', () => {
  const { series, turns } = buildThermostatRun({ noiseK: 0.1 });

  test('noise on a plateau', () => {
    const normal = seededNormal(9);
    const timesS = Float64Array.from({ length: 3000 }, (_, i) => i);
    const tempsC = timesS.map((timeS) => 70 - 50 * Math.exp(-timeS / 200) + 0.85 * normal());

    expect(turnsOf({ timesS, tempsC })).toEqual([]);
  });

  test('one wild reading', () => {
    const spiked = { timesS: series.timesS, tempsC: series.tempsC.slice() };
    spiked.tempsC[150] = 250;
    spiked.tempsC[700] = -40;

    expect(kinds(turnsOf(spiked))).toBe(kinds(turns));
  });

  test('a burst of pulses under the threshold', () => {
    const pulsed = {
      timesS: series.timesS,
      tempsC: series.tempsC.map((tempC, i) => tempC + (i < 180 ? 0.6 * Math.sin(i / 3) : 0)),
    };

    expect(kinds(turnsOf(pulsed))).toBe(kinds(turns));
  });

  test('the record’s ends', () => {
    const { extremes } = prepareRecord(series, SWING_K);

    expect(extremes[0]).toMatchObject({ kind: 'valley', turnedBy: 'start' });
    expect(extremes.at(-1)).toMatchObject({ kind: 'valley', turnedBy: 'end' });
  });

  test('an empty record, one reading, two readings', () => {
    for (const temps of [[], [20], [20, 60]]) {
      const tempsC = Float64Array.from(temps);
      const timesS = tempsC.map((_, i) => i);
      expect(turnsOf({ timesS, tempsC })).toEqual([]);
    }
  });
});

describe('what must not change the turns', () => {
  const { series } = buildThermostatRun({ noiseK: 0.1, cycles: 3 });
  const before = turnsOf(series);

  test('slow drift does not hide cycles', () => {
    const drifting = {
      timesS: series.timesS,
      tempsC: series.tempsC.map((tempC, i) => tempC + 0.01 * i),
    };

    expect(kinds(turnsOf(drifting))).toBe(kinds(before));
  });

  test('another start of the clock, another zero and another scale of time', () => {
    const shift = fc.integer({ min: -20, max: 40 });
    const stretch = fc.constantFrom(0.7, 1, 1.6, 3);
    fc.assert(
      fc.property(shift, shift, stretch, (byS, byK, factor) => {
        const moved = turnsOf({
          timesS: series.timesS.map((timeS) => factor * timeS + byS),
          tempsC: series.tempsC.map((tempC) => tempC + byK),
        });
        expect(kinds(moved)).toBe(kinds(before));
        moved.forEach((extreme, i) => {
          expect(Math.abs(extreme.tempC - byK - before[i]!.tempC)).toBeLessThan(0.03);
          expect(Math.abs((extreme.timeS - byS) / factor - before[i]!.timeS)).toBeLessThan(0.6);
        });
      }),
      { numRuns: 8 },
    );
  });

  test('a record and its mirror image have the same turns', () => {
    const mirrored = turnsOf({
      timesS: series.timesS,
      tempsC: series.tempsC.map((tempC) => 120 - tempC),
    });

    expect(mirrored.map(({ kind }) => kind)).toEqual(
      before.map(({ kind }) => (kind === 'peak' ? 'valley' : 'peak')),
    );
    mirrored.forEach((extreme, i) => {
      expect(Math.abs(120 - extreme.tempC - before[i]!.tempC)).toBeLessThan(0.02);
    });
  });
});

test('thousands of turns are located as well as a few', () => {
  const { series, turns } = buildThermostatRun({ noiseK: 0.1, cycles: 120 });

  const errors = errorsOf(turnsOf(series), turns);

  expect(medianOf(errors.map(({ tempK }) => tempK))).toBeLessThan(0.05);
  expect(medianOf(errors.map(({ switchS }) => switchS))).toBeLessThan(1);
  expect(errors.filter(({ isCovered }) => isCovered).length / errors.length).toBeGreaterThan(0.85);
});
