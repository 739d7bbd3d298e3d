import { describe, expect, test } from 'vitest';
import {
  expectReading,
  guardAt,
  guardMark,
  guardReading,
  startGuard,
} from '#shared/analysis/guard/guard.ts';
import type { GuardSays, GuardState } from '#shared/analysis/guard/guard-state.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { MarkKind } from '#shared/analysis/series.ts';

const SETUP = {
  rating: DEFAULT_RATING,
  probe: { accuracyK: 1, calibrationUK: 0, responseS: 3, correction: null },
};

/** °F as the guard's °C. */
function f(temp: number): number {
  return (temp - 32) / 1.8;
}

/** A guard fed with readings in °F, one each `everyS` from `fromS`. */
function feed(state: GuardState, temps: number[], everyS: number, fromS: number): GuardState {
  return temps.reduce(
    (now, temp, i) => guardReading(now, { timeS: fromS + i * everyS, tempC: f(temp) }),
    state,
  );
}

/** What it says at each reading. */
function sayings(state: GuardState, temps: number[], everyS: number, fromS: number): GuardSays[] {
  let now = state;
  return temps.map((temp, i) => {
    now = guardReading(now, { timeS: fromS + i * everyS, tempC: f(temp) });
    return now.says;
  });
}

/** A climb in °F at a steady rate, from the start of the run. */
function climb(fromF: number, toF: number, perS: number, everyS: number) {
  const temps: number[] = [];
  for (let temp = fromF; temp <= toF + 1e-9; temp += perS * everyS) temps.push(temp);
  return { state: feed(startGuard(SETUP), temps, everyS, 0), nextS: temps.length * everyS };
}

function mark(state: GuardState, kind: MarkKind, timeS: number): GuardState {
  return guardMark(state, { kind, timeS });
}

describe('at the ceiling of 190 °F', () => {
  test.each([1, 5, 15])('a reading in line with the trend fires at once, every %i s', (everyS) => {
    const { state, nextS } = climb(165, 189.9, 0.1, everyS);

    const there = feed(state, [190.2], everyS, nextS);

    expect(state.says).toBe('watch');
    expect(there).toMatchObject({ says: 'cut-heat', why: 'at-ceiling' });
  });

  test('one mistyped 250 does not fire, and is shown as far off', () => {
    const { state, nextS } = climb(130, 150, 0.2, 10);

    const typed = feed(state, [250], 10, nextS);
    const after = feed(typed, [153.8], 10, nextS + 10);

    expect(typed.says).toBe('quiet');
    expect(typed.unconfirmed).toEqual({ timeS: nextS, tempC: f(250) });
    expect(after).toMatchObject({ says: 'quiet', unconfirmed: null });
  });

  test('two readings of 250 fire', () => {
    const { state, nextS } = climb(130, 150, 0.2, 10);

    expect(feed(state, [250, 251], 10, nextS).says).toBe('cut-heat');
  });

  test('two wild readings with a good one between them do not fire', () => {
    const { state, nextS } = climb(130, 150, 0.2, 10);

    expect(feed(state, [250, 153.8, 250, 157.6], 10, nextS).says).toBe('quiet');
  });

  test('a first reading up there is watched, and a second fires', () => {
    const first = feed(startGuard(SETUP), [195], 1, 0);

    expect(first.says).toBe('watch');
    expect(feed(first, [195], 1, 1).says).toBe('cut-heat');
  });
});

describe('one wild reading anywhere on the way', () => {
  const temps = Array.from({ length: 60 }, (_, i) => 100 + i);

  test.each([1, 10])('never fires, whatever it is, every %i s', (everyS) => {
    const firing: number[] = [];
    for (let at = 0; at < temps.length; at++) {
      for (const wild of [-40, 20, 190, 196, 212, 250, 999]) {
        const typed = temps.map((temp, i) => (i === at ? wild : temp));
        if (sayings(startGuard(SETUP), typed, everyS, 0).includes('cut-heat')) firing.push(wild);
      }
    }

    expect(firing).toEqual([]);
  });
});

