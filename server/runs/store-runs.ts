import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { createAudit } from '#server/people/audit-repository.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { JudgedBy, RunConditions } from '#shared/schemas/runs.ts';
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
  /** When the record's first reading was taken. */
  startedAtMs: number;
};

/** One transaction: the file's row, its runs with readings and results, and who did it. */
export function storeRuns(
  { db, now }: { db: Knex; now: () => Date },
  by: Person,
  accepted: Accepted,
): Promise<string[]> {
  const { log, read } = accepted;
  const acceptedAtMs = now().getTime();
  return db.transaction(async (trx) => {
    await createRunRepository(trx).insertUpload({
      id: log.id,
      fileName: log.fileName,
      bytes: read.bytes,
      sha256: read.sha256,
      uploadedBy: by.id,
      uploadedAtMs: acceptedAtMs,
    });
    const ids: string[] = [];
    for (const part of read.log.runs) {
      const run = toRun(accepted, part, acceptedAtMs);
      await storeRun(trx, run, part, accepted.judged);
      ids.push(run.id);
    }
    const audit = createAudit(trx, now);
    const details = { file: log.id, runs: ids.length };
    await audit({ userId: by.id, event: 'run_accepted', subject: log.visitId, details });
    return ids;
  });
}

async function storeRun(trx: Knex, run: Run, part: ImportedRun, judged: JudgedBy | null) {
  await createRunRepository(trx).insert(run);
  const samples = createSampleRepository(trx);
  for (const [channel, chunks] of part.packed.entries()) {
    await samples.insert(run.id, channel, chunks);
  }
  await createAnalysisRepository(trx).insert({
    ...part.judged,
    id: randomUUID(),
    runId: run.id,
    madeAtMs: run.acceptedAtMs,
    judgedBy: judged,
  });
}

function toRun({ log, read, startedAtMs }: Accepted, part: ImportedRun, acceptedAtMs: number): Run {
  const { fromS, toS } = part;
  const { channel, channelUnit, channels, notes } = read.log;
  return {
    id: randomUUID(),
    visitId: log.visitId,
    uploadId: log.id,
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
