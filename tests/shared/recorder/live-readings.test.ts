import { describe, expect, test } from 'vitest';
import { celsiusOf } from '#shared/recorder/celsius-of.ts';
import { isWorthKeeping } from '#shared/recorder/keep-rate.ts';
import { measuredInRun } from '#shared/recorder/measured-in-run.ts';
import { gapAfterS, isProbeReading, openGap, traceGaps } from '#shared/recorder/probe-gap.ts';
import type { HandReading, HandRun } from '#shared/recorder/replay-run.ts';
import { seriesOfRun } from '#shared/recorder/series-of-run.ts';

let ids = 0;
function live(atS: number, temp = 68.25): HandReading {
  const { temp: inRun, measured = null } = measuredInRun({ temp, unit: 'C' }, 'F');
  return { id: `r${ids++}`, atS, temp: inRun, typed: inRun, from: 'probe', measured };
}
function byHand(atS: number, temp = 155): HandReading {
  return { id: `r${ids++}`, atS, temp, typed: temp, from: 'hand', measured: null };
}
const run = (...readings: HandReading[]) => ({ readings });

describe('a live reading in a run', () => {
  test('stands in the run’s unit and keeps what the probe said: 68.25 °C is 154.85 °F', () => {
    // 68.25 × 1.8 + 32 = 154.85, NIST SP 811 B.8.
    expect(measuredInRun({ temp: 68.25, unit: 'C' }, 'F')).toEqual({
      temp: 154.85,
      measured: { temp: 68.25, unit: 'C' },
    });
    expect(measuredInRun({ temp: 154.9, unit: 'F' }, 'F')).toEqual({ temp: 154.9 });
    expect(measuredInRun({ temp: 154.4, unit: 'F' }, 'C').temp).toBe(68);
  });

  test('is judged by the probe’s own hundredths', () => {
    expect(celsiusOf(live(1, 68.26), 'F')).toBe(68.26);
    expect(celsiusOf(byHand(1, 212), 'F')).toBeCloseTo(100, 12);
  });

  test.each([
    [0.89, 100, false],
    [0.9, 100, true],
    [Infinity, 0, true],
    [5, 10_000, false],
    [9.9, 10_000, true],
  ])('%s s after the last of %s things it is worth keeping: %s', (sinceS, n, isWorth) => {
    expect(isWorthKeeping(sinceS, n)).toBe(isWorth);
  });

  test('of ten a second one a second is kept, and of one a second with a jitter of 5 % each', () => {
    const kept = (times: number[]) => {
      let lastS = -Infinity;
      return times.filter((atS) => isWorthKeeping(atS - lastS, 0) && ((lastS = atS), true)).length;
    };

    expect(kept(Array.from({ length: 600 }, (_, i) => i / 10))).toBeLessThanOrEqual(67);
    expect(kept(Array.from({ length: 60 }, (_, i) => i + (i % 2) * 0.05))).toBe(60);
  });
});

describe('the gap of a live probe', () => {
  test('opens after four of its spacings, not under 5 s, and begins at its last reading', () => {
    const each = run(live(1), live(2), live(3), live(4));
    const slow = run(live(0), live(10), live(20), live(30));

    expect(gapAfterS(each)).toBe(5);
    expect(openGap(each, 9)).toBeNull();
    expect(openGap(each, 9.1)).toEqual({ fromS: 4 });
    expect(gapAfterS(slow)).toBe(40);
  });

  test('is not closed by readings by hand, and a run without a probe has none', () => {
    const mixed = run(live(1), live(2), live(3), byHand(6), byHand(16));

    expect(openGap(mixed, 17)).toEqual({ fromS: 3 });
    expect(isProbeReading(mixed, 17)).toBe(false);
    expect(isProbeReading(mixed, 4)).toBe(true);
    expect(openGap(run(byHand(1)), 500)).toBeNull();
    expect(isProbeReading(run(byHand(1)), 1)).toBe(false);
  });

  test('before its rhythm is known the probe has 15 s', () => {
    expect(openGap(run(live(1), live(2)), 17)).toBeNull();
    expect(openGap(run(live(1), live(2)), 17.1)).toEqual({ fromS: 2 });
  });

  test('parts the trace, but for readings by hand that follow each other', () => {
    const readings = [live(10), byHand(20), byHand(30), byHand(90), live(100)];

    expect(traceGaps({ readings, probeGaps: [{ fromS: 10, toS: 100 }] })).toEqual([
      { fromS: 10, toS: 20 },
      { fromS: 30, toS: 90 },
      { fromS: 90, toS: 100 },
    ]);
    expect(
      traceGaps({ readings: [live(10), live(100)], probeGaps: [{ fromS: 10, toS: 100 }] }),
    ).toEqual([{ fromS: 10, toS: 100 }]);
  });
});

describe('the series of a run with live readings', () => {
  const start: HandRun['start'] = {
    ...{ id: 's', runId: 'r', n: 0, atS: 0, wallMs: 0, kind: 'start', visitId: 'v', label: 'x' },
    ...{ unit: 'F', hasTenths: false },
    setup: {
      placement: '',
      duct: null,
      load: null,
      setting: 'high',
      roomTemp: null,
      probeId: null,
    },
  };
  const seriesOf = (...readings: HandReading[]) =>
    seriesOfRun({
      ...{ start, readings, marks: [], corrections: [], takenBack: 0, guard: [], clock: [] },
      ...{ steps: [], probeGaps: [], end: null, isThrownAway: false },
      last: { n: 0, atS: 0, wallMs: 0 },
    });

  test('is stored in the probe’s unit, bit for bit, where the probe took them all', () => {
    const judged = seriesOf(live(1, 68.25), live(2, 68.26), live(3, 68.31));

    expect(judged?.unit).toBe('C');
    expect([...(judged?.temps ?? [])]).toEqual([68.25, 68.26, 68.31]);
    expect([...(judged?.series.tempsC ?? [])]).toEqual([68.25, 68.26, 68.31]);
  });

  test('is stored in the run’s unit where some were taken by hand, and judged by what the probe said', () => {
    const judged = seriesOf(live(1, 68.25), byHand(5, 212), live(9, 68.31));

    expect(judged?.unit).toBe('F');
    // 68.31 × 1.8 + 32 = 154.958.
    expect([...(judged?.temps ?? [])]).toEqual([154.85, 212, 154.958]);
    expect(judged?.series.tempsC[0]).toBe(68.25);
    expect(judged?.series.tempsC[2]).toBe(68.31);
  });
});
