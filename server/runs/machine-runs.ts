import type { Knex } from 'knex';
import type { Analysis } from '#shared/analysis/analysis.ts';
import type { FittedPart, MachinePage } from '#shared/schemas/homes.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import type { Run } from './run.ts';
import { createRunRepository } from './run-repository.ts';
import type { RunSources } from './run-sources.ts';

/** A run and its newest result. */
export type JudgedRun = { run: Run; analysis: Analysis };

export type MachineRuns = ReturnType<typeof createMachineRuns>;

/** The runs of one machine, to set beside each other. */
export function createMachineRuns(db: Knex, sources: Pick<RunSources, 'runsOfMachine'>) {
  const runs = createRunRepository(db);
  const analyses = createAnalysisRepository(db);

  return {
    /** Newest first. */
    async list(machineId: string): Promise<Run[]> {
      const cards = await sources.runsOfMachine(machineId);
      return runs.listByVisits([...new Set(cards.map(({ visitId }) => visitId))]);
    },

    /** Those of them whose newest result is one finding, in band; in the order given. */
    async onlyClean(candidates: Run[]): Promise<Run[]> {
      const newest = new Map<string, string>();
      for (const head of await analyses.listHeads(candidates.map(({ id }) => id))) {
        if (!newest.has(head.runId)) newest.set(head.runId, head.headline);
      }
      return candidates.filter(({ id }) => newest.get(id) === 'in-band');
    },

    async judged(run: Run): Promise<JudgedRun> {
      const [newest] = await analyses.listHeads([run.id]);
      const stored = newest && (await analyses.find(newest.id));
      if (!stored) throw new Error(`run ${run.id} has no analysis`);
      return { run, analysis: stored.analysis };
    },
  };
}

/** Whether the same parts were in the machine at two moments, as far as it is known. */
export function hadSameParts(
  { fitted }: Pick<MachinePage, 'fitted'>,
  atMs: number,
  otherMs: number,
) {
  return fitted.every((part) => wasIn(part, atMs) === wasIn(part, otherMs));
}

/** Whether a part was in the machine at a moment. */
export function wasIn({ fittedAtMs, removedAtMs }: FittedPart, atMs: number): boolean {
  return fittedAtMs <= atMs && (removedAtMs ?? Infinity) > atMs;
}