describe('before the ceiling', () => {
  test('cuts a steep climb so early that 20 s are left to the high limit', () => {
    // 0.6 °F/s: 196 °F is reached 60 s after 160 °F, and 20 s before that it shows 184 °F.
    const steep = climb(100, 184, 0.6, 1).state;

    expect(steep.says).toBe('cut-heat');
    expect(climb(100, 172, 0.6, 1).state.says).not.toBe('cut-heat');
  });

  test('lets a climb pass that levels off under the ceiling, and watches it', () => {
    // First-order response to 184 °F with τ = 60 s.
    const temps = Array.from({ length: 400 }, (_, i) => 184 - 84 * Math.exp(-i / 60));

    const said = sayings(startGuard(SETUP), temps, 1, 0);

    expect(said).not.toContain('cut-heat');
    expect(said.at(-1)).toBe('watch');
  });

  test('lets a machine go where it came back from before', () => {
    const first = [...ramp(100, 178, 0.3), ...ramp(178, 150, -0.8)];
    const round = [...ramp(150, 178, 0.8), ...ramp(178, 150, -0.8)];

    const said = sayings(startGuard(SETUP), [...first, ...round], 1, 0);
    const saidAtOnce = sayings(startGuard(SETUP), [...ramp(100, 150, 0.3), ...round], 1, 0);

    expect(saidAtOnce).toContain('cut-heat');
    expect(said).not.toContain('cut-heat');
  });

  test('watches an exhaust that climbs on after a click', () => {
    const { state, nextS } = climb(130, 156, 0.15, 2);

    const clicked = mark(state, 'click', nextS - 1);
    const on = feed(clicked, ramp(156, 164, 0.15, 2), 2, nextS);

    expect(feed(state, ramp(156, 164, 0.15, 2), 2, nextS).says).toBe('quiet');
    expect(on).toMatchObject({ says: 'watch', why: 'after-click' });
  });
});

describe('a cut-heat', () => {
  const { state: hot, nextS } = climb(165, 190.2, 0.1, 2);

  test('stays while nobody marks heat off, even if the exhaust falls', () => {
    expect(feed(hot, ramp(190, 150, -0.5, 2), 2, nextS).says).toBe('cut-heat');
  });

  test('stays after heat off until the exhaust falls', () => {
    const off = mark(hot, 'heat-off', nextS);
    const still = feed(off, [190.4, 190.5, 190.5], 2, nextS);

    expect(off).toMatchObject({ says: 'cut-heat', why: 'not-falling-yet' });
    expect(still.says).toBe('cut-heat');
    expect(feed(still, ramp(190.2, 180, -0.5, 2), 2, nextS + 6).says).toBe('quiet');
  });

  test('called under the ceiling stays likewise until the exhaust falls', () => {
    const { state, nextS: offS } = climb(100, 184, 0.6, 1);

    const level = feed(mark(state, 'heat-off', offS), [185, 186, 186.5, 186.6, 186.6], 1, offS);

    expect(state).toMatchObject({ says: 'cut-heat', why: 'limit-near' });
    expect(level).toMatchObject({ says: 'cut-heat', why: 'not-falling-yet' });
    expect(feed(level, ramp(186.6, 180, -0.5), 1, offS + 5).says).toBe('quiet');
  });

  test('comes anew when the heat is turned on again', () => {
    const off = mark(hot, 'heat-off', nextS);
    const cool = feed(off, ramp(190, 150, -0.5, 2), 2, nextS);
    const coolS = nextS + 2 * ramp(190, 150, -0.5, 2).length;

    const again = feed(mark(cool, 'heat-on', coolS), ramp(150, 190.5, 0.15, 2), 2, coolS);

    expect(cool.says).toBe('quiet');
    expect(again.says).toBe('cut-heat');
  });
});

