import { describe, expect, test } from 'vitest';
import { FINDING_CODES } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { toCelsius } from '#shared/units.ts';
import { codesOf, cool, cycles, heat, judge, readRun } from './build-run.ts';

/** One reading a second to a tenth of a degree, so that a fault and not the reading decides. */
const probe = { everyS: 1, stepF: 0.1 };
const kelvin = (stepF: number) => stepF / 1.8;

describe('heat that goes away', () => {
  const fall = cool(80, 700, 72);

  test('a fall past the reset band towards the room with no return is heat lost, however slow', () => {
    const analysis = judge(readRun([...cycles([155, 155]), heat(155, 90), fall], probe));

    expect(codesOf(analysis)[0]).toBe('heat-lost');
    expect(analysis.findings[0]?.evidence.cutOutsBefore).toBe(3);
    expect(analysis.outcome).toBe('not-proven');
  });

  test.each([
    ['at the peak', 2],
    ['half a minute into it', 32],
  ])('the same fall is not, where somebody stopped the machine %s', (_, afterPeakS) => {
    const peakS = 270 + 45 + 90 + 45 + 90;
    const marks = [{ timeS: peakS + afterPeakS, kind: 'stopped' as const }];
    const analysis = judge(readRun([...cycles([155, 155]), heat(155, 90), fall], probe), { marks });

    expect(codesOf(analysis)).not.toContain('heat-lost');
  });

  test('a rise of 10 °F in ten minutes from the room is no heat', () => {
    const analysis = judge(readRun([heat(82, 600, 84)], probe));

    expect(codesOf(analysis)).toEqual(['no-heat']);
    expect(analysis.findings[0]?.evidence.riseK).toBeCloseTo(kelvin(10), 0);
  });

  test('a rise of 10 °F in four minutes is too short to say no heat', () => {
    const analysis = judge(readRun([heat(82, 240, 84)], probe));

    expect(codesOf(analysis)).not.toContain('no-heat');
  });
});

describe('a rise that levels off at 130 °F', () => {
  const level = readRun([heat(129.9, 1200, 130)], probe);

  test('is below the cut-out with an empty drum, and heads for 130', () => {
    const analysis = judge(level);

    expect(codesOf(analysis)).toEqual(['below-cut-out']);
    expect(analysis.findings[0]?.evidence.asymptoteC).toBeCloseTo(toCelsius(130, 'F'), 0);
  });

  test('counts as empty where the load is not stated', () => {
    expect(codesOf(judge(level, { load: null }))).toEqual(['below-cut-out']);
  });

  test('is too short to judge with a damp load', () => {
    const analysis = judge(level, { load: 'damp' });

    expect(analysis.findings[0]).toMatchObject({
      code: 'too-short',
      evidence: { reason: 'damp-load' },
    });
  });
});

test('a rise that is still on its way under the band is too short, not below the cut-out', () => {
  const analysis = judge(readRun([heat(130, 150, 195)], probe));

  expect(analysis.findings[0]).toMatchObject({
    code: 'too-short',
    evidence: { reason: 'ended-before-cut-out' },
  });
});

describe('a limit that cuts upstream', () => {
  const bursts = Array.from({ length: 7 }, () => [cool(122, 30), heat(134, 20)]).flat();

  test('cuts again and again under the band with short swings', () => {
    const analysis = judge(readRun([heat(134, 200, 170), ...bursts, cool(122, 30)], probe));

    expect(codesOf(analysis)).toEqual(['limit-cycling']);
    // By hand: 134 − 122.
    expect(analysis.findings[0]?.evidence.meanSwingK).toBeCloseTo(kelvin(12), 0);
  });

  test('is not meant where the swings are those of the rated differential: then it opens low', () => {
    const analysis = judge(readRun([...cycles([140, 140, 140, 140], 116), heat(130, 40)], probe));

    expect(codesOf(analysis)).toEqual(['opens-low']);
  });
});

describe('cut-outs that do not repeat', () => {
  test('three degrees more each cycle drift, by the slope that was put in', () => {
    const series = readRun([...cycles([150, 150, 153, 156, 159, 162]), heat(140, 30)], probe);
    const drifting = judge(series).findings.find(({ code }) => code === 'drifting');

    expect(drifting?.evidence.slopePerCycleK).toBeCloseTo(kelvin(3), 1);
    expect(drifting?.evidence.totalK).toBeCloseTo(kelvin(12), 0);
  });

  test('a drift within the tolerance is none', () => {
    const series = readRun([...cycles([154, 154, 155, 156, 157]), heat(140, 30)], probe);

    expect(codesOf(judge(series))).toEqual(['in-band']);
  });

  test('six degrees up and down scatter', () => {
    const series = readRun(
      [...cycles([155, 149, 161, 149, 161, 149, 161, 155]), heat(140, 30)],
      probe,
    );
    const scattered = judge(series).findings.find(({ code }) => code === 'scattered');

    // By hand: the sample standard deviation of 149 161 149 161 149 161 155 about their line is 6.0 °F.
    expect(scattered?.evidence.sdK).toBeCloseTo(kelvin(6.0), 0);
  });
});

