import { createHash, randomUUID } from 'node:crypto';
import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { createAudit } from '#server/people/audit-repository.ts';
import { judgingFor } from '#shared/judging/judging-for.ts';
import { replayRun, type HandRun } from '#shared/recorder/replay-run.ts';
import type { RunEvent, RunEventOf } from '#shared/recorder/run-event.ts';
import { seriesOfRun, type RunToJudge } from '#shared/recorder/series-of-run.ts';
import type { RunConditions } from '#shared/schemas/runs.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import { moveDurably, type DataFolders } from './data-folders.ts';
import { createHandRunRepository } from './hand-run-repository.ts';
import type { Judged } from './import-log.ts';
import type { LogWorker } from './log-worker.ts';
import { packSamples } from './pack-samples.ts';
import type { JudgingOf } from './judging-of.ts';
import { warningsOf } from './hand-run-warnings.ts';
import type { Run } from './run.ts';
import { createRunRepository } from './run-repository.ts';
import { createSampleRepository, TEMPS, TIMES } from './sample-repository.ts';
import { sparkPoints } from './spark-points.ts';

export type HandRunParts = {
  db: Knex;
  worker: LogWorker;
  folders: DataFolders;
  judgingOf: JudgingOf;
  now: () => Date;
};

type Ended = HandRun & { end: RunEventOf<'end'> };

/** Makes runs of events that have ended, each once: readings as typed, marks, and what the engine makes of them. */
export function createHandRuns({ db, worker, folders, judgingOf, now }: HandRunParts) {
  const handRuns = createHandRunRepository(db);
  const underWay = new Map<string, Promise<void>>();
  /** Ended, and never to be runs: they are looked at once in the life of this process. */
  const never = new Set<string>();

  async function make(runId: string): Promise<void> {
    if (await createRunRepository(db).find(runId)) return;
    const events = await handRuns.list(runId);
    const owner = await handRuns.ownerOf(runId);
    const run = replayRun(events);
    const toJudge = run && seriesOfRun(run);
    // Under three readings there is nothing to judge; the events are kept all the same.
    if (!owner || !run || !isEnded(run) || !toJudge) return void never.add(runId);

    const { judged, used, said } = await judgingOf(saidOf(run, toJudge));
    const { timesS, tempsC } = toJudge.series;
    const result = await worker.judge({ timesS, tempsC, judging: judgingFor({ judged, ...said }) });
    const file = await keepFile(runId, events);
    await store({ run, toJudge, result, file, owner, judgedBy: judged, judgedWith: used });
  }

  /** The events as they came lie beside the run, as an uploaded file does. */
  async function keepFile(runId: string, events: RunEvent[]) {
    const text = events.map((event) => `${JSON.stringify(event)}\n`).join('');
    const staged = join(folders.staged, runId);
    await writeFile(staged, text, { mode: 0o600 });
    await moveDurably(staged, join(folders.uploads, runId));
    const sha256 = createHash('sha256').update(text).digest('hex');
    return { fileName: 'stopwatch.jsonl', bytes: Buffer.byteLength(text), sha256 };
  }

  type Made = {
    run: Ended;
    toJudge: RunToJudge;
    result: Judged;
    file: Awaited<ReturnType<typeof keepFile>>;
    owner: { userId: string; visitId: string };
  } & Pick<
    Parameters<ReturnType<typeof createAnalysisRepository>['insert']>[0],
    'judgedBy' | 'judgedWith'
  >;

  async function store({ run, toJudge, result, file, owner, ...by }: Made): Promise<void> {
    const { runId } = run.start;
    const atMs = now().getTime();
    const samples = createSampleRepository(db);
    // What an attempt before a crash left behind.
    await samples.remove(runId);
    await samples.insert(runId, TIMES, packSamples(toJudge.series.timesS));
    await samples.insert(runId, TEMPS, packSamples(toJudge.temps));
    await db.transaction(async (trx) => {
      const runs = createRunRepository(trx);
      const upload = { id: runId, uploadedBy: owner.userId, uploadedAtMs: atMs };
      await runs.insertUpload({ ...upload, ...file });
      await runs.insert(toRun(run, toJudge, atMs));
      const analysis = { id: randomUUID(), runId, madeAtMs: atMs };
      await createAnalysisRepository(trx).insert({ ...result, ...by, ...analysis });
      await createAudit(
        trx,
        now,
      )({
        userId: owner.userId,
        event: 'run_accepted',
        subject: owner.visitId,
        details: { file: runId, runs: 1 },
      });
    });
  }

  /** Once at a time for each run. */
  function makeOnce(runId: string): Promise<void> {
    const making = underWay.get(runId) ?? make(runId).finally(() => underWay.delete(runId));
    underWay.set(runId, making);
    return making;
  }

  return {
    /** Every run that has ended and is not made yet, also one that a crash came between. */
    async makeEnded(): Promise<void> {
      for (const runId of await handRuns.listUnmade()) {
        if (!never.has(runId)) await makeOnce(runId);
      }
    },
  };
}

function isEnded(run: HandRun): run is Ended {
  return run.end !== null && !run.isThrownAway;
}

function conditionsOf({ start, end }: Ended): RunConditions {
  return { ...end.setup, roomUnit: start.unit };
}

function saidOf(run: Ended, { marks, startedAtMs }: RunToJudge) {
  const { runId, visitId } = run.start;
  return { id: runId, visitId, conditions: conditionsOf(run), marks, startedAtMs };
}

function toRun(run: Ended, toJudge: RunToJudge, acceptedAtMs: number): Run {
  const { timesS, tempsC } = toJudge.series;
  const durationS = timesS.at(-1) ?? 0;
  const { id, visitId, conditions, marks, startedAtMs } = saidOf(run, toJudge);
  return {
    ...{ id, visitId, uploadId: id, source: 'stopwatch', label: run.end.label },
    ...{ startedAtMs, acceptedAtMs, conditions, marks, samples: timesS.length, durationS },
    ...{ channel: channelOf(run), channelUnit: toJudge.unit, channels: [] },
    reading: {
      ...{ choices: { answers: {}, channel: null }, fromS: 0, toS: durationS },
      ...{
        clock: 'stopwatch',
        encoding: 'utf-8',
        startedAt: null,
        skippedCount: 0,
        skippedRows: [],
      },
      warnings: warningsOf(run),
    },
    spark: sparkPoints(timesS, tempsC),
  };
}

/** Who took the readings, as the run page names their column. */
function channelOf({ readings }: HandRun): string {
  const byProbe = readings.filter(({ from }) => from === 'probe').length;
  if (byProbe === 0) return 'By hand';
  return byProbe === readings.length ? 'Live probe' : 'Live probe and by hand';
}
