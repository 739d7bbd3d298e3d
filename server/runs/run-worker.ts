import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { move, transferableSymbol, valueSymbol } from 'piscina';
import { readLog } from '#shared/reading/read-log.ts';
import type { ReadingChoices } from '#shared/schemas/uploads.ts';
import {
  EmptySpanError,
  importLog,
  judgeSeries,
  type ImportedLog,
  type Judged,
  type Span,
} from './import-log.ts';
import { inspectLog, type Inspection } from './inspect-log.ts';
import type { Judging } from '#shared/judging/judging.ts';

type LogFile = { path: string; choices: ReadingChoices };

export type InspectTask = LogFile & {
  judging: Judging;
  /** One float64, 0 to 1: written here, looked at by the main thread when it is asked. */
  progress: SharedArrayBuffer;
};
export type ImportTask = LogFile & {
  judging: Judging;
  spans: Span[];
  /** What was looked at; null: take what the file gives. */
  resultHash: string | null;
};
export type ImportAnswer =
  | { kind: 'imported'; sha256: string; bytes: number; log: ImportedLog }
  | { kind: 'changed' }
  | { kind: 'empty-span'; message: string };
export type JudgeTask = { timesS: Float64Array; tempsC: Float64Array; judging: Judging };

/** [2 read] and a first look at what was read. */
export async function inspect(task: InspectTask): Promise<unknown> {
  const done = new Float64Array(task.progress);
  const outcome = read(await readFile(task.path), task.choices, (share) => (done[0] = share));
  const inspection = inspectLog(outcome, task.judging);
  return handOver(inspection, inspection.kind === 'read' ? [inspection.previewJson] : []);
}

/** [2 read] [3 analyse]: the same bytes once more, and only what was looked at is taken. */
export async function importRuns(task: ImportTask): Promise<unknown> {
  const { outcome, sha256, bytes } = await readWithHash(task);
  if (outcome.kind !== 'read') return { kind: 'changed' };
  if (task.resultHash !== null && task.resultHash !== outcome.reading.resultHash) {
    return { kind: 'changed' };
  }
  try {
    const log = importLog(outcome.reading, task.spans, task.judging);
    const answer: ImportAnswer = { kind: 'imported', sha256, bytes, log };
    return handOver(
      answer,
      log.runs.flatMap(({ packed }) => packed.flat()),
    );
  } catch (error) {
    if (error instanceof EmptySpanError) return { kind: 'empty-span', message: error.message };
    throw error;
  }
}

/** By itself, so that the file's own octets are let go before the analysis needs room. */
async function readWithHash({ path, choices }: LogFile) {
  const octets = await readFile(path);
  const sha256 = createHash('sha256').update(octets).digest('hex');
  return { outcome: read(octets, choices), sha256, bytes: octets.length };
}

/** [3 analyse] once more, by another rating or a later engine. Marks count from the run's own start. */
export function judge({ timesS, tempsC, judging }: JudgeTask): Judged {
  return judgeSeries({ timesS, tempsC }, judging, 0, timesS.at(-1) ?? 0);
}

function read(bytes: Uint8Array, choices: ReadingChoices, onProgress?: (done: number) => void) {
  return readLog(bytes, {
    answers: choices.answers,
    ...(choices.channel === null ? {} : { channel: choices.channel }),
    ...(onProgress ? { onProgress } : {}),
  });
}

/** Octets go over by being handed, not copied; the main thread gets `value`. */
function handOver(value: Inspection | ImportAnswer, octets: Uint8Array[]): unknown {
  return move({
    get [transferableSymbol]() {
      return octets.map(({ buffer }) => buffer);
    },
    get [valueSymbol]() {
      return value;
    },
  });
}
