import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { answerTask, READY, type EngineTask } from './engine-task.ts';

const isWorker = typeof document === 'undefined';

if (isWorker) {
  self.addEventListener('message', ({ data }: MessageEvent<EngineTask>) => {
    self.postMessage(answerTask(data, analyseRun));
  });
  self.postMessage(READY);
} else {
  // A page whose worker does not start imports this very file, so that the engine is fetched once. What a worker's
  // file exports is dropped when it is built.
  globalThis.analyseRunHere = analyseRun;
}
