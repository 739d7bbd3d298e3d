import { expect, test } from 'vitest';
import { describeDifferences } from '#client/format/describe-differences.ts';
import type { FittedPart } from '#shared/schemas/homes.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';

const ID = '6f1c9df0-5c6e-4a51-9d3c-0a4f6d1f7a10';

function thermostat(name: string, opens: number, closes: number, unit: 'F' | 'C' = 'F') {
  const tolerances = { opensTol: 5, closesTol: 5, overshoot: 10, undershoot: 10 };
  return { id: ID, kind: 'cycling-thermostat', name, unit, opens, closes, ...tolerances } as const;
}

function fuse(name: string, opens: number): StoredRating {
  return { ...thermostat(name, opens, 0), kind: 'thermal-fuse', closes: null, closesTol: null };
}

function fitted(rating: StoredRating, removedAtMs: number | null = null): FittedPart {
  const part = { id: ID, visitId: null, fittedAtMs: 0, supplier: '', lot: '2207-B' };
  return { ...part, rating, removedAtMs, removedWhy: '' };
}

const AS_SPECIFIED = thermostat('HL-155-25', 155, 130);

test('a thermostat of another rating is told with how far it opens off', () => {
  const specified = [{ setting: 'high' as const, rating: AS_SPECIFIED, limit: null }];

  const [words, ...others] = describeDifferences({
    specified,
    fitted: [fitted(thermostat('HL-175-40', 175, 145))],
  });

  expect(others).toEqual([]);
  expect(words).toContain('HL-175-40 is fitted');
  expect(words).toContain('specified to have HL-155-25');
  expect(words).toContain('20\u00a0°F higher than it should');
});

test('the same figures in the other unit are no difference', () => {
  // 155 °F is 68.33 °C and 130 °F is 54.44 °C: NIST SP 811 (2008), appendix B.8.
  const inCelsius = thermostat('HL-C68', 68.3, 54.4, 'C');
  const specified = [{ setting: 'high' as const, rating: AS_SPECIFIED, limit: null }];

  expect(describeDifferences({ specified, fitted: [fitted(inCelsius)] })).toEqual([]);
});

test('one that fits any heat setting of the machine is no difference', () => {
  const specified = [
    { setting: 'high' as const, rating: AS_SPECIFIED, limit: null },
    { setting: 'low' as const, rating: thermostat('HL-135', 135, 115), limit: null },
  ];

  expect(
    describeDifferences({ specified, fitted: [fitted(thermostat('HL-135', 135, 115))] }),
  ).toEqual([]);
});

test('a part that came out is not compared', () => {
  const specified = [{ setting: 'high' as const, rating: AS_SPECIFIED, limit: null }];

  expect(
    describeDifferences({ specified, fitted: [fitted(thermostat('HL-175-40', 175, 145), 1)] }),
  ).toEqual([]);
});

test('a fuse is compared with the specified fuse, not with the thermostat', () => {
  const specified = [
    { setting: 'high' as const, rating: AS_SPECIFIED, limit: fuse('HL-F196', 196) },
  ];

  const words = describeDifferences({
    specified,
    fitted: [fitted(AS_SPECIFIED), fitted(fuse('HL-F180', 180))],
  });

  expect(words).toHaveLength(1);
  expect(words[0]).toContain('HL-F180 is fitted');
  expect(words[0]).toContain('16\u00a0°F lower than it should');
});

test('nothing is compared where nothing is specified', () => {
  expect(describeDifferences({ specified: [], fitted: [fitted(AS_SPECIFIED)] })).toEqual([]);
});
