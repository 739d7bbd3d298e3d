import { expect, vi } from 'vitest';
import type { AcceptUpload, RunConditions } from '#shared/schemas/runs.ts';
import { uploadSchema, type Upload } from '#shared/schemas/uploads.ts';
import type { Agent } from './test-app.ts';

/** For what waits for a worker's first start, on a machine that has much else to do. */
export const WORKER_START_MS = 60_000;

export const CONDITIONS: RunConditions = {
  placement: 'Centre of the outlet',
  duct: 'off',
  load: 'empty',
  setting: 'high',
  roomTemp: null,
  roomUnit: 'F',
  probeId: null,
};

type Read = Extract<Upload['reading'], { state: 'read' }>;

/** Sends a log and waits until it was read, one way or another. */
export async function sendLog(
  agent: Agent,
  visitId: string,
  log: string | Buffer,
  fileName = 'exhaust.csv',
): Promise<Upload> {
  const sent = await agent
    .post('/api/uploads')
    .query({ visitId })
    .attach('file', Buffer.from(log), fileName);
  expect(sent.status).toBe(201);
  return untilRead(agent, sent.body.id);
}

export function untilRead(agent: Agent, id: string): Promise<Upload> {
  return vi.waitFor(
    async () => {
      const { body } = await agent.get(`/api/uploads/${id}`).expect(200);
      const upload = uploadSchema.parse(body);
      expect(upload.reading.state).not.toBe('reading');
      return upload;
    },
    { timeout: 60_000, interval: 100 },
  );
}

export function previewOf(upload: Upload): Read['preview'] {
  if (upload.reading.state !== 'read') throw new Error(JSON.stringify(upload.reading));
  return upload.reading.preview;
}

/** Takes a log whole, as one run called "Run 1", unless told otherwise. */
export function acceptance(upload: Upload, given: Partial<AcceptUpload> = {}): AcceptUpload {
  const { resultHash, durationS } = previewOf(upload);
  return {
    visitId: upload.visitId,
    resultHash,
    conditions: CONDITIONS,
    marks: [],
    spans: [{ fromS: 0, toS: durationS, label: 'Run 1' }],
    startedAtMs: null,
    ...given,
  };
}

/** From a log to the id of its one run. */
export async function makeRun(
  agent: Agent,
  visitId: string,
  log: string,
  said: Partial<RunConditions> = {},
): Promise<string> {
  const upload = await sendLog(agent, visitId, log);
  const conditions = { ...CONDITIONS, ...said };
  const accepted = await agent
    .post(`/api/uploads/${upload.id}/accept`)
    .send(acceptance(upload, { conditions }));
  expect(accepted.status).toBe(201);
  return accepted.body.runIds[0];
}
