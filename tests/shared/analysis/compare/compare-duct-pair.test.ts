import { describe, expect, test } from 'vitest';
import { compareDuctPair } from '#shared/analysis/compare/compare-duct-pair.ts';
import { cool, heat, judge, readRun, type Stretch } from '../findings/build-run.ts';

const probe = { everyS: 1, stepF: 0.1 };

/** Six cycles from cold that cut out about `peakF`, each a little off in turn, on for `onS`. */
function cyclesOf(peakF: number, onS: number, resetF = 130, firstS = 270): Stretch[] {
  return [-0.6, 0.4, -0.2, 0.6, -0.4, 0.2].flatMap((offF, i) => [
    heat(peakF + offF, i === 0 ? firstS : onS + 3 * offF),
    cool(resetF, 45),
  ]);
}
const judged = (stretches: Stretch[]) => judge(readRun([...stretches, heat(145, 40)], probe));

/** Bursts of a limit: short swings well under the band. */
function bursts(): Stretch[] {
  return Array.from({ length: 10 }, (_, i) => [
    heat(128, i === 0 ? 120 : 15),
    cool(119, 25),
  ]).flat();
}

const normal = judged(cyclesOf(155, 90));

describe('a duct-off run beside a duct-on run', () => {
  test('normal without, bursts with the duct: consistent with the house duct', () => {
    const pair = compareDuctPair(normal, judged(bursts()), 0);

    expect(pair).toMatchObject({ verdict: 'house-duct', why: null });
    expect(pair.signs).toContain('limit-bursts');
  });

  test('peaks 8 °F higher and heats half as long with the duct on: the house duct', () => {
    const pair = compareDuctPair(normal, judged(cyclesOf(163, 45)), 0);

    expect(pair.verdict).toBe('house-duct');
    expect(pair.signs).toEqual(expect.arrayContaining(['runs-hot', 'short-heats']));
    expect((pair.differences.cutOuts?.difference ?? 0) * 1.8).toBeCloseTo(8, 0);
  });

  test('alike both ways and sound: the duct makes no difference', () => {
    const pair = compareDuctPair(normal, judged(cyclesOf(155.5, 92)), 0);

    expect(pair).toMatchObject({ verdict: 'same-both-ways', sharedFault: null, signs: [] });
  });

  test('bursts both ways are the machine’s own', () => {
    const pair = compareDuctPair(judged(bursts()), judged(bursts()), 0);

    expect(pair).toMatchObject({ verdict: 'same-both-ways', sharedFault: 'limit-cycling' });
  });

  test('a fault without the duct that the other run lacks is no measure for the duct', () => {
    const pair = compareDuctPair(judged(cyclesOf(180, 90)), normal, 0);

    expect(pair).toMatchObject({ verdict: 'cannot-tell', why: 'odd-without-duct', signs: [] });
  });

  test('cooler with the duct on is told, and not called restricted', () => {
    const pair = compareDuctPair(judged(cyclesOf(158, 90)), judged(cyclesOf(152, 90)), 0);

    expect(pair).toMatchObject({ verdict: 'cannot-tell', why: 'other-way' });
  });

  test('one cut-out is too little to compare', () => {
    const short = judge(readRun([heat(155, 270), cool(130, 45), heat(150, 60)], probe));

    expect(compareDuctPair(normal, short, 0)).toMatchObject({
      verdict: 'cannot-tell',
      why: 'few-cycles',
    });
  });

  test('another probe’s doubt keeps a small difference from being called', () => {
    const on = judged(cyclesOf(162, 90));

    expect(compareDuctPair(normal, on, 0).signs).toContain('runs-hot');
    // 2 °C one standard error against a difference of 3.9 °C: 1.9 of them.
    expect(compareDuctPair(normal, on, 2).signs).not.toContain('runs-hot');
  });

  test('the first cut-out’s time is told where both started cold', () => {
    const pair = compareDuctPair(normal, judged(cyclesOf(155, 90, 130, 150)), 0);

    expect(pair.firstCutOutS?.off).toBeCloseTo(270, -1);
    expect(pair.firstCutOutS?.on).toBeCloseTo(150, -1);
  });
});
