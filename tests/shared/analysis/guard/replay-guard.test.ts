import { describe, expect, test } from 'vitest';
import { guardMark, guardReading, startGuard } from '#shared/analysis/guard/guard.ts';
import { replayGuard } from '#shared/analysis/guard/replay-guard.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Mark, Series } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';
import { ELECTRIC, SOUND, type Faults, type Machine } from '#server/commands/heat-model/machine.ts';
import { createRandom } from '#server/commands/heat-model/random.ts';
import { simulateRun, STEP_S, type ModelRun } from '#server/commands/heat-model/simulate-run.ts';
import {
  PROBE,
  takeHandReadings,
  takeProbeReadings,
} from '#server/commands/heat-model/take-readings.ts';
import { trueTurningPoints } from '#server/commands/heat-model/true-turning-points.ts';

const SETUP = {
  rating: DEFAULT_RATING,
  probe: { accuracyK: 1.1, calibrationUK: 0, responseS: 3, correction: null },
};
const SEEDS = [61, 62, 63];
const METHODS = [
  { ...PROBE, spacingS: 0.2 },
  { ...PROBE, spacingS: 1, noiseK: 0.9 },
  { ...PROBE, spacingS: 5, step: 1 },
  { ...PROBE, spacingS: 10 },
  'hand',
] as const;

/** A run of the heat model: nobody turns the heat off, and no fuse ends it. */
function play(told: Partial<Machine>, faults: Partial<Faults>, seed: number): ModelRun {
  const machine = { ...ELECTRIC, fuse: { opensC: 999, lagS: 40 }, ...told };
  const watch = { forS: 1500, heatOffAtC: Infinity, afterHeatOffS: 0 };
  return simulateRun(machine, { ...SOUND, scatterK: 0.2, ...faults }, watch, createRandom(seed));
}

function readingsOf(run: ModelRun, seed: number): Series[] {
  const turns = trueTurningPoints(run, 2);
  return METHODS.map((method) => {
    const random = createRandom(seed);
    const { timesS, temps, unit } =
      method === 'hand'
        ? takeHandReadings(run, turns, random)
        : takeProbeReadings(run, method, random);
    return {
      timesS: Float64Array.from(timesS),
      tempsC: Float64Array.from(temps, (temp) => toCelsius(temp ?? 0, unit)),
    };
  });
}

/** When the noise-free probe reaches the high limit, s. */
function limitReachedS({ probeC }: ModelRun): number {
  return probeC.findIndex((tempC) => tempC >= DEFAULT_RATING.highLimitC) * STEP_S;
}

const NEVER_OPENS = { opensC: 300, closesC: 50, lagS: 6 };
// The limit on the heater housing is out of the way: it would cut the heat first.
const HOT = {
  boxLimit: { opensC: 300, closesC: 200, lagS: 8 },
  powerW: 6300,
  airKgPerS: 0.058,
  leak: 0.04,
};

describe('played back', () => {
  test.each(SEEDS)('every runaway leaves 20 s and more to the high limit (seed %i)', (seed) => {
    const runs = [
      play({ ...HOT, disc: NEVER_OPENS }, {}, seed),
      play({ ...HOT, drumJPerK: 9000, disc: NEVER_OPENS }, {}, seed),
      play(HOT, { relaySticksAfter: 2 }, seed),
    ];

    for (const run of runs) {
      const limitS = limitReachedS(run);
      expect(limitS).toBeGreaterThan(0);
      for (const series of readingsOf(run, seed)) {
        const { alarmS } = replayGuard(series, [], SETUP);
        expect(limitS - (alarmS ?? Infinity)).toBeGreaterThanOrEqual(20);
      }
    }
  });

  test.each(SEEDS)('no sound run is told to cut its heat, or watched (seed %i)', (seed) => {
    for (const series of readingsOf(play({}, {}, seed), seed)) {
      expect(replayGuard(series, [], SETUP)).toEqual({ alarmS: null, changes: [] });
    }
  });

  test.each(SEEDS)('a machine that turns by itself at 178 °F is left alone (seed %i)', (seed) => {
    const disc = { opensC: toCelsius(176, 'F'), closesC: toCelsius(150, 'F'), lagS: 6 };
    const run = play({ ...HOT, disc }, {}, seed);

    expect(Math.max(...run.probeC)).toBeLessThan(DEFAULT_RATING.ceilingC);
    for (const series of readingsOf(run, seed)) {
      const { alarmS, changes } = replayGuard(series, [], SETUP);
      expect(alarmS).toBeNull();
      expect(changes.map(({ says }) => says)).toContain('watch');
    }
  });

  test('says step by step what a live guard says', () => {
    const run = play({ ...HOT, disc: NEVER_OPENS }, {}, 7);
    const [, noisy] = readingsOf(run, 7);
    const marks: Mark[] = [{ timeS: limitReachedS(run) - 8, kind: 'heat-off' }];

    const replay = replayGuard(noisy!, marks, SETUP);

    expect(replay.changes).toEqual(liveChanges(noisy!, marks));
    expect(replay.changes.map(({ says }) => says)).toEqual(
      expect.arrayContaining(['watch', 'cut-heat', 'unplug']),
    );
  });

  test('says the same an hour later in the record', () => {
    const [series] = readingsOf(play({ ...HOT, disc: NEVER_OPENS }, {}, 8), 8);
    const later = { ...series!, timesS: series!.timesS.map((timeS) => timeS + 3600) };

    const now = replayGuard(series!, [], SETUP);

    expect(replayGuard(later, [], SETUP).alarmS).toBeCloseTo((now.alarmS ?? 0) + 3600, 6);
  });

  test('knows nothing of what comes after', () => {
    const [series] = readingsOf(play({ ...HOT, disc: NEVER_OPENS }, {}, 9), 9);
    const { alarmS } = replayGuard(series!, [], SETUP);
    const end = series!.timesS.findIndex((timeS) => timeS > (alarmS ?? 0));

    const cutShort = { timesS: series!.timesS.slice(0, end), tempsC: series!.tempsC.slice(0, end) };

    expect(replayGuard(cutShort, [], SETUP).alarmS).toBe(alarmS);
    expect(alarmS).not.toBeNull();
  });

  test('holds the usual ceiling where no rating is known', () => {
    const [series] = readingsOf(play({ ...HOT, disc: NEVER_OPENS }, {}, 9), 9);

    expect(replayGuard(series!, [], { ...SETUP, rating: null }).alarmS).not.toBeNull();
  });
});

function liveChanges({ timesS, tempsC }: Series, [off]: Mark[]) {
  let state = startGuard(SETUP);
  const changes: { timeS: number; says: string; why: string | null }[] = [];
  const note = (timeS: number) => {
    const { says, why } = state;
    const last = changes.at(-1) ?? { says: 'quiet', why: null };
    if (says !== last.says || why !== last.why) changes.push({ timeS, says, why });
  };
  timesS.forEach((timeS, i) => {
    if (off && off.timeS <= timeS && off.timeS > (timesS[i - 1] ?? -1)) {
      state = guardMark(state, off);
      note(off.timeS);
    }
    state = guardReading(state, { timeS, tempC: tempsC[i]! });
    note(timeS);
  });
  return changes;
}
