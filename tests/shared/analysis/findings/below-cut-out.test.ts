import { describe, expect, test } from 'vitest';
import { findBelowCutOut } from '#shared/analysis/findings/below-cut-out.ts';
import type { RunFacts } from '#shared/analysis/run-facts.ts';
import { toCelsius } from '#shared/units.ts';
import { buildFacts } from './build-facts.ts';

type Rise = { levelF: number; quick: number; tausS: [number, number]; forS: number };

/** A rise of two first-order parts (air, then the drum's metal) from 72 °F, with every reading as it is. */
function rising({ levelF, quick, tausS: [quickS, slowS], forS }: Rise, told = {}): RunFacts {
  const at = (timeS: number) =>
    levelF -
    (levelF - 72) * (quick * Math.exp(-timeS / quickS) + (1 - quick) * Math.exp(-timeS / slowS));
  const facts = buildFacts(
    [
      { timeS: 0, tempF: 72 },
      { timeS: forS, tempF: at(forS) },
    ],
    told,
  );
  const tempsC = facts.series.timesS.map((timeS) => toCelsius(at(timeS), 'F'));
  const series = { timesS: facts.series.timesS, tempsC };
  return { ...facts, series, binned: { ...facts.binned, tempsC, smoothC: tempsC } };
}

const WEAK: Rise = { levelF: 140, quick: 0.7, tausS: [100, 500], forS: 2400 };

describe('a rise in two parts, as of air and drum', () => {
  test.each([105, 125, 140, 146])(
    'that ends level at %s °F after 40 minutes is below the cut-out',
    (levelF) => {
      const found = findBelowCutOut(rising({ ...WEAK, levelF }));

      expect(found?.evidence.asymptoteC).toBeCloseTo(toCelsius(levelF, 'F'), 0);
    },
  );

  test.each([152, 156, 160])('that would reach %s °F is not, however slowly', (levelF) => {
    for (const forS of [300, 600, 1200, 2400]) {
      for (const slowS of [250, 500, 900]) {
        const rise = { ...WEAK, levelF, tausS: [80, slowS] as [number, number], forS };

        expect(findBelowCutOut(rising(rise)), `${forS} s, τ ${slowS} s`).toBeNull();
      }
    }
  });

  test('that has been level for so long that no curve is left is still told, by its last rate', () => {
    const found = findBelowCutOut(rising({ ...WEAK, tausS: [40, 60] }));

    expect(found?.evidence.lastC).toBeCloseTo(toCelsius(140, 'F'), 3);
  });

  test('cut short after four minutes says too little', () => {
    expect(findBelowCutOut(rising({ ...WEAK, forS: 240 }))).toBeNull();
  });

  test('with a damp load says nothing of the heater', () => {
    expect(findBelowCutOut(rising(WEAK, { load: 'damp' }))).toBeNull();
    expect(findBelowCutOut(rising(WEAK, { load: 'empty' }))).not.toBeNull();
  });

  test('is left open where the probe could be off by as much as is left to the band', () => {
    // 145 ± 8 °F (rectangular, 9.2 °F expanded) reaches 150.
    const probe = { accuracyK: 8 / 1.8, calibrationUK: 0, correction: null, responseS: null };

    expect(findBelowCutOut(rising({ ...WEAK, levelF: 145 }))).not.toBeNull();
    expect(findBelowCutOut(rising({ ...WEAK, levelF: 145 }, { probe }))).toBeNull();
  });

  test('without a rating has no band to be below', () => {
    expect(findBelowCutOut(rising(WEAK, { rating: null }))).toBeNull();
  });
});

describe('after cut-outs of its own', () => {
  const rounds = [
    { timeS: 0, tempF: 72 },
    { timeS: 300, tempF: 155 },
    { timeS: 345, tempF: 130 },
    { timeS: 435, tempF: 155 },
    { timeS: 480, tempF: 130 },
  ];

  /** The last rise from 130 °F heads for 142 with a τ of 60 s. */
  function lastRise(forS: number): RunFacts {
    const facts = buildFacts([...rounds, { timeS: 480 + forS, tempF: 142 }]);
    const tempsC = facts.series.tempsC.map((tempC, i) => {
      const sinceS = facts.series.timesS[i]! - 480;
      return sinceS <= 0 ? tempC : toCelsius(142 - 12 * Math.exp(-sinceS / 60), 'F');
    });
    return { ...facts, binned: { ...facts.binned, tempsC, smoothC: tempsC } };
  }

  // Its heats lasted 90 s: three of them are 270 s, but no less than the 400 s that a last rate is read over.
  test.each([
    [250, undefined],
    [700, 'below-cut-out'],
  ])('a rise that goes level under the band for %s s is %s', (forS, code) => {
    expect(findBelowCutOut(lastRise(forS))?.code).toBe(code);
  });

  test('tells how many cut-outs came before', () => {
    expect(findBelowCutOut(lastRise(700))?.evidence.cutOutsBefore).toBe(2);
  });
});
