import { describe, expect, test } from 'vitest';
import { createDeviceEngine } from '#client/device/engine/device-engine.ts';
import type { AnalyseRun } from '#client/device/engine/engine-task.ts';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Analysis, AnalysisInput } from '#shared/analysis/analysis.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { toCelsius } from '#shared/units.ts';
import { compareJudgements } from '#shared/wording/compare-judgements.ts';
import { wordJudgements } from '#shared/wording/word-judgements.ts';
import { cyclingTemps } from '#tests/support/cycling-log.ts';

const tempsF = cyclingTemps(240, { opensF: 155, closesF: 130 });
const SERIES = {
  timesS: Float64Array.from(tempsF, (_, i) => i * 5),
  tempsC: Float64Array.from(tempsF, (tempF) => toCelsius(tempF, 'F')),
};
const INPUT: AnalysisInput = {
  rating: DEFAULT_RATING,
  probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
  ...{ marks: [], load: 'empty', roomC: null, minCycles: 3, swingK: 4 / 1.8, reference: null },
};
const ABOUT = { unit: 'F', judgedBy: DEFAULT_RATING, fuel: 'electric' } as const;

/** Engines of other versions: the same under another number; one that sees no swing under 20 K; one with a low limit. */
const renumbered: AnalyseRun = (...run) => ({ ...analyseRun(...run), version: '1' });
const blunt: AnalyseRun = (series, input) => ({
  ...analyseRun(series, { ...input, swingK: 20 }),
  version: '1',
});
const fearful: AnalyseRun = (series, input) => ({
  ...analyseRun(series, { ...input, rating: { ...DEFAULT_RATING, ceilingC: 60 } }),
  version: '3',
});

/** What a phone with this engine answers, by the way that the page asks it. */
function onPhoneWith(engine: AnalyseRun): Promise<Analysis> {
  const noWorker = () => {
    throw new Error('none here');
  };
  const parts = { openWorker: noWorker, importHere: () => Promise.resolve(engine) };
  return createDeviceEngine(parts).judge(SERIES, INPUT, () => {});
}

const atShop = analyseRun(SERIES, INPUT);
const shop = { analysis: atShop, about: ABOUT };

async function told(engine: AnalyseRun) {
  const analysis = await onPhoneWith(engine);
  const compared = compareJudgements(analysis, atShop, 'F');
  return { compared, words: wordJudgements({ analysis, about: ABOUT }, shop, compared) };
}

describe('the phone’s answer beside the shop’s', () => {
  test('of one version and the same takes one line', async () => {
    const { words } = await told(analyseRun);

    expect(words).toEqual({ heading: 'The shop’s analysis agrees.', sentences: [], sides: [] });
  });

  test('of another version and the same names both versions, and which is older', async () => {
    const { words } = await told(renumbered);

    expect(words.heading).toBe('The shop’s analysis agrees.');
    expect(words.sentences.join(' ')).toContain('version 1, the shop by version 2');
    expect(words.sentences.join(' ')).toContain('phone’s is older');
    expect(words.sides).toEqual([]);
  });

  test('that finds something else is set beside the shop’s, and the shop’s counts', async () => {
    const { compared, words } = await told(blunt);

    expect(compared.apart).toContain('findings');
    expect(compared.apart).toContain('points');
    expect(words.heading).toBe('The shop’s analysis differs.');
    expect(words.sentences.join(' ')).toContain('The shop’s answer counts');
    expect(words.sides.map(({ name }) => name)).toEqual([
      'This phone, engine version 1',
      'The shop, engine version 2',
    ]);
    expect(words.sides[1]?.verdict).toBe('Proven by this run.');
    expect(words.sides[0]?.verdict).toBe('Not proven by this run.');
  });

  test('that alone says stop is to be heeded, whichever counts', async () => {
    const { compared, words } = await told(fearful);

    expect(compared.apart[0]).toBe('outcome');
    expect(words.sentences.join(' ')).toContain('One of the two says stop');
    expect(words.sentences.join(' ')).toContain('shop’s is older');
  });

  test('of one version that differs went by other facts', async () => {
    const { words } = await told((...run) => ({ ...fearful(...run), version: atShop.version }));

    expect(words.sentences.join(' ')).toContain('by the same engine, by other facts');
  });
});

describe('two answers', () => {
  const moved = (byK: number): Analysis => ({
    ...atShop,
    cutOuts: atShop.cutOuts.map((point) => ({ ...point, tempC: point.tempC + byK })),
  });

  test('differ in a figure only where it is printed differently', () => {
    expect(compareJudgements(atShop, moved(1e-9), 'F').apart).toEqual([]);
    expect(compareJudgements(atShop, moved(0.2), 'F').apart).toEqual(['figures']);
  });

  test('differ in a call although every figure is alike', () => {
    const [first, ...others] = atShop.resets;
    if (!first) throw new Error('no reset');
    const other: Analysis = { ...atShop, resets: [{ ...first, call: 'too-close' }, ...others] };

    expect(compareJudgements(atShop, other, 'F').apart).toEqual(['calls']);
  });
});
