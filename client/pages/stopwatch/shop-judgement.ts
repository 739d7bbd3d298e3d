import type { Analysis } from '#shared/analysis/analysis.ts';
import type { StoredAnalysis } from '#shared/schemas/runs.ts';
import { ApiError, fetchJson } from '../../api/http.ts';
import { matches, type Shape } from '../../api/matches.ts';

/** The shop's newest answer on a run, as far as it is shown beside that of the phone. */
export type ShopJudgement = { analysis: Analysis; judgedBy: StoredAnalysis['judgedBy'] };

const POINT: Shape = {
  fields: {
    ...{ kind: 'string', timeS: 'number', tempC: 'number', uTotalK: 'number' },
    call: { orNull: 'string' },
  },
};
const SHAPE: Shape = {
  fields: {
    analysis: {
      fields: {
        judgedBy: { orNull: { fields: { opensC: 'number', highLimitC: 'number' } } },
        analysis: {
          fields: {
            version: 'string',
            outcome: { oneOf: ['stop', 'proven', 'not-proven'] },
            findings: [{ fields: { code: 'string', evidence: 'any' } }],
            ...{ cutOuts: [POINT], resets: [POINT] },
          },
        },
      },
    },
  },
};

/** By hand, as everything on this page: the schemas would be half of what it loads. */
export const shopJudgementChecker = {
  parse(answer: unknown): ShopJudgement {
    if (isRunPage(answer)) return answer.analysis;
    throw new Error('The page could not read what the shop’s server sent.');
  },
};

function isRunPage(answer: unknown): answer is { analysis: ShopJudgement } {
  return matches(answer, SHAPE);
}

/** @returns null: the shop has the run's readings and has not judged it yet */
export async function findShopJudgement(runId: string): Promise<ShopJudgement | null> {
  try {
    return await fetchJson(shopJudgementChecker, `/api/runs/${runId}`);
  } catch (error) {
    if (error instanceof ApiError && error.status === 404) return null;
    throw error;
  }
}
