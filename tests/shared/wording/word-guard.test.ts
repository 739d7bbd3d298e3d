import { describe, expect, test } from 'vitest';
import type { GuardSays, GuardView, GuardWhy } from '#shared/analysis/guard/guard-state.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { wordGuard, type AboutGuard } from '#shared/wording/word-guard.ts';

const ABOUT: AboutGuard = { unit: 'F', fuel: 'electric', rating: DEFAULT_RATING, nowS: 600 };
const QUIET: GuardView = { says: 'quiet', why: null, forecast: null, unconfirmed: null };
const REASONS: GuardWhy[] = [
  'at-ceiling',
  'limit-near',
  'above-band',
  'above-cut-outs',
  'after-click',
  'not-falling-yet',
  'climbs-after-off',
];

describe('the guard in words', () => {
  test('says how long it is to the fuse’s rating, with its interval', () => {
    const highLimit = { earliestS: 680, likelyS: 700, latestS: null };

    const { forecast } = wordGuard(
      { ...QUIET, says: 'watch', why: 'above-band', forecast: { ceiling: null, highLimit } },
      ABOUT,
    );

    expect(forecast).toBe(
      'At this rate the fuse’s rating of 196\u00a0°F is reached in 1\u00a0min 40\u00a0s: at the earliest in 1\u00a0min 20\u00a0s, or later.',
    );
  });

  test('tells to turn the heat off, and what to do if that does not help', () => {
    const worded = wordGuard({ ...QUIET, says: 'cut-heat', why: 'at-ceiling' }, ABOUT);

    expect(worded.words).toBe('Turn the heat off now');
    expect(worded.why).toContain('190\u00a0°F');
    expect(worded.instructions.join(' ')).toContain('pull the plug or open the breaker');
  });

  test('tells to pull the plug, and on a gas machine to shut off the gas', () => {
    const view: GuardView = { ...QUIET, says: 'unplug', why: 'climbs-after-off' };

    const gas = wordGuard(view, { ...ABOUT, fuel: 'gas' });

    expect(gas.words).toBe('Pull the plug or open the breaker now');
    expect(gas.instructions.join(' ')).toContain('Shut off the gas.');
    expect(wordGuard(view, ABOUT).instructions.join(' ')).not.toContain('gas');
  });

  test('asks for a second reading where one is far off', () => {
    const unconfirmed = { timeS: 600, tempC: (250 - 32) / 1.8 };

    expect(wordGuard({ ...QUIET, unconfirmed }, ABOUT).doubt).toBe(
      '250.0\u00a0°F is far off the forecast. Read again now.',
    );
  });

  test.each(REASONS)('never speaks of bypassing anything, and does not shout (%s)', (why) => {
    for (const says of ['watch', 'cut-heat', 'unplug'] satisfies GuardSays[]) {
      const all = JSON.stringify(wordGuard({ ...QUIET, says, why }, { ...ABOUT, fuel: 'gas' }));

      expect(all).not.toMatch(/bypass|jump|!/i);
    }
  });
});
