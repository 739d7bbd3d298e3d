import { MessageChannel, type MessagePort } from 'node:worker_threads';
import { afterEach, expect, test } from 'vitest';
import { createDeviceEngine, type EngineWorker } from '#client/device/engine/device-engine.ts';
import { answerTask, READY, type AnalyseRun } from '#client/device/engine/engine-task.ts';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import { cyclingTemps } from '#tests/support/cycling-log.ts';

const ports: MessagePort[] = [];
afterEach(() => ports.splice(0).forEach((port) => port.close()));

const tempsF = cyclingTemps(120, { opensF: 155, closesF: 130 });
const SERIES = {
  timesS: Float64Array.from(tempsF, (_, i) => i * 5),
  tempsC: Float64Array.from(tempsF, (tempF) => (tempF - 32) / 1.8),
};
const INPUT: AnalysisInput = {
  rating: null,
  probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
  ...{ marks: [], load: 'empty', roomC: null, minCycles: 3, swingK: 2, reference: null },
};
const JUDGED = analyseRun(SERIES, INPUT);
/** Says who judged, at once. */
const byVersion =
  (version: string): AnalyseRun =>
  () => ({ ...JUDGED, version });

/** A worker on the other end of a real channel: what crosses it is copied, as between threads. */
function workerOf(analyse: AnalyseRun | null, saysReady = true): EngineWorker {
  const { port1, port2 } = new MessageChannel();
  ports.push(port1, port2);
  port2.on('message', (task) => {
    if (analyse) port2.postMessage(answerTask(task, analyse));
  });
  if (saysReady) port2.postMessage(READY);
  return {
    postMessage: (message: unknown) => port1.postMessage(message),
    addEventListener: (kind: string, tell: unknown) => {
      if (kind === 'message' && typeof tell === 'function') {
        port1.on('message', (data) => tell({ data }));
      }
    },
    terminate: () => port1.close(),
  };
}

test('a run is judged in the worker, and nothing of the engine comes to the page', async () => {
  let imports = 0;
  const engine = createDeviceEngine({
    openWorker: () => workerOf(byVersion('beside')),
    importHere: () => Promise.reject(new Error(`import ${++imports}`)),
  });

  const judged = await engine.judge(SERIES, INPUT, () => {});

  expect(judged).toEqual({ ...JUDGED, version: 'beside' });
  expect(imports).toBe(0);
});

test('two runs at once get each its own answer from one worker', async () => {
  let opened = 0;
  const engine = createDeviceEngine({
    openWorker: () => {
      opened += 1;
      return workerOf(analyseRun);
    },
    importHere: () => Promise.reject(new Error('not here')),
  });
  const short = {
    timesS: SERIES.timesS.subarray(0, 20),
    tempsC: SERIES.tempsC.subarray(0, 20),
  };

  engine.warmUp();
  const [long, brief] = await Promise.all([
    engine.judge(SERIES, INPUT, () => {}),
    engine.judge(short, INPUT, () => {}),
  ]);

  expect([long.samples, brief.samples, opened]).toEqual([120, 20, 1]);
});

test.each([
  ['may not be opened', () => Promise.reject(new Error('no workers here'))],
  ['never runs', () => Promise.resolve(workerOf(analyseRun, false))],
  ['falls silent over a run', () => Promise.resolve(workerOf(null))],
])('where a worker %s the page is told, and judges by itself', async (_, open) => {
  const worker = await open().catch(() => null);
  const told: string[] = [];
  const engine = createDeviceEngine({
    openWorker: () => {
      if (!worker) throw new Error('refused');
      return worker;
    },
    importHere: () => Promise.resolve(byVersion('here')),
    ...{ startMs: 30, judgeMs: 30 },
  });

  const judged = await engine.judge(SERIES, INPUT, () => void told.push('here'));

  expect(judged.version).toBe('here');
  expect(told).toEqual(['here']);
});

test('what the engine refuses is refused, and not tried again on the page', async () => {
  const engine = createDeviceEngine({
    openWorker: () => workerOf(analyseRun),
    importHere: () => Promise.resolve(byVersion('here')),
  });
  const backwards = { ...SERIES, timesS: SERIES.timesS.toReversed() };

  await expect(engine.judge(backwards, INPUT, () => {})).rejects.toThrow(RangeError);
});

test('a worker that was lost is opened anew for the next run', async () => {
  const workers = [workerOf(null), workerOf(byVersion('second'))];
  const engine = createDeviceEngine({
    openWorker: () => workers.shift() ?? workerOf(null),
    importHere: () => Promise.resolve(byVersion('here')),
    judgeMs: 200,
  });

  const first = await engine.judge(SERIES, INPUT, () => {});
  const second = await engine.judge(SERIES, INPUT, () => {});

  expect([first.version, second.version]).toEqual(['here', 'second']);
});
