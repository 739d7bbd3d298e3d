import { queryOptions } from '@tanstack/react-query';
import { FINDING_CODES } from '#shared/analysis/analysis.ts';
import type { SharedRun } from '#shared/schemas/shares.ts';
import { ApiError, postJson } from './http.ts';
import { matches, type Shape } from './matches.ts';

const CALLS = ['inside', 'outside', 'within-allowance', 'too-close'];
const POINT: Shape = {
  fields: {
    kind: { oneOf: ['cut-out', 'reset'] },
    timeS: 'number',
    tempC: 'number',
    uTotalK: 'number',
    judged: 'boolean',
    call: { orNull: { oneOf: CALLS } },
  },
};
const SPAN = { fromS: 'number', toS: 'number' } as const;
const ANALYSIS: Shape = {
  fields: {
    durationS: 'number',
    gaps: [{ fields: SPAN }],
    cutOuts: [POINT],
    resets: [POINT],
    cycles: ['any'],
    legs: [{ fields: { ...SPAN, kind: 'string' } }],
    findings: [{ fields: { ...SPAN, code: { oneOf: FINDING_CODES }, evidence: { fields: {} } } }],
    outcome: { oneOf: ['stop', 'proven', 'not-proven'] },
  },
};
const JUDGED_BY: Shape = {
  fields: {
    name: 'string',
    opensC: 'number',
    opensTolK: 'number',
    closesC: 'number',
    closesTolK: 'number',
    highLimitC: 'number',
    ceilingC: 'number',
  },
};
const SHARED_RUN: Shape = {
  fields: {
    shop: {
      fields: { name: 'string', town: 'string', phone: 'string', email: 'string', zone: 'string' },
    },
    unit: { oneOf: ['F', 'C'] },
    customerName: 'string',
    address: 'string',
    technician: 'string',
    machine: { fields: { make: 'string', model: 'string', fuel: 'string', place: 'string' } },
    jobNumber: 'number',
    complaint: 'string',
    runAtMs: 'number',
    duct: { oneOf: ['on', 'off'] },
    load: { oneOf: ['empty', 'damp'] },
    probeAccuracyK: { orNull: 'number' },
    judgedBy: { orNull: JUDGED_BY },
    analysis: ANALYSIS,
    notes: [{ fields: { timeS: 'number', tempC: 'number', text: 'string' } }],
    trace: [['number']],
  },
};

/** Checked by hand, so that the customer's page loads no schema library. */
export const sharedRunChecker = {
  parse(answer: unknown): SharedRun {
    if (isSharedRun(answer)) return answer;
    throw new Error('The page could not read what the shop’s server sent.');
  },
};

function isSharedRun(answer: unknown): answer is SharedRun {
  return matches(answer, SHARED_RUN);
}

/** Opens a link. The token goes in the body: no address and no log ever has it. */
export function sharedRunQuery(token: string) {
  return queryOptions({
    queryKey: ['shared', token],
    queryFn: () => postJson(sharedRunChecker, '/api/shared/open', { token }),
    staleTime: Infinity,
  });
}

export type ShopToReach = { name: string; phone: string; email: string };

/** The shop, as a link that does not open names it. */
export function shopToReach(error: Error): ShopToReach | null {
  if (!(error instanceof ApiError)) return null;
  const { answer } = error;
  return hasShop(answer) ? answer.shop : null;
}

function hasShop(answer: unknown): answer is { shop: ShopToReach } {
  const shop: Shape = { fields: { name: 'string', phone: 'string', email: 'string' } };
  return matches(answer, { fields: { shop } });
}
