import { describe, expect, test } from 'vitest';
import type { Mark } from '#shared/analysis/series.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { toCelsius } from '#shared/units.ts';
import { codesOf, cool, cycles, heat, judge, readRun } from './build-run.ts';

/** Figures of this file: common practice for a thermostat that opens at about 155 °F and closes at about 130. */

const offAt = (timeS: number): Mark => ({ timeS, kind: 'heat-off' });

describe('a hand-timed record, every 12 s in whole degrees', () => {
  test('cut-outs at 155 and returns at 130 are in band and proven', () => {
    const analysis = judge(readRun([...cycles([155, 155, 155, 155]), heat(140, 40)]));

    expect(codesOf(analysis)).toEqual(['in-band']);
    expect(analysis.outcome).toBe('proven');
  });

  test('a peak near 165 among good ones is still overshoot, not a runaway', () => {
    const analysis = judge(readRun([...cycles([155, 156, 164, 155]), heat(140, 40)]));

    expect(codesOf(analysis)).not.toContain('runaway');
    expect(analysis.cutOuts.map(({ call }) => call)).not.toContain('outside');
    expect(analysis.outcome).not.toBe('stop');
  });

  test('on from cold through 175, 180 and 190, heat off by hand: a runaway, stop', () => {
    const analysis = judge(readRun([heat(190, 600, 230), cool(120, 150)]), { marks: [offAt(600)] });

    expect(analysis.findings[0]).toMatchObject({
      code: 'runaway',
      evidence: { ended: 'by-hand', afterTrip: null, cutOutsBefore: 0, limitAtS: null },
    });
    expect(analysis.outcome).toBe('stop');
  });

  test('three good rounds and then on through 180: the thermostat had opened before', () => {
    const stretches = [...cycles([155, 156, 157]), heat(186, 250, 220), cool(125, 120)];
    const offS = 270 + 45 + 90 + 45 + 90 + 45 + 250;

    const analysis = judge(readRun(stretches), { marks: [offAt(offS)] });

    expect(analysis.findings[0]).toMatchObject({
      code: 'runaway',
      evidence: { afterTrip: true, cutOutsBefore: 3 },
    });
    expect(analysis.outcome).toBe('stop');
  });

  test('a click heard at 155 on a rise that goes on says that the thermostat opened', () => {
    const click: Mark = { timeS: 330, kind: 'click' };
    const series = readRun([heat(155, 330, 220), heat(187, 270, 220), cool(125, 120)]);

    const analysis = judge(series, { marks: [click, offAt(600)] });

    expect(analysis.findings[0]).toMatchObject({
      code: 'runaway',
      evidence: { afterTrip: true, clickAtS: 330 },
    });
  });

  test('a click at 155 and heat that holds 172 until it is turned off: a runaway though the probe is good to 3 only', () => {
    const probe = { accuracyK: 3 / 1.8, calibrationUK: 0, correction: null, responseS: null };
    const click: Mark = { timeS: 330, kind: 'click' };
    const series = readRun([heat(155, 330, 220), heat(172, 240, 172.4), cool(110, 150)]);

    const heard = judge(series, { probe, marks: [click, offAt(570)] });
    const unheard = judge(series, { probe, marks: [offAt(570)] });

    expect(heard.findings[0]).toMatchObject({ code: 'runaway', evidence: { afterTrip: true } });
    expect(heard.outcome).toBe('stop');
    // Without either sign 172 ± 3.5 °F may still be overshoot within the allowance of 170.
    expect(codesOf(unheard)).not.toContain('runaway');
  });

  test('still on its way at 176 when the record ends is a runaway too', () => {
    const analysis = judge(readRun([heat(176, 480, 215)]));

    expect(analysis.findings[0]).toMatchObject({
      code: 'runaway',
      evidence: { ended: 'record-ends' },
    });
  });

  test('passing the high limit of 196 is told with its moment', () => {
    const analysis = judge(readRun([heat(200, 700, 230), cool(150, 60)]), { marks: [offAt(700)] });
    const { limitAtS } = analysis.findings[0]?.evidence ?? {};

    // By hand from the curve: 230 − 158·exp(−t/τ) with τ = 700/ln(158/30) reaches 196 at t = τ·ln(158/34).
    expect(limitAtS).toBeCloseTo((700 * Math.log(158 / 34)) / Math.log(158 / 30), -1);
  });

  test('a technician who stops as late as 210 with a limit of 225 has a runaway under the limit', () => {
    const highLimitC = toCelsius(225, 'F');
    const rating = { ...DEFAULT_RATING, highLimitC, ceilingC: toCelsius(219, 'F') };

    const analysis = judge(readRun([heat(210, 800, 240), cool(150, 90)]), {
      rating,
      marks: [offAt(800)],
    });

    expect(analysis.findings[0]).toMatchObject({ code: 'runaway', evidence: { limitAtS: null } });
    expect(analysis.outcome).toBe('stop');
  });

  test('stopped by hand at 165 on the first rise, nothing is said yet', () => {
    const analysis = judge(readRun([heat(165, 400, 210), cool(120, 90)]), { marks: [offAt(400)] });

    expect(codesOf(analysis)).toEqual(['too-short']);
    expect(analysis.outcome).toBe('not-proven');
  });

  test('open cold and closed hot: after two clean rounds the exhaust hangs at 140 for six minutes, stop', () => {
    const stretches = [...cycles([155, 155]), heat(155, 90), cool(140.5, 360, 140)];

    const analysis = judge(readRun(stretches));

    expect(analysis.findings[0]).toMatchObject({
      code: 'heat-stays-on',
      evidence: { how: 'hangs' },
    });
    expect(analysis.outcome).toBe('stop');
  });
});

test('opened once at 152, and then at 146 for 15 minutes: heat that stays on', () => {
  const series = readRun([heat(152, 145, 230), cool(139, 55, 137), heat(146, 900, 146.5)]);

  const analysis = judge(series);

  expect(codesOf(analysis)).toContain('heat-stays-on');
  expect(analysis.outcome).toBe('stop');
});

test('a record that ends half-way down a wide fall is not one that levels off', () => {
  const wide = { ...DEFAULT_RATING, closesC: toCelsius(104, 'F') };
  const slow = (inS: number, toF: number) => cool(toF, inS, 90);
  const rounds = [155, 156, 155].flatMap((cutOutF, i) => [
    heat(cutOutF, i === 0 ? 280 : 200),
    slow(220, 104),
  ]);

  const analysis = judge(readRun([...rounds, heat(155, 200), cool(110, 125, 104.5)]), {
    rating: wide,
  });

  expect(codesOf(analysis)).toEqual(['in-band']);
});