describe('a thermostat at another temperature', () => {
  test.each([
    ['opens-high', [176, 176, 176, 176], 131],
    ['opens-low', [143, 143, 143, 143], 118],
    ['closes-high', [155, 155, 155, 155], 143],
    ['closes-low', [155, 155, 155, 155], 108],
  ])('is named %s by the side of the band', (code, cutOutsF, resetF) => {
    const stretches = cutOutsF.flatMap((cutOutF, i) => [
      heat(cutOutF, i === 0 ? 270 : 90),
      cool(resetF, 45),
    ]);

    const analysis = judge(readRun([...stretches, heat(resetF + 10, 30)], probe));

    expect(codesOf(analysis)).toEqual([code]);
    expect(analysis.outcome).toBe('not-proven');
  });

  test('within the allowance above the band is not opens-high', () => {
    const analysis = judge(readRun([...cycles([167, 167, 167, 167]), heat(140, 30)], probe));

    expect(codesOf(analysis)).not.toContain('opens-high');
    expect(codesOf(analysis)).not.toContain('in-band');
  });

  test('a probe good to 10 °F cannot say opens-high of 176', () => {
    const series = readRun([...cycles([176, 176, 176, 176]), heat(140, 30)], probe);
    const coarse = { accuracyK: kelvin(10), calibrationUK: 0, correction: null, responseS: null };

    expect(codesOf(judge(series, { probe: coarse }))).not.toContain('opens-high');
  });
});

describe('runs without a name', () => {
  test('one cut-out far outside among three judged is mixed', () => {
    const series = readRun([...cycles([155, 155, 176, 155]), heat(140, 30)], probe);

    expect(codesOf(judge(series))).toEqual(['mixed']);
  });

  test('cut-outs on the edge of the band are too close to call', () => {
    const series = readRun([...cycles([160, 160.2, 159.9, 160.1]), heat(140, 30)], probe);

    expect(codesOf(judge(series))).toEqual(['too-close']);
  });

  test('in band stands alone, and two cycles of three are not proven', () => {
    const analysis = judge(readRun([...cycles([155, 155, 155]), heat(140, 30)], probe));

    expect(codesOf(analysis)).toEqual(['in-band']);
    expect(analysis.cycles).toHaveLength(2);
    expect(analysis.outcome).toBe('not-proven');
  });

  test('one cut-out is too few', () => {
    const analysis = judge(readRun([heat(155, 270), cool(130, 45), heat(140, 30)], probe));

    expect(analysis.findings[0]).toMatchObject({
      code: 'too-short',
      evidence: { reason: 'too-few-cut-outs' },
    });
  });
});

describe('without a rating', () => {
  const analysis = judge(readRun([...cycles([155, 155, 155]), heat(140, 30)], probe), {
    rating: null,
  });

  test('the points stand, with no calls and the reason', () => {
    expect(analysis.cutOuts).toHaveLength(3);
    expect(analysis.cutOuts.every(({ call }) => call === null)).toBe(true);
    expect(analysis.notJudged).toBe('no-rating');
    expect(analysis.findings).toMatchObject([
      { code: 'too-short', evidence: { reason: 'no-rating' } },
    ]);
  });
});

test('a probe too slow for the cycles is not judged, but a runaway on it is still one', () => {
  const slow = { accuracyK: 0, calibrationUK: 0, correction: null, responseS: 60 };
  const cycling = judge(readRun([...cycles([150, 150, 150, 150]), heat(140, 30)], probe), {
    probe: slow,
  });
  const runaway = judge(readRun([heat(190, 600, 230), cool(150, 60)], probe), {
    probe: slow,
    marks: [{ timeS: 600, kind: 'heat-off' }],
  });

  expect(cycling.notJudged).toBe('probe-too-slow');
  expect(codesOf(cycling)).toEqual(['too-short']);
  expect(codesOf(runaway)[0]).toBe('runaway');
});

test('a dip on the way up is no measure for the falls after it', () => {
  const dip = [heat(131, 130), cool(125.6, 35, 110), heat(155, 150), cool(130, 45)];
  const rounds = [heat(155, 90), cool(130, 45), heat(155, 90), cool(130, 45), heat(140, 30)];

  const analysis = judge(readRun([...dip, ...rounds], probe));

  expect(codesOf(analysis)).not.toContain('heat-stays-on');
  expect(analysis.outcome).not.toBe('stop');
});

test('a cut-out whose value and uncertainty reach the ceiling means stop, whatever the headline', () => {
  const rating = {
    ...DEFAULT_RATING,
    highLimitC: toCelsius(162, 'F'),
    ceilingC: toCelsius(156, 'F'),
  };
  const analysis = judge(readRun([...cycles([156, 156, 156, 156]), heat(140, 30)], probe), {
    rating,
  });

  expect(analysis.outcome).toBe('stop');
});

test('findings come in the order of precedence', () => {
  const stretches = [...cycles([150, 150, 154, 158, 162]), heat(190, 300, 230), cool(120, 120)];
  const offS = 270 + 45 + 4 * 135 + 300;
  const codes = codesOf(
    judge(readRun(stretches, probe), { marks: [{ timeS: offS, kind: 'heat-off' }] }),
  );

  const places = codes.map((code) => FINDING_CODES.findIndex((known) => known === code));
  expect(codes[0]).toBe('runaway');
  expect(places).toEqual([...places].sort((a, b) => a - b));
});
