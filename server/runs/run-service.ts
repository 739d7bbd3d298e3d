import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import type { Knex } from 'knex';
import type { ProbeCorrection } from '#shared/analysis/rating.ts';
import type { Person } from '#shared/schemas/people.ts';
import { createAudit } from '#server/people/audit-repository.ts';
import { AppError, notFound } from '#server/errors.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import { moveDurably, type DataFolders } from './data-folders.ts';
import { judgedByAnother, judgingFor } from '#shared/judging/judging-for.ts';
import { createJudgingOf } from './judging-of.ts';
import type { LogWorker } from './log-worker.ts';
import type { Run, UploadedFile } from './run.ts';
import { createRunRepository } from './run-repository.ts';
import type { RunSources } from './run-sources.ts';
import type { ImportAnswer } from './run-worker.ts';
import { createSampleRepository } from './sample-repository.ts';
import { storeRuns, type Imported, type LogToImport } from './store-runs.ts';
import { readWholeRun } from './whole-run.ts';
import { wallClockMs } from './wall-clock.ts';

export type RunParts = {
  db: Knex;
  worker: LogWorker;
  sources: RunSources;
  folders: DataFolders;
  now: () => Date;
};

export type RunService = ReturnType<typeof createRunService>;

export function createRunService({ db, worker, sources, folders, now }: RunParts) {
  const runs = createRunRepository(db);
  const samples = createSampleRepository(db);
  const analyses = createAnalysisRepository(db);
  const judgingOf = createJudgingOf(db, sources);

  /** A file becomes runs: all of it, or nothing. @returns the runs' ids, in the order of the spans */
  async function importRuns(by: Person, log: LogToImport): Promise<string[]> {
    const { judged, used, said } = await judgingOf(log);

    // [2 read] [3 analyse] in the worker, from the same bytes that were looked at
    const { path, choices, spans, resultHash } = log;
    const judging = judgingFor({ judged, ...said });
    const read = imported(await worker.importRuns({ path, choices, spans, judging, resultHash }));

    // [4 store] the untouched file first, then its rows; neither stays without the other
    const startedAtMs = await startOf(log, read);
    const kept = join(folders.uploads, log.id);
    await moveDurably(path, kept);
    try {
      return await storeRuns({ db, now }, by, { log, read, judged, used, startedAtMs });
    } catch (error) {
      await moveDurably(kept, path);
      throw error;
    }
  }

  /** As told; else as the file's own clock says, in the shop's zone; else as if it ended now. */
  async function startOf(log: LogToImport, read: Imported): Promise<number> {
    const { startedAt } = read.log.notes;
    const byClock = startedAt ? wallClockMs(startedAt, (await sources.shop()).zone) : undefined;
    const lastS = Math.max(...read.log.runs.map(({ toS }) => toS));
    return log.startedAtMs ?? byClock ?? Math.round(now().getTime() - lastS * 1000);
  }

  async function get(id: string): Promise<Run> {
    const run = await runs.find(id);
    if (!run) throw notFound();
    return run;
  }

  /**
   * Adds a result by another rating, or by the newest engine; earlier ones stay.
   * @param ratingId null: by what the machine is specified to have now
   */
  async function judgeAgain(by: Person, id: string, ratingId: string | null): Promise<void> {
    const run = await get(id);
    const { machine, judged: own, used, said } = await judgingOf(run);
    const rating = (await sources.listRatings()).find((each) => each.id === ratingId);
    if (ratingId !== null && !rating) {
      throw new AppError(400, 'no-rating', 'Choose a rating of the list.');
    }
    const judged = rating ? judgedByAnother(machine, run.conditions.setting, rating) : own;
    const series = await readWholeRun(samples, run);
    const result = await worker.judge({ ...series, judging: judgingFor({ judged, ...said }) });
    await analyses.insert({
      ...result,
      id: randomUUID(),
      runId: id,
      madeAtMs: await laterThanAll(id),
      judgedBy: judged,
      judgedWith: used,
    });
    const details = { rating: judged?.name ?? 'none' };
    await createAudit(
      db,
      now,
    )({
      userId: by.id,
      event: 'run_judged_again',
      subject: id,
      details,
    });
  }

  /** Now, or a moment after the newest result: which is the newest is told by time alone. */
  async function laterThanAll(runId: string): Promise<number> {
    const [newest] = await analyses.listHeads([runId]);
    return Math.max(now().getTime(), (newest?.madeAtMs ?? 0) + 1);
  }

  /** The untouched file that a run came from. */
  async function fileOf(id: string): Promise<UploadedFile> {
    const file = await runs.findUpload((await get(id)).uploadId);
    if (!file) throw notFound();
    return file;
  }

  /** What the newest result added to the probe's readings. */
  async function correctionOf(id: string): Promise<ProbeCorrection | null> {
    return (await analyses.newestJudgedWith(id))?.correction ?? null;
  }

  return { importRuns, get, judgeAgain, fileOf, correctionOf };
}

function imported(answer: ImportAnswer): Imported {
  if (answer.kind === 'imported') return answer;
  if (answer.kind === 'empty-span') throw new AppError(400, 'empty-span', answer.message);
  throw new AppError(
    409,
    'changed',
    'This is no longer what you looked at. Look at the preview again, then accept it.',
  );
}
