import { z } from 'zod';
import { roundsSchema } from '#shared/schemas/jobs.ts';
import { uploadSchema } from '#shared/schemas/uploads.ts';
import type { BuiltServer } from './built-server.ts';

const POLL_MS = 250;

export async function findVisit({ origin, cookie }: BuiltServer): Promise<string> {
  const answer = await fetch(`${origin}/api/rounds`, { headers: { cookie } });
  const { visits } = roundsSchema.parse(await answer.json());
  const [visit] = visits;
  if (!visit) throw new Error('the demo shop has no visit today');
  return visit.id;
}

/** Sends a log, waits for its preview, accepts it whole. @returns how long each step took, ms */
export async function importByHttp(server: BuiltServer, visitId: string, log: Buffer) {
  const { origin, cookie } = server;
  const startMs = performance.now();
  const form = new FormData();
  form.append('file', new Blob([new Uint8Array(log)]), 'eleven-days.csv');
  const sent = await call(`${origin}/api/uploads?visitId=${visitId}`, {
    method: 'POST',
    headers: { cookie },
    body: form,
  });
  const { id } = z.object({ id: z.string() }).parse(sent);
  const sentMs = performance.now();

  const preview = await untilRead(server, id);
  const readMs = performance.now();
  await call(`${origin}/api/uploads/${id}/accept`, {
    method: 'POST',
    headers: { cookie, 'content-type': 'application/json' },
    body: JSON.stringify({
      visitId,
      resultHash: preview.resultHash,
      conditions: {
        placement: 'Centre of the outlet',
        duct: 'on',
        load: 'empty',
        setting: 'high',
        roomTemp: null,
        roomUnit: 'F',
        probeId: null,
      },
      marks: [],
      spans: [{ fromS: 0, toS: preview.durationS, label: 'Eleven days' }],
      startedAtMs: null,
    }),
  });
  const acceptedMs = performance.now();
  return {
    samples: preview.samples,
    sendMs: sentMs - startMs,
    readMs: readMs - sentMs,
    acceptMs: acceptedMs - readMs,
  };
}

async function untilRead({ origin, cookie }: BuiltServer, id: string) {
  for (;;) {
    const answer = await call(`${origin}/api/uploads/${id}`, { headers: { cookie } });
    const { reading } = uploadSchema.parse(answer);
    if (reading.state === 'read') return reading.preview;
    if (reading.state !== 'reading') throw new Error(JSON.stringify(reading));
    await new Promise((resolve) => setTimeout(resolve, POLL_MS));
  }
}

async function call(url: string, init: RequestInit): Promise<unknown> {
  const answer = await fetch(url, init);
  if (!answer.ok) throw new Error(`${url} answered ${answer.status}: ${await answer.text()}`);
  return answer.json();
}
