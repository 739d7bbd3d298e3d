import type { Analysis, AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';
import { READY, type AnalyseRun, type EngineAnswer } from './engine-task.ts';

/** A worker as far as it is used here. */
export type EngineWorker = Pick<Worker, 'postMessage' | 'addEventListener' | 'terminate'>;

export type EngineParts = {
  /** May throw where the browser has no workers, or will not open this one. */
  openWorker: () => EngineWorker;
  /** The engine on the page's own thread. */
  importHere: () => Promise<AnalyseRun>;
  /** A worker that has not said that it runs after so long is given up. */
  startMs?: number;
  /** The same for one that has not judged a run; a slow phone takes several seconds. */
  judgeMs?: number;
};

export type DeviceEngine = ReturnType<typeof createDeviceEngine>;

type Waiting = { done: (answer: EngineAnswer) => void; lost: (error: Error) => void };

/** The engine beside the page, in a worker; on the page itself where a worker does not start or does not answer. */
export function createDeviceEngine(parts: EngineParts) {
  const { startMs = 10_000, judgeMs = 60_000 } = parts;
  let starting: Promise<EngineWorker> | null = null;
  const waiting = new Map<number, Waiting>();
  let lastId = 0;

  /** Opened once; a worker that failed is opened anew the next time that it is wanted. */
  function worker(): Promise<EngineWorker> {
    starting ??= start();
    return starting;
  }

  function start(): Promise<EngineWorker> {
    const started = new Promise<EngineWorker>((resolve, reject) => {
      const opened = parts.openWorker();
      const timer = setTimeout(() => giveUp(new Error('the worker did not start')), startMs);
      function giveUp(error: Error): void {
        clearTimeout(timer);
        starting = null;
        opened.terminate();
        reject(error);
        for (const { lost } of waiting.values()) lost(error);
      }
      opened.addEventListener('error', () => giveUp(new Error('the worker failed')));
      opened.addEventListener('message', ({ data }: MessageEvent<typeof READY | EngineAnswer>) => {
        if (data !== READY) return waiting.get(data.id)?.done(data);
        clearTimeout(timer);
        resolve(opened);
      });
    });
    started.catch(() => (starting = null));
    return started;
  }

  async function judgeBeside(series: Series, input: AnalysisInput): Promise<EngineAnswer> {
    const opened = await worker();
    const id = ++lastId;
    let timer: ReturnType<typeof setTimeout> | undefined;
    try {
      return await new Promise<EngineAnswer>((done, lost) => {
        waiting.set(id, { done, lost });
        timer = setTimeout(() => {
          // It may have been stopped without a word; a new one is opened next time.
          starting = null;
          opened.terminate();
          lost(new Error('the worker did not answer'));
        }, judgeMs);
        opened.postMessage({ id, series, input });
      });
    } finally {
      clearTimeout(timer);
      waiting.delete(id);
    }
  }

  return {
    /** Fetches and starts the worker before it is needed, so that the end of a run asks for no network. */
    warmUp(): void {
      worker().catch(() => {});
    },

    /**
     * @param onHere told before the run is judged on the page's own thread, which stands still meanwhile; waited for
     * @throws {RangeError} the engine refuses the run
     */
    async judge(
      series: Series,
      input: AnalysisInput,
      onHere: () => Promise<void> | void,
    ): Promise<Analysis> {
      const answer = await judgeBeside(series, input).catch(() => null);
      if (answer === null) {
        await onHere();
        const analyseRun = await parts.importHere();
        return analyseRun(series, input);
      }
      if ('problem' in answer) throw new RangeError(answer.problem);
      return answer.analysis;
    },
  };
}
