import type { Knex } from 'knex';
import { z } from 'zod';
import { FINDING_CODES } from '#shared/analysis/analysis.ts';
import {
  analysisSchema,
  judgedBySchema,
  judgedWithSchema,
  type JudgedWith,
  type StoredAnalysis,
} from '#shared/schemas/runs.ts';
import type { AnalysisHead, NewAnalysis } from './run.ts';

type HeadRow = {
  id: string;
  run_id: string;
  version: string;
  made_at_ms: number | string;
  judged_by: string | null;
  outcome: string;
  headline: string;
  calls: string;
};
type AnalysisRow = HeadRow & { judged_with: string | null; result: string };

const HEAD = [
  'id',
  'run_id',
  'version',
  'made_at_ms',
  'judged_by',
  'outcome',
  'headline',
  'calls',
] as const;
const NEWEST_FIRST = [
  { column: 'made_at_ms', order: 'desc' },
  { column: 'id', order: 'desc' },
];

const headWordsSchema = z.object({
  outcome: z.enum(['stop', 'proven', 'not-proven']),
  headline: z.enum(FINDING_CODES),
  calls: z.array(z.enum(['inside', 'outside', 'within-allowance', 'too-close'])),
});

export type AnalysisRepository = ReturnType<typeof createAnalysisRepository>;

/** Results: none is ever changed, a later one stands beside it. */
export function createAnalysisRepository(db: Knex) {
  return {
    async insert(analysis: NewAnalysis): Promise<void> {
      await db<AnalysisRow>('analyses').insert({
        id: analysis.id,
        run_id: analysis.runId,
        version: analysis.version,
        made_at_ms: analysis.madeAtMs,
        judged_by: analysis.judgedBy && JSON.stringify(analysis.judgedBy),
        judged_with: analysis.judgedWith && JSON.stringify(analysis.judgedWith),
        outcome: analysis.outcome,
        headline: analysis.headline,
        calls: JSON.stringify(analysis.calls),
        result: analysis.resultJson,
      });
    },

    async find(id: string): Promise<StoredAnalysis | undefined> {
      const row = await db<AnalysisRow>('analyses').where({ id }).first();
      return row && toAnalysis(row);
    },

    /** What the newest result of a run was judged with. */
    async newestJudgedWith(runId: string): Promise<JudgedWith | null> {
      const row = await db<AnalysisRow>('analyses')
        .select('judged_with')
        .where({ run_id: runId })
        .orderBy(NEWEST_FIRST)
        .first();
      return toJudgedWith(row?.judged_with ?? null);
    },

    /** Of these runs, newest first, without the results themselves. */
    async listHeads(runIds: string[]): Promise<AnalysisHead[]> {
      const rows = await db<AnalysisRow>('analyses')
        .select(...HEAD)
        .whereIn('run_id', runIds)
        .orderBy(NEWEST_FIRST);
      return rows.map(toHead);
    },
  };
}

function toHead(row: HeadRow): AnalysisHead {
  const { outcome, headline, calls } = row;
  return {
    id: row.id,
    runId: row.run_id,
    version: row.version,
    madeAtMs: Number(row.made_at_ms),
    judgedBy: toJudgedBy(row.judged_by),
    ...headWordsSchema.parse({ outcome, headline, calls: JSON.parse(calls) }),
  };
}

function toAnalysis(row: AnalysisRow): StoredAnalysis {
  return {
    id: row.id,
    madeAtMs: Number(row.made_at_ms),
    judgedBy: toJudgedBy(row.judged_by),
    judgedWith: toJudgedWith(row.judged_with),
    analysis: analysisSchema.parse(JSON.parse(row.result)),
  };
}

function toJudgedBy(text: string | null) {
  return text === null ? null : judgedBySchema.parse(JSON.parse(text));
}

function toJudgedWith(text: string | null) {
  return text === null ? null : judgedWithSchema.parse(JSON.parse(text));
}
