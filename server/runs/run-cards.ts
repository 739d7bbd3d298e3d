import type { Knex } from 'knex';
import type { JudgedBy, RunCard } from '#shared/schemas/runs.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import type { AnalysisHead, Run } from './run.ts';
import { createRunRepository } from './run-repository.ts';

export type RunCards = ReturnType<typeof createRunCards>;

/** Runs in lists: enough for a spark, its calls and its outcome. */
export function createRunCards(db: Knex) {
  const runs = createRunRepository(db);
  const analyses = createAnalysisRepository(db);

  /** Of these visits, newest run first, each as its newest analysis sees it. */
  async function listByVisits(visitIds: string[]): Promise<RunCard[]> {
    const found = await runs.listByVisits(visitIds);
    const newest = new Map<string, AnalysisHead>();
    for (const head of await analyses.listHeads(found.map(({ id }) => id))) {
      if (!newest.has(head.runId)) newest.set(head.runId, head);
    }
    return found.flatMap((run) => {
      const head = newest.get(run.id);
      return head ? [toCard(run, head)] : [];
    });
  }

  return {
    listByVisits,

    /** The same, by visit; a visit without runs has no entry. */
    async byVisit(visitIds: string[]): Promise<Map<string, RunCard[]>> {
      const cards = new Map<string, RunCard[]>();
      for (const card of await listByVisits(visitIds)) {
        cards.set(card.visitId, [...(cards.get(card.visitId) ?? []), card]);
      }
      return cards;
    },
  };
}

function toCard(run: Run, head: AnalysisHead): RunCard {
  return {
    id: run.id,
    visitId: run.visitId,
    label: run.label,
    startedAtMs: run.startedAtMs,
    samples: run.samples,
    durationS: run.durationS,
    outcome: head.outcome,
    headline: head.headline,
    calls: head.calls,
    trace: run.spark,
    bands: head.judgedBy && toBands(head.judgedBy),
  };
}

function toBands({ opensC, opensTolK, closesC, closesTolK, highLimitC }: JudgedBy) {
  return { opensC, opensTolK, closesC, closesTolK, highLimitC };
}
