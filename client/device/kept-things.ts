import { MOST_THING_BYTES, type SendingKind } from '#shared/schemas/sending-kinds.ts';
import type { ThingAnswer, ThingPayloads } from '#shared/schemas/sendings.ts';
import { STRICT, type DeviceDb, type KeptThing, type ThingState } from './device-db.ts';
import { KeepError, toKeepError } from './keep-error.ts';
import { newId } from './new-id.ts';

export type NewThing<Kind extends SendingKind = SendingKind> = {
  kind: Kind;
  payload: ThingPayloads[Kind];
  /** Things of a chain are numbered 1, 2, 3… and applied in that order, without a gap. */
  chain?: string | undefined;
};

export type Counts = { unsent: number; conflict: number; refused: number };

const NO_THINGS: Counts = { unsent: 0, conflict: 0, refused: 0 };
/** A run that was recorded by hand is looked at again within this time, 30 days. */
const APPLIED_MS = 30 * 86_400_000;
/** Sorts after every string, number and date (Indexed Database API 3.0, section 2.4). */
const LAST: IDBValidKey[] = [];
/** Sorts after whatever the name of a chain goes on with. */
const PAST_NAMES = '\uffff';

export type KeptThings = ReturnType<typeof createKeptThings>;

/** The things of every person on this device. Each write is through to the storage before it resolves. */
export function createKeptThings(db: () => Promise<DeviceDb>, nowMs: () => number) {
  const ofState = (personId: string, state: ThingState) =>
    IDBKeyRange.bound([personId, state], [personId, state, LAST]);
  const ofChain = (personId: string, chain: string) =>
    IDBKeyRange.bound([personId, chain], [personId, chain, LAST]);

  return {
    /** @throws {KeepError} nothing was kept */
    async keep(personId: string, { kind, payload, chain }: NewThing): Promise<KeptThing> {
      if (bytesOf(payload) > MOST_THING_BYTES) throw new KeepError('too-large');
      try {
        const tx = (await db()).transaction(['things', 'device'], 'readwrite', STRICT);
        const [things, device] = [tx.objectStore('things'), tx.objectStore('device')];
        const known = await device.get('device');
        const order = (known?.order ?? 0) + 1;
        let chainN: number | null = null;
        if (chain !== undefined) {
          const last = await things.index('chain').openCursor(ofChain(personId, chain), 'prev');
          chainN = (last?.value.chainN ?? 0) + 1;
        }
        const thing: KeptThing = {
          id: newId(),
          kind,
          personId,
          order,
          madeAtMs: nowMs(),
          chain: chain ?? null,
          chainN,
          payload,
          state: 'unsent',
          answer: null,
          answeredAtMs: null,
        };
        await Promise.all([
          things.add(thing),
          device.put({ deviceId: known?.deviceId ?? newId(), order }, 'device'),
          tx.done,
        ]);
        return thing;
      } catch (error) {
        throw toKeepError(error);
      }
    },

    /** Who this device is to the server. */
    async deviceId(): Promise<string> {
      const tx = (await db()).transaction('device', 'readwrite', STRICT);
      const known = await tx.store.get('device');
      const device = known ?? { deviceId: newId(), order: 0 };
      if (!known) await tx.store.put(device, 'device');
      await tx.done;
      return device.deviceId;
    },

    /** In the order in which they were kept; `most` of them. */
    async list(personId: string, state: ThingState, most?: number): Promise<KeptThing[]> {
      return (await db()).getAllFromIndex('things', 'state', ofState(personId, state), most);
    },

    /** A whole chain, sent or not, in order. */
    async listChain(personId: string, chain: string): Promise<KeptThing[]> {
      return (await db()).getAllFromIndex('things', 'chain', ofChain(personId, chain));
    },

    /** Everything in chains whose names begin so, sent or not, chain by chain and in order. */
    async listChains(personId: string, beginning: string): Promise<KeptThing[]> {
      const range = IDBKeyRange.bound([personId, beginning], [personId, beginning + PAST_NAMES]);
      return (await db()).getAllFromIndex('things', 'chain', range);
    },

    /** Keeps what became of things that were sent. One that is final already stays as it is. */
    async answer(answers: readonly ThingAnswer[]): Promise<void> {
      const tx = (await db()).transaction('things', 'readwrite', STRICT);
      const writes = answers.map(async (answer) => {
        const thing = await tx.store.get(answer.id);
        if (thing?.state !== 'unsent') return;
        const state = stateOf(answer);
        await tx.store.put({ ...thing, state, answer, answeredAtMs: nowMs() });
      });
      await Promise.all([...writes, tx.done]);
    },

    /** Puts refused things back among the unsent, under the same ids. */
    async askAgain(ids: readonly string[]): Promise<void> {
      const tx = (await db()).transaction('things', 'readwrite', STRICT);
      const writes = ids.map(async (id) => {
        const thing = await tx.store.get(id);
        if (thing?.state === 'refused') await tx.store.put({ ...thing, state: 'unsent' });
      });
      await Promise.all([...writes, tx.done]);
    },

    /** Lets go of things that are no longer wanted here. */
    async drop(ids: readonly string[]): Promise<void> {
      const tx = (await db()).transaction('things', 'readwrite', STRICT);
      await Promise.all([...ids.map((id) => tx.store.delete(id)), tx.done]);
    },

    async count(personId: string): Promise<Counts> {
      const tx = (await db()).transaction('things');
      const count = (state: ThingState) => tx.store.index('state').count(ofState(personId, state));
      const [unsent, conflict, refused] = await Promise.all([
        count('unsent'),
        count('conflict'),
        count('refused'),
      ]);
      return { unsent, conflict, refused };
    },

    /** Lets go of what the server has had for so long that no page asks for it any more. */
    async sweep(): Promise<void> {
      const tx = (await db()).transaction('things', 'readwrite');
      for await (const cursor of tx.store) {
        const { state, answeredAtMs } = cursor.value;
        const isOld = (answeredAtMs ?? Infinity) < nowMs() - APPLIED_MS;
        if (state === 'applied' && isOld) await cursor.delete();
      }
      await tx.done;
    },
  };
}

export { NO_THINGS };

function stateOf(answer: ThingAnswer): ThingState {
  switch (answer.status) {
    case 'applied':
    case 'already-applied':
      return 'applied';
    case 'waiting':
      return 'unsent';
    default:
      return answer.status;
  }
}

function bytesOf(payload: unknown): number {
  return new TextEncoder().encode(JSON.stringify(payload)).length;
}
