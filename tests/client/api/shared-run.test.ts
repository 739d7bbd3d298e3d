import { describe, expect, test } from 'vitest';
import { ApiError } from '#client/api/http.ts';
import { matches } from '#client/api/matches.ts';
import { sharedRunChecker, shopToReach } from '#client/api/shared-run.ts';
import { sharedRunSchema } from '#shared/schemas/shares.ts';

const shared = {
  shop: {
    name: 'Harrow Lane',
    town: 'Tessford',
    phone: '555-0100',
    email: 'a@b.example',
    zone: 'UTC',
  },
  unit: 'F',
  customerName: 'Joan Pettifer',
  address: '2 Mill Lane',
  technician: 'Ada Quill',
  machine: { make: 'Norrin', model: '7100', fuel: 'electric', place: '' },
  jobNumber: 1181,
  complaint: 'Damp towels',
  runAtMs: 1,
  duct: 'on',
  load: 'empty',
  probeAccuracyK: null,
  judgedBy: null,
  analysis: {
    ...{ version: '1', samples: 3, durationS: 3, spikes: 0, gaps: [], noiseK: 0.1 },
    ...{ cutOuts: [], resets: [], cycles: [], legs: [], outcome: 'not-proven' },
    findings: [{ code: 'too-short', fromS: 0, toS: 3, evidence: { reason: 'few-readings' } }],
    ...{ notJudged: null, guardAlarmS: null },
  },
  notes: [{ timeS: 1, tempC: 20, text: 'Start' }],
  trace: [[0, 20, 21]],
};

describe('the check without a schema library', () => {
  test('takes what the shared schema takes', () => {
    expect(sharedRunSchema.safeParse(shared).success).toBe(true);
    expect(sharedRunChecker.parse(shared)).toBe(shared);
  });

  test.each(Object.keys(sharedRunSchema.shape))('refuses an answer without its %s', (field) => {
    const rest = Object.fromEntries(Object.entries(shared).filter(([name]) => name !== field));

    expect(() => sharedRunChecker.parse(rest)).toThrow('could not read');
  });

  test('refuses a finding, a call and a trace that it does not know', () => {
    const finding = { ...shared.analysis.findings[0], code: 'unheard-of' };
    const analysis = { ...shared.analysis, findings: [finding] };

    expect(() => sharedRunChecker.parse({ ...shared, analysis })).toThrow();
    expect(() => sharedRunChecker.parse({ ...shared, trace: [[0, '20', 21]] })).toThrow();
    expect(() => sharedRunChecker.parse(null)).toThrow();
  });
});

test('numbers must be finite and lists be of one kind', () => {
  expect(matches(NaN, 'number')).toBe(false);
  expect(matches([1, 2], ['number'])).toBe(true);
  expect(matches({ a: null }, { fields: { a: { orNull: 'string' } } })).toBe(true);
});

test('a link that does not open says how to reach the shop', () => {
  const shop = { name: 'Harrow Lane', phone: '555-0100', email: 'a@b.example' };
  const refusal = { code: 'link-not-open', message: 'This link does not open.', shop };

  expect(shopToReach(new ApiError(404, refusal))).toEqual(shop);
  expect(shopToReach(new ApiError(500, { code: 'unexpected', message: 'x' }))).toBeNull();
});
