import { randomUUID } from 'node:crypto';
import type { Agent } from '#tests/support/test-app.ts';
import type { ThingAnswer } from '#shared/schemas/sendings.ts';

type Sent = { id?: string; chain?: string | null; chainN?: number | null };

/** A device that sends: things in the envelope of today's client, numbered as they are made. */
export function sendingDevice(agent: Agent, more: { deviceNowMs?: number | null } = {}) {
  const deviceId = randomUUID();
  let order = 0;
  return {
    deviceId,
    thing(kind: string, payload: object, { id, chain, chainN }: Sent = {}) {
      order += 1;
      return {
        id: id ?? randomUUID(),
        kind,
        madeAtMs: Date.parse('2026-03-04T14:30:00Z'),
        order,
        chain: chain ?? null,
        chainN: chainN ?? null,
        payload,
      };
    },
    async send(...things: unknown[]): Promise<ThingAnswer[]> {
      const envelope = { deviceId, personId: agent.person.id, clientVersion: '1', ...more };
      const body = { ...envelope, things };
      const answer = await agent.post('/api/sendings').send(body);
      if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`);
      return answer.body.answers;
    },
  };
}
