import { describe, expect, test } from 'vitest';
import type { ReferenceRun } from '#shared/analysis/analysis.ts';
import { findHeatStaysOn } from '#shared/analysis/findings/heat-stays-on.ts';
import type { LegFit, RunFacts } from '#shared/analysis/run-facts.ts';
import type { MarkKind } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';
import { buildFacts, type Turn } from './build-facts.ts';

/** Rounds from 155 to 130 °F with falls of the given lengths, s, 90 s of heat between; the end some way up. */
function withFalls(fallsS: number[], more: Turn[] = []): Turn[] {
  const turns: Turn[] = [{ timeS: 0, tempF: 72 }];
  let timeS = 300;
  for (const fallS of fallsS) {
    turns.push({ timeS, tempF: 155 }, { timeS: timeS + fallS, tempF: 130 });
    timeS += fallS + 90;
  }
  return [...turns, ...(more.length > 0 ? more : [{ timeS: timeS - 60, tempF: 138 }])];
}

const howOf = (facts: RunFacts) => findHeatStaysOn(facts)?.evidence.how;

describe('a fall through the same temperatures', () => {
  test.each([
    [[45, 45, 45, 45], undefined],
    [[45, 45, 74, 45], undefined],
    [[45, 45, 80, 80], 'falls-slowly'],
  ])('of %j s: %s', (fallsS, how) => {
    expect(howOf(buildFacts(withFalls(fallsS)))).toBe(how);
  });

  test('tells what share of the clean rate it has', () => {
    const { evidence } = findHeatStaysOn(buildFacts(withFalls([45, 45, 90])))!;

    expect(evidence.shareOfUsualRate).toBeCloseTo(0.5, 2);
  });

  test('twice as slow by a few seconds is a matter of the readings', () => {
    expect(howOf(buildFacts(withFalls([10, 10, 20, 20])))).toBeUndefined();
  });

  test.each<MarkKind>(['door', 'duct-off', 'heat-off', 'stopped'])(
    'that a mark of %s disturbs is no measure',
    (kind) => {
      const marks = [{ timeS: 600, kind }];

      // The third fall runs from 570 to 660 s.
      expect(howOf(buildFacts(withFalls([45, 45, 90])))).toBe('falls-slowly');
      expect(howOf(buildFacts(withFalls([45, 45, 90]), { marks }))).toBeUndefined();
    },
  );

  test('from a peak 6 °F lower does not compare: that drum is less hot', () => {
    const turns = withFalls([45, 45, 80, 80]).map((turn) =>
      turn.timeS >= 570 && turn.tempF === 155 ? { ...turn, tempF: 148 } : turn,
    );

    expect(howOf(buildFacts(turns))).toBeUndefined();
  });
});

describe('a fall that is the only one', () => {
  const once = withFalls([90]);
  // The clean run's fall from 155 heads for 60 °F: through 145 to 137 as fast as τ = 90 s lets it.
  const clean = (tauS: number): ReferenceRun => ({
    cycles: 5,
    onS: 90,
    offS: 45,
    swingK: 25 / 1.8,
    fall: {
      fromC: toCelsius(155, 'F'),
      toC: toCelsius(130, 'F'),
      asymptoteC: toCelsius(72, 'F'),
      tauS,
    },
  });

  test('has nothing to be compared with', () => {
    expect(howOf(buildFacts(once))).toBeUndefined();
  });

  // From 150 to 135 °F a line takes 54 s of 90; the clean run τ·ln(78/63): 0.2136 τ.
  test.each([
    [140, 'falls-slowly'],
    [160, undefined],
  ])('against the machine’s clean run of τ = %s s: %s', (tauS, how) => {
    expect(howOf(buildFacts(once, { reference: clean(tauS) }))).toBe(how);
  });
});

describe('a last fall that does not reach the reset band', () => {
  // Clean off-times of 45 s: three of them are 135 s; the band ends at 125 °F.
  test.each([
    [130, undefined],
    [140, 'hangs'],
  ])('after %s s: %s', (lastS, how) => {
    const fromS = 570;
    const turns = withFalls(
      [45, 45],
      [
        { timeS: fromS, tempF: 155 },
        { timeS: fromS + lastS, tempF: 138 },
      ],
    );
    // Alone the time above the band counts: 17 °F in that time is slow, so that the slow fall is looked for last.
    const found = findHeatStaysOn(buildFacts(turns));

    expect(found?.evidence.how === 'hangs' ? 'hangs' : undefined).toBe(how);
  });

  test('tells how long it hung, and the usual time off', () => {
    const last = [
      { timeS: 570, tempF: 155 },
      { timeS: 770, tempF: 138 },
    ];
    const found = findHeatStaysOn(buildFacts(withFalls([45, 45], last)));

    expect(found?.evidence).toMatchObject({ hangS: 200, usualOffS: 45 });
  });
});

describe('a fall that has a fit', () => {
  const fit = (asymptoteF: number, errorF: number): LegFit => ({
    asymptoteC: toCelsius(asymptoteF, 'F'),
    asymptoteErrorK: errorF / 1.8,
    tauS: 100,
    tauErrorS: 5,
    startC: toCelsius(155, 'F'),
    fromS: 310,
    toS: 440,
    covarianceKS: 0,
    residualSdK: 0.1,
  });
  /** From 155 at 300 s: 130 s long, to 128 °F, heading for a temperature. */
  function heading(asymptoteF: number, errorF = 0.5, told = {}): RunFacts {
    const turns: Turn[] = [
      { timeS: 0, tempF: 72 },
      { timeS: 300, tempF: 155 },
      { timeS: 450, tempF: 128 },
    ];
    const facts = buildFacts(turns, told);
    const legs = facts.legs.map((leg, i) =>
      i === 1 ? { ...leg, fit: fit(asymptoteF, errorF) } : leg,
    );
    return { ...facts, legs };
  }

  // It lasted 150 s and more than one τ; the reset band ends at 125 °F, and twice the error is 1 °F.
  test.each([
    [127, 'levels-off'],
    [125.5, undefined],
    [90, undefined],
  ])('and heads for %s °F: %s', (asymptoteF, how) => {
    expect(howOf(heading(asymptoteF))).toBe(how);
  });

  test('with an asymptote hardly known is let go', () => {
    expect(howOf(heading(127, 3))).toBeUndefined();
  });

  test('is not judged without a rating', () => {
    expect(howOf(heading(127, 0.5, { rating: null }))).toBeUndefined();
  });
});

describe('a last rise that goes level', () => {
  const level = (atF: number, forS: number): Turn[] => [
    { timeS: 660, tempF: atF },
    { timeS: 660 + forS, tempF: atF + 0.1 },
  ];

  // Its own cut-outs lie at 155; two minutes there with no cut-out are not just slow.
  test.each([
    [155.5, 130, 'levels-off'],
    [155.5, 110, undefined],
    [153, 300, undefined],
  ])('at %s °F for %s s, after cut-outs at 155: %s', (atF, forS, how) => {
    const rounds = withFalls([45, 45], level(atF, forS));
    // The last leg ends at the record's end: the plateau is its tail.
    const [end] = rounds.slice(-1);
    const facts = buildFacts([...rounds.slice(0, -2), { ...end!, tempF: atF + 0.1 }]);
    const plateau = buildFacts(rounds);

    expect(howOf({ ...facts, series: plateau.series, binned: plateau.binned })).toBe(how);
  });
});

test('one clean round and no more keeps its silence', () => {
  expect(howOf(buildFacts(withFalls([45])))).toBeUndefined();
});
