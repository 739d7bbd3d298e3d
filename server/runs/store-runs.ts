import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { createAudit } from '#server/people/audit-repository.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { JudgedBy, JudgedWith, RunConditions } from '#shared/schemas/runs.ts';
import type { ReadingChoices } from '#shared/schemas/uploads.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import type { ImportedRun, Span } from './import-log.ts';
import type { Run } from './run.ts';
import { createRunRepository } from './run-repository.ts';
import type { ImportAnswer } from './run-worker.ts';
import { createSampleRepository } from './sample-repository.ts';

/** A log that lies in a file, and what a person said of it. */
export type LogToImport = {
  id: string;
  path: string;
  fileName: string;
  choices: ReadingChoices;
  /** What was looked at; null takes what the file gives (the demo shop). */
  resultHash: string | null;
  visitId: string;
  conditions: RunConditions;
  /** Times in s of the whole record, as are those of the spans. */
  marks: Run['marks'];
  spans: Span[];
  startedAtMs: number | null;
};

export type Imported = Extract<ImportAnswer, { kind: 'imported' }>;

type Accepted = {
  log: LogToImport;
  read: Imported;
  judged: JudgedBy | null;
  used: JudgedWith | null;
  /** When the record's first reading was taken. */
  startedAtMs: number;
};

/**
 * All of it or nothing. The readings go in first, piece by piece, each piece a short transaction of its own: one of
 * tens of megabytes would hold up every other request. They count once the runs' rows are there, which one transaction
 * writes with the file's row, the results and who did it.
 */
export async function storeRuns(
  { db, now }: { db: Knex; now: () => Date },
  by: Person,
  accepted: Accepted,
): Promise<string[]> {
  const acceptedAtMs = now().getTime();
  const stored = accepted.read.log.runs.map((part) => ({
    part,
    run: toRun(accepted, part, acceptedAtMs),
  }));
  const samples = createSampleRepository(db);
  try {
    for (const { run, part } of stored) {
      for (const [channel, chunks] of part.packed.entries()) {
        await samples.insert(run.id, channel, chunks);
      }
    }
    await storeRows({ db, now }, by, accepted, stored);
  } catch (error) {
    for (const { run } of stored) await samples.remove(run.id);
    throw error;
  }
  return stored.map(({ run }) => run.id);
}

type Stored = { part: ImportedRun; run: Run };

function storeRows(
  { db, now }: { db: Knex; now: () => Date },
  by: Person,
  { log, read, judged, used }: Accepted,
  stored: Stored[],
): Promise<void> {
  return db.transaction(async (trx) => {
    const runs = createRunRepository(trx);
    await runs.insertUpload({
      id: log.id,
      fileName: log.fileName,
      bytes: read.bytes,
      sha256: read.sha256,
      uploadedBy: by.id,
      uploadedAtMs: now().getTime(),
    });
    for (const { part, run } of stored) {
      await runs.insert(run);
      await createAnalysisRepository(trx).insert({
        ...part.judged,
        id: randomUUID(),
        runId: run.id,
        madeAtMs: run.acceptedAtMs,
        judgedBy: judged,
        judgedWith: used,
      });
    }
    const details = { file: log.id, runs: stored.length };
    const audit = createAudit(trx, now);
    await audit({ userId: by.id, event: 'run_accepted', subject: log.visitId, details });
  });
}

function toRun({ log, read, startedAtMs }: Accepted, part: ImportedRun, acceptedAtMs: number): Run {
  const { fromS, toS } = part;
  const { channel, channelUnit, channels, notes } = read.log;
  return {
    id: randomUUID(),
    visitId: log.visitId,
    uploadId: log.id,
    source: 'file',
    label: part.label,
    startedAtMs: Math.round(startedAtMs + fromS * 1000),
    acceptedAtMs,
    conditions: log.conditions,
    marks: log.marks
      .filter(({ timeS }) => timeS >= fromS && timeS <= toS)
      .map((mark) => ({ ...mark, timeS: mark.timeS - fromS })),
    samples: part.samples,
    durationS: part.durationS,
    channel,
    channelUnit,
    channels,
    reading: { ...notes, choices: log.choices, fromS, toS },
    spark: part.spark,
  };
}
