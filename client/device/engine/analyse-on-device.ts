import { ANALYSIS_WORKER_URL, trustedWorkerUrl } from '../trusted-worker.ts';
import { createDeviceEngine } from './device-engine.ts';
import type { AnalyseRun } from './engine-task.ts';

/** The engine of this page, in one file: the worker's own, which the page imports where no worker starts. */
export const deviceEngine = createDeviceEngine({
  openWorker: () => new Worker(trustedWorkerUrl(ANALYSIS_WORKER_URL), { type: 'module' }),
  async importHere(): Promise<AnalyseRun> {
    await import(/* @vite-ignore */ ANALYSIS_WORKER_URL);
    if (!globalThis.analyseRunHere) throw new Error('the engine did not come');
    return globalThis.analyseRunHere;
  },
});
