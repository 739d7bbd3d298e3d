import { describe, expect, test } from 'vitest';
import type { DuctPair } from '#shared/analysis/compare/compare-duct-pair.ts';
import type { SettingsPair } from '#shared/analysis/compare/compare-settings.ts';
import type { WordedPair } from '#shared/wording/pair-words.ts';
import { wordDuctPair } from '#shared/wording/word-duct-pair.ts';
import { wordSettings } from '#shared/wording/word-settings.ts';

const sample = (mean: number) => ({ count: 5, mean, variance: 0.2 });
/** 155 and 163 °F; 90 and 45 s. */
const differences: DuctPair['differences'] = {
  cutOuts: {
    first: sample(123 / 1.8),
    second: sample(131 / 1.8),
    difference: 8 / 1.8,
    within: 1.1 / 1.8,
    pValue: 1e-6,
  },
  overshoots: null,
  onTimes: { first: sample(90), second: sample(45), difference: -45, within: 4, pValue: 1e-6 },
  offTimes: null,
  swings: null,
};

type Told = Partial<DuctPair> & Pick<DuctPair, 'verdict'>;
const TOLD: Told[] = [
  { verdict: 'house-duct', signs: ['limit-bursts', 'runs-hot', 'more-overshoot', 'short-heats'] },
  { verdict: 'same-both-ways' },
  { verdict: 'same-both-ways', sharedFault: 'limit-cycling' },
  { verdict: 'same-both-ways', sharedFault: 'opens-high' },
  { verdict: 'cannot-tell', why: 'few-cycles' },
  { verdict: 'cannot-tell', why: 'near-the-limit' },
  { verdict: 'cannot-tell', why: 'other-way' },
  { verdict: 'cannot-tell', why: 'odd-without-duct' },
];
const ductPairs = TOLD.map((told): DuctPair => ({
  signs: [],
  why: null,
  sharedFault: null,
  differences,
  firstCutOutS: { off: 300, on: 210 },
  ...told,
}));

const settingsPairs: SettingsPair[] = (
  ['as-it-should', 'no-difference', 'not-enough', 'backwards', 'cannot-tell'] as const
).map((verdict) => ({
  verdict,
  why: verdict === 'cannot-tell' ? 'wide' : null,
  lowerByK: 2,
  lowerByWithinK: 0.5,
  expectedK: 15 / 1.8,
  expectedFrom: 'bias-heater',
  differences,
}));

function allWords({ title, sentences, causes, nextChecks }: WordedPair): string {
  const said = causes.flatMap(({ cause, why, settles }) => [cause, why, settles]);
  return [title, ...sentences, ...said, ...nextChecks].join(' ');
}

const everyWording = [
  ...ductPairs.flatMap((pair) =>
    ['electric', 'gas'].map((fuel) => wordDuctPair(pair, { unit: 'F', fuel })),
  ),
  ...settingsPairs.flatMap((pair) =>
    ['thermostat', 'thermistor'].map((control) =>
      wordSettings(pair, { unit: 'F', control, hotter: 'high', cooler: 'low' }),
    ),
  ),
];

describe('the words for a pair of runs', () => {
  test('never praise, shout, or suggest to go round a safety part', () => {
    for (const worded of everyWording) {
      expect(allWords(worded)).not.toMatch(/!|please|oops|success|jumper|bypass/i);
    }
  });

  test('have a title and at least one sentence each', () => {
    for (const { title, sentences } of everyWording) {
      expect(title).not.toBe('');
      expect(sentences.length).toBeGreaterThan(0);
    }
  });

  test('blame nothing for sure: the duct is what it is consistent with', () => {
    const [restricted] = ductPairs;
    const worded = restricted && wordDuctPair(restricted, { unit: 'F', fuel: 'electric' });

    expect(worded?.sentences.join(' ')).toContain('consistent with a restricted house duct');
  });

  test('give a difference of temperatures no offset, and one of times in seconds', () => {
    const [pair] = ductPairs;
    const rows = pair ? wordDuctPair(pair, { unit: 'F', fuel: 'electric' }).rows : [];

    // 131/1.8 °C is 163 °F; 8/1.8 K is 8 °F and not 40.
    expect(rows[0]).toEqual({
      label: 'Cut-outs, mean',
      first: '155.0\u00a0°F',
      second: '163.0\u00a0°F',
      apart: '+8.0\u00a0°F, give or take 1.1\u00a0°F',
    });
    expect(rows[1]).toMatchObject({ first: '1:30', second: '45\u00a0s' });
    expect(rows[1]?.apart).toBe('−45\u00a0s, give or take 4.0\u00a0s');
    expect(rows.at(-1)).toMatchObject({ label: 'First cut-out at', first: '5:00', second: '3:30' });
  });

  test('warn of carbon monoxide on gas, and only there', () => {
    const [pair] = ductPairs;
    const words = (fuel: string) => (pair ? allWords(wordDuctPair(pair, { unit: 'F', fuel })) : '');

    expect(words('gas')).toContain('carbon monoxide');
    expect(words('electric')).not.toContain('carbon monoxide');
  });

  test('give what rounds to nothing no side', () => {
    const [pair] = settingsPairs;
    const none = differences.cutOuts && { ...differences.cutOuts, difference: -0.01 };
    const about = { unit: 'F' as const, control: 'thermostat', hotter: 'high', cooler: 'low' };
    const rows = pair
      ? wordSettings({ ...pair, differences: { ...differences, cutOuts: none } }, about).rows
      : [];

    expect(rows[0]?.apart).toBe('0.0\u00a0°F, give or take 1.1\u00a0°F');
  });

  test('name the bias heater first where the setting makes no difference, and no bias heater on a board', () => {
    const [, none] = settingsPairs;
    const about = { unit: 'F' as const, hotter: 'high', cooler: 'low' };
    if (!none) throw new Error('a pair without a difference');

    // Trade order, common practice: bias heater open or not fed, selector, wiring, type.
    expect(wordSettings(none, { ...about, control: 'thermostat' }).causes[0]?.cause).toBe(
      'Bias heater open, or not fed',
    );
    expect(allWords(wordSettings(none, { ...about, control: 'thermistor' }))).not.toMatch(
      /bias volts|bias heater ohms/i,
    );
  });
});