describe('after heat off', () => {
  test('says unplug if the exhaust climbs on as before, within 45 s', () => {
    const { state, nextS } = climb(120, 160, 0.25, 1);
    const off = mark(state, 'heat-off', nextS);

    expect(feed(off, ramp(160, 160 + 0.25 * 45, 0.25), 1, nextS)).toMatchObject({
      says: 'unplug',
      why: 'climbs-after-off',
    });
  });

  test('takes what stored heat and the probe still add for what it is', () => {
    const { state, nextS } = climb(120, 160, 0.25, 1);
    // Heater of 9 s, mixing of 4 s, probe of 3 s: the climb fades within half a minute.
    const fading = Array.from(
      { length: 60 },
      (_, i) => 160 + 4 * (1 - Math.exp(-i / 16)) - 0.08 * i,
    );

    const said = sayings(mark(state, 'heat-off', nextS), fading, 1, nextS);

    expect(said).not.toContain('unplug');
  });

  test('keeps saying unplug until the exhaust falls', () => {
    const { state, nextS } = climb(120, 160, 0.25, 1);
    const climbing = ramp(160, 175, 0.25);
    const unplug = feed(mark(state, 'heat-off', nextS), climbing, 1, nextS);
    const topS = nextS + climbing.length;

    expect(feed(unplug, [175, 175, 175], 1, topS).says).toBe('unplug');
    expect(feed(unplug, ramp(175, 165, -0.4), 1, topS).says).toBe('quiet');
  });
});

describe('a probe with a calibration', () => {
  test('is put right: one that shows 4 °F too little reaches the ceiling 4 °F sooner', () => {
    const correction = { interceptK: 4 / 1.8, slope: 0, aboutC: 60 };
    const errors = { interceptErrorK: 0, slopeError: 0, correlation: 0 };
    const probe = { ...SETUP.probe, correction: { ...correction, ...errors } };
    const temps = ramp(165, 187, 0.1);

    const said = sayings(startGuard({ ...SETUP, probe }), temps, 1, 0);

    expect(said.at(-1)).toBe('cut-heat');
    expect(temps[said.indexOf('cut-heat')]).toBeCloseTo(186, 0);
  });
});

describe('its state', () => {
  test('comes back from JSON and goes on as if it had never left', () => {
    const { state, nextS } = climb(140, 180, 0.2, 5);

    const back = JSON.parse(JSON.stringify(state)) as GuardState;

    expect(back).toEqual(state);
    expect(feed(back, [181, 182], 5, nextS)).toEqual(feed(state, [181, 182], 5, nextS));
  });

  test('does not grow with the readings, and one before is left as it was', () => {
    const early = climb(130, 135, 0.1, 1);
    const kept = structuredClone(early.state);
    const late = feed(early.state, wave(2000), 1, early.nextS);

    expect(early.state).toEqual(kept);
    expect(keysOf(late)).toEqual(keysOf(early.state));
  });

  test('refuses a time that does not rise, and what is no number', () => {
    const { state, nextS } = climb(130, 135, 0.1, 1);

    expect(() => guardReading(state, { timeS: nextS - 1, tempC: 60 })).toThrow(RangeError);
    expect(() => guardReading(state, { timeS: nextS, tempC: NaN })).toThrow(RangeError);
  });
});

describe('as the clock runs on with no reading', () => {
  test('does not wait for a late one when the high limit is near', () => {
    const { state, nextS } = climb(140, 178, 0.3, 2);

    expect(state.says).toBe('watch');
    expect(guardAt(state, nextS).says).toBe('watch');
    // 18 °F to go at 0.3 °F/s are 60 s: after 50 s of silence, ten are left.
    expect(guardAt(state, nextS + 50)).toMatchObject({ says: 'cut-heat', why: 'limit-near' });
  });

  test('knows about where the next reading will lie', () => {
    const { state, nextS } = climb(140, 160, 0.3, 2);

    const next = expectReading(state, nextS + 2);

    // 0.3 °F/s for four seconds more, a little less as legs bend.
    expect(next?.tempC).toBeCloseTo(f(160 + 0.3 * 4 - 0.6), 0);
    expect(expectReading(startGuard(SETUP), 1)).toBeNull();
  });
});

function ramp(fromF: number, toF: number, perS: number, everyS = 1): number[] {
  const steps = Math.floor((toF - fromF) / (perS * everyS) + 1e-9);
  return Array.from({ length: steps }, (_, i) => fromF + (i + 1) * perS * everyS);
}

function wave(n: number): number[] {
  return Array.from({ length: n }, (_, i) => 142 + 12 * Math.sin(i / 14) + 0.1 * Math.sin(i * 7));
}

function keysOf(state: GuardState): string[] {
  return [...Object.keys(state), ...Object.keys(state.track ?? {}), ...Object.keys(state.turns)];
}
