import type { AppParts } from '#server/app.ts';
import { createAnalysisRepository } from '#server/runs/analysis-repository.ts';
import { dataFolders } from '#server/runs/data-folders.ts';
import { createJudgingOf } from '#server/runs/judging-of.ts';
import { createLogWorker } from '#server/runs/log-worker.ts';
import { createMachineRuns } from '#server/runs/machine-runs.ts';
import { createHandRuns } from '#server/runs/make-hand-run.ts';
import { createNoteRepository } from '#server/runs/note-repository.ts';
import { createNoteService } from '#server/runs/note-service.ts';
import { fileReceiver } from '#server/runs/receive-file.ts';
import { createRunPages } from '#server/runs/run-page.ts';
import { createRunReadings } from '#server/runs/run-readings.ts';
import { createRunService } from '#server/runs/run-service.ts';
import type { RunSources } from '#server/runs/run-sources.ts';
import { createUploadService } from '#server/runs/upload-service.ts';
import { createOpenLimit } from '#server/shares/open-limit.ts';
import { createShareRepository } from '#server/shares/share-repository.ts';
import { createShareService } from '#server/shares/share-service.ts';
import { createSharedRuns } from '#server/shares/shared-run.ts';
import type { JobsWiring } from './wire-jobs.ts';
import type { PeopleWiring } from './wire-people.ts';

export type RunsWiring = ReturnType<typeof wireRuns>;

/** Uploads, runs and their analyses, notes, and links to them. */
export function wireRuns(parts: AppParts, { people, shop, audit }: PeopleWiring, jobs: JobsWiring) {
  const { db, dataDir, now, workers, logger } = parts;
  const sources: RunSources = {
    visitFacts: jobs.visitService.facts,
    findProbe: jobs.probes.find,
    listCalibrations: jobs.calibrations.listOf,
    findPerson: people.find,
    listRatings: jobs.ratings.list,
    shop: shop.get,
    runsOfMachine: jobs.jobService.runsOfMachine,
  };
  const folders = dataFolders(dataDir);
  const worker = createLogWorker(workers.runs);
  const runs = createRunService({ db, worker, sources, folders, now });
  const judgingOf = createJudgingOf(db, sources);
  const pages = createRunPages(db, sources, parts.engineVersion);
  const readings = createRunReadings(db);
  const onDefect = (error: unknown) => logger.error({ err: error }, 'unexpected error');

  return {
    runs,
    pages,
    readings,
    folders,
    machineRuns: createMachineRuns(db, sources),
    handRuns: createHandRuns({ db, worker, folders, judgingOf, now }),
    notes: createNoteService(createNoteRepository(db), runs, now),
    uploads: createUploadService({ worker, sources, runs, audit, onDefect }),
    receive: fileReceiver(folders.staged),
    shares: createShareService({
      shares: createShareRepository(db),
      pages,
      findPerson: people.find,
      audit,
      now,
    }),
    toSharedRun: createSharedRuns({
      runs,
      analyses: createAnalysisRepository(db),
      readings,
      sources,
    }),
    limit: createOpenLimit(now),
  };
}
