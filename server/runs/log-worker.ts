import type { Piscina } from 'piscina';
import type { Judged } from './import-log.ts';
import type { Inspection } from './inspect-log.ts';
import type { ImportAnswer, ImportTask, InspectTask, JudgeTask } from './run-worker.ts';

/** No log of 100 MB takes this long; one that does is given up. */
const DEADLINE_MS = 120_000;

export type LogWorker = ReturnType<typeof createLogWorker>;

/** What run-worker.ts does, off the main thread. */
export function createLogWorker(pool: Piscina) {
  return {
    inspect: (task: InspectTask, signal: AbortSignal): Promise<Inspection> =>
      pool.run(task, { name: 'inspect', signal: withDeadline(signal) }),
    importRuns: (task: ImportTask): Promise<ImportAnswer> =>
      pool.run(task, { name: 'importRuns', signal: AbortSignal.timeout(DEADLINE_MS) }),
    judge: (task: JudgeTask): Promise<Judged> =>
      pool.run(task, { name: 'judge', signal: AbortSignal.timeout(DEADLINE_MS) }),
  };
}

function withDeadline(signal: AbortSignal): AbortSignal {
  return AbortSignal.any([signal, AbortSignal.timeout(DEADLINE_MS)]);
}
