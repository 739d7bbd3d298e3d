import type { Knex } from 'knex';
import type { ThingAnswer } from '#shared/schemas/sendings.ts';

type ReceivedRow = {
  id: string;
  person_id: string;
  device_id: string;
  kept_order: number;
  kind: string;
  chain: string | null;
  chain_n: number | null;
  sha256: string;
  answer: string;
  made_at_ms: number | string;
  received_at_ms: number | string;
};

export type Received = {
  id: string;
  personId: string;
  deviceId: string;
  order: number;
  kind: string;
  chain: string | null;
  chainN: number | null;
  sha256: string;
  answer: ThingAnswer;
  madeAtMs: number;
  receivedAtMs: number;
};

/** One place in a device's chain. */
export type Link = Pick<Received, 'personId' | 'deviceId' | 'chain' | 'chainN'>;

export function createReceivedRepository(db: Knex) {
  return {
    async find(id: string): Promise<Pick<Received, 'personId' | 'sha256' | 'answer'> | undefined> {
      const row = await db<ReceivedRow>('received_things').where({ id }).first();
      return row && { personId: row.person_id, sha256: row.sha256, answer: JSON.parse(row.answer) };
    },

    async has({ personId, deviceId, chain, chainN }: Link): Promise<boolean> {
      const row = await db<ReceivedRow>('received_things')
        .where({ person_id: personId, device_id: deviceId, chain, chain_n: chainN })
        .first('id');
      return row !== undefined;
    },

    async insert(received: Received): Promise<void> {
      await db<ReceivedRow>('received_things').insert({
        id: received.id,
        person_id: received.personId,
        device_id: received.deviceId,
        kept_order: received.order,
        kind: received.kind,
        chain: received.chain,
        chain_n: received.chainN,
        sha256: received.sha256,
        answer: JSON.stringify(received.answer),
        made_at_ms: received.madeAtMs,
        received_at_ms: received.receivedAtMs,
      });
    },
  };
}
