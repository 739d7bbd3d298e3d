import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  compareClocks,
  elapsedS,
  reopenClock,
  startClock,
  type Now,
  type RunClock,
} from '#shared/recorder/clock.ts';

const START: Now = { monoMs: 5_000, wallMs: 1_800_000_000_000 };
const HOUR_MS = 3_600_000;

/** The two clocks after `ms`, the phone's set ahead by `setMs` and the monotonic one short of `lostMs`. */
function after(ms: number, { setMs = 0, lostMs = 0 } = {}): Now {
  return { monoMs: START.monoMs + ms - lostMs, wallMs: START.wallMs + ms + setMs };
}

describe('while the page lives', () => {
  test('an hour is an hour, whatever the phone’s clock was set to on the way', () => {
    let clock = startClock(START);
    const found = [];
    for (let ms = 250; ms <= HOUR_MS; ms += 250) {
      const setMs = ms >= 1_000_000 ? HOUR_MS : 0;
      const compared = compareClocks(clock, after(ms, { setMs }), true);
      clock = compared.clock;
      if (compared.found) found.push(compared.found);
    }

    expect(elapsedS(clock, START.monoMs + HOUR_MS)).toBe(3600);
    expect(found).toEqual([{ kind: 'clock-step', stepS: 3600 }]);
  });

  test('a clock set back is flagged even out of view: no phone sleeps backwards', () => {
    const { clock, found } = compareClocks(
      startClock(START),
      after(60_000, { setMs: -HOUR_MS }),
      false,
    );

    expect(found).toEqual({ kind: 'clock-step', stepS: -3600 });
    expect(elapsedS(clock, START.monoMs + 60_000)).toBe(60);
  });

  test('clocks that drift apart by half a part in a thousand are no step', () => {
    let clock = startClock(START);
    for (let s = 1; s <= 3600; s++) {
      const compared = compareClocks(clock, after(s * 1000, { setMs: s * 0.5 }), true);
      expect(compared.found).toBeNull();
      clock = compared.clock;
    }
    expect(elapsedS(clock, START.monoMs + HOUR_MS)).toBe(3600);
  });
});

describe('a phone asleep', () => {
  test('an hour out of view with the monotonic clock standing still is measured by the phone’s clock', () => {
    const seen = compareClocks(startClock(START), after(10_000), true).clock;

    const { clock, found } = compareClocks(
      seen,
      after(HOUR_MS, { lostMs: HOUR_MS - 12_000 }),
      false,
    );

    expect(found).toEqual({ kind: 'asleep', fromS: 10, toS: 3600 });
    expect(elapsedS(clock, after(HOUR_MS, { lostMs: HOUR_MS - 12_000 }).monoMs)).toBe(3600);
  });

  test('an hour hidden with both clocks running needs no mark', () => {
    const { clock, found } = compareClocks(startClock(START), after(HOUR_MS), false);

    expect(found).toBeNull();
    expect(elapsedS(clock, START.monoMs + HOUR_MS)).toBe(3600);
  });
});

describe('a page that was gone', () => {
  test('goes on from the last event on the device, on a monotonic clock that began anew', () => {
    const opened: Now = { monoMs: 120, wallMs: START.wallMs + HOUR_MS };

    const { clock, found } = reopenClock({ atS: 730, wallMs: START.wallMs + 730_000 }, opened);

    expect(elapsedS(clock, 120)).toBe(3600);
    expect(elapsedS(clock, 1_120)).toBe(3601);
    expect(found).toEqual({ kind: 'asleep', fromS: 730, toS: 3600 });
  });

  test('stands still where the phone’s clock was set back meanwhile', () => {
    const { clock } = reopenClock({ atS: 730, wallMs: START.wallMs }, { monoMs: 0, wallMs: 0 });

    expect(elapsedS(clock, 0)).toBe(730);
  });
});

test('time never runs backwards, and after any hour of naps, steps and reopenings it is true to 50 ms', () => {
  const aHappening = fc.record({
    ms: fc.integer({ min: 100, max: 400_000 }),
    what: fc.constantFrom('live', 'step', 'asleep', 'reopened'),
    stepMs: fc.integer({ min: -7_200_000, max: 7_200_000 }),
  });
  fc.assert(
    fc.property(fc.array(aHappening, { minLength: 1, maxLength: 40 }), (happenings) => {
      let [trueMs, setMs, lostMs] = [0, 0, 0];
      let clock: RunClock = startClock(START);
      const now = () => after(trueMs, { setMs, lostMs });
      for (const { ms, what, stepMs } of happenings) {
        const before = elapsedS(clock, now().monoMs);
        // Each is compared right before: the page writes its events while it runs.
        clock = compareClocks(clock, now(), true).clock;
        const anchor = { atS: elapsedS(clock, now().monoMs), wallMs: now().wallMs };
        trueMs += ms;
        if (what === 'step') setMs += stepMs;
        if (what === 'asleep') lostMs += ms;
        if (what === 'reopened') {
          lostMs = trueMs;
          clock = reopenClock(anchor, now()).clock;
        } else {
          clock = compareClocks(clock, now(), what !== 'asleep').clock;
        }
        expect(elapsedS(clock, now().monoMs)).toBeGreaterThanOrEqual(before);
      }
      expect(Math.abs(elapsedS(clock, now().monoMs) - trueMs / 1000)).toBeLessThanOrEqual(0.05);
    }),
    { numRuns: 500 },
  );
});
