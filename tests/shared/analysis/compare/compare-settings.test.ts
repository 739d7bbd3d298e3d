import { describe, expect, test } from 'vitest';
import { BIAS_LOWERS_K, compareSettings } from '#shared/analysis/compare/compare-settings.ts';
import { cool, heat, judge, readRun } from '../findings/build-run.ts';

const probe = { everyS: 1, stepF: 0.1 };

/** Six cycles that cut out about `peakF`, a little off in turn. */
function runAt(peakF: number, resetF = 120) {
  const stretches = [-0.6, 0.4, -0.2, 0.6, -0.4, 0.2].flatMap((offF, i) => [
    heat(peakF + offF, i === 0 ? 270 : 90),
    cool(resetF, 45),
  ]);
  return judge(readRun([...stretches, heat(peakF - 8, 40)], probe));
}

const high = runAt(155);
const unrated = { ratedK: null, probesErrorK: 0 };

describe('two heat settings', () => {
  test('15 °F lower is what a bias heater does', () => {
    // TM 55-1905-220-14-9: energised, it lowers the cut-out by about 15 °F.
    const pair = compareSettings(high, runAt(140), unrated);

    expect(pair).toMatchObject({ verdict: 'as-it-should', expectedFrom: 'bias-heater' });
    expect(pair.expectedK).toBe(BIAS_LOWERS_K);
    expect((pair.lowerByK ?? 0) * 1.8).toBeCloseTo(15, 0);
  });

  test('the same on both is no difference', () => {
    expect(compareSettings(high, runAt(155), unrated).verdict).toBe('no-difference');
  });

  test('4 of 15 °F is too little, not none', () => {
    expect(compareSettings(high, runAt(151), unrated).verdict).toBe('not-enough');
  });

  test('the cooler setting hotter is backwards', () => {
    expect(compareSettings(runAt(140), high, unrated).verdict).toBe('backwards');
  });

  test('the machine’s own ratings say what is to be expected', () => {
    const pair = compareSettings(high, runAt(130, 105), { ratedK: 30 / 1.8, probesErrorK: 0 });

    expect(pair).toMatchObject({ verdict: 'as-it-should', expectedFrom: 'ratings' });
    // 25 °F would do for a bias heater, and is half of nothing that 60 °F asks.
    expect(
      compareSettings(high, runAt(130, 105), { ratedK: 60 / 1.8, probesErrorK: 0 }).verdict,
    ).toBe('not-enough');
  });

  test('two probes that may differ by as much cannot tell', () => {
    const pair = compareSettings(high, runAt(147), { ratedK: null, probesErrorK: 3 });

    expect(pair.verdict).toBe('cannot-tell');
  });

  test('a run with one cut-out cannot tell', () => {
    const short = judge(readRun([heat(155, 270), cool(130, 45), heat(150, 60)], probe));

    expect(compareSettings(high, short, unrated)).toMatchObject({
      verdict: 'cannot-tell',
      lowerByK: null,
    });
  });

  test('where a limit cuts first the setting cannot be seen', () => {
    const bursts = Array.from({ length: 10 }, (_, i) => [
      heat(128, i === 0 ? 120 : 15),
      cool(119, 25),
    ]).flat();
    const cut = judge(readRun([...bursts, heat(125, 10)], probe));

    expect(compareSettings(high, cut, unrated)).toMatchObject({
      verdict: 'cannot-tell',
      why: 'limit-cuts',
    });
  });
});
