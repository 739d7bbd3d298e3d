import { notFound } from '#server/errors.ts';
import { probeOf } from '#shared/judging/judged-by.ts';
import type { AnalysisRepository } from '#server/runs/analysis-repository.ts';
import type { RunReadings } from '#server/runs/run-readings.ts';
import type { RunService } from '#server/runs/run-service.ts';
import type { RunSources } from '#server/runs/run-sources.ts';
import type { SharedRun } from '#shared/schemas/shares.ts';
import type { StoredShare } from './share-repository.ts';

const TRACE_COLUMNS = 1200;

export type SharedRunParts = {
  runs: RunService;
  analyses: AnalysisRepository;
  readings: RunReadings;
  sources: RunSources;
};

/** All that the customer's page shows; what is not named here never leaves the shop. */
export function createSharedRuns({ runs, analyses, readings, sources }: SharedRunParts) {
  return async (share: StoredShare): Promise<SharedRun> => {
    const run = await runs.get(share.runId);
    const judged = await analyses.find(share.analysisId);
    if (!judged) throw notFound();
    const { visit, job, machine, home, customer } = await sources.visitFacts(run.visitId);
    const { name, town, phone, email, zone, unit } = await sources.shop();
    const { probeId, duct, load } = run.conditions;
    const probe = probeId === null ? undefined : await sources.findProbe(probeId);
    const { make, model, fuel, place } = machine;
    return {
      shop: { name, town, phone, email, zone },
      unit,
      customerName: customer.name,
      address: home.address,
      technician: visit.technician.name,
      machine: { make, model, fuel, place },
      jobNumber: job.number,
      complaint: job.complaint,
      runAtMs: run.startedAtMs,
      duct,
      load,
      probeAccuracyK: probe ? probeOf(probe).accuracyK : null,
      judgedBy: judged.judgedBy,
      analysis: judged.analysis,
      notes: share.notes,
      trace: await readings.columns(run, 0, TRACE_COLUMNS, judged.judgedWith?.correction ?? null),
    };
  };
}
