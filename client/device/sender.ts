import { MOST_THINGS } from '#shared/schemas/sending-kinds.ts';
import type { Sendings, SendingsAnswer } from '#shared/schemas/sendings.ts';
import type { KeptThing } from './device-db.ts';
import type { Device } from './device.ts';

/** What became of an attempt. `waiting`: the server wants something first that is not here. */
export type SendOutcome = 'sent' | 'unreachable' | 'signed-out' | 'broken' | 'waiting';

export type PostSendings = (sendings: Sendings) => Promise<SendingsAnswer>;

/** Thrown by `post`, for what is not an answer. */
export class SendError extends Error {
  override name = 'SendError';
  readonly outcome: Exclude<SendOutcome, 'sent' | 'waiting'>;

  constructor(outcome: SendError['outcome'], message: string) {
    super(message);
    this.outcome = outcome;
  }
}

export type SenderParts = {
  device: Device;
  post: PostSendings;
  /** One tab at a time; undefined where the browser has no locks, since the server takes a thing once anyway. */
  locks: Pick<LockManager, 'request'> | undefined;
  onAnswers?: (answer: SendingsAnswer) => void;
};

export type Sender = ReturnType<typeof createSender>;

const LOCK = 'fusekeeper-sending';
/** A tab that was frozen in mid-sending holds the lock; after this long it is done without. */
const LOCK_MS = 20_000;
/** The server takes 100 kB; the envelope and its head need some of it. */
const BATCH_BYTES = 80_000;
/** Names the language that this client speaks to the server. */
const CLIENT_VERSION = '1';

/** Sends what the signed-in person kept on this device, oldest first. */
export function createSender({ device, post, locks, onAnswers }: SenderParts) {
  let running: Promise<SendOutcome> | null = null;
  let isAskedAgain = false;

  async function sendAll(): Promise<SendOutcome> {
    const person = device.person();
    if (!person) return 'signed-out';
    const deviceId = await device.things.deviceId();
    const waiting = new Set<string>();
    for (;;) {
      // No more than can go at once: of a run of hours thousands may lie here.
      const most = MOST_THINGS + waiting.size;
      const unsent = await device.things.list(person.id, 'unsent', most);
      const things = batchOf(unsent.filter(({ id }) => !waiting.has(id)));
      if (things.length === 0) return waiting.size > 0 ? 'waiting' : 'sent';
      const common = { deviceId, personId: person.id, clientVersion: CLIENT_VERSION };
      const answer = await post({ ...common, deviceNowMs: Date.now(), things });
      await device.things.answer(answer.answers);
      await device.changed();
      const settled = new Set(
        answer.answers.filter(({ status }) => status !== 'waiting').map(({ id }) => id),
      );
      for (const { id } of things) if (!settled.has(id)) waiting.add(id);
      onAnswers?.(answer);
    }
  }

  async function sendLocked(): Promise<SendOutcome> {
    try {
      return await withLock(locks, sendAll);
    } catch (error) {
      if (error instanceof SendError) return error.outcome;
      throw error;
    }
  }

  async function run(): Promise<SendOutcome> {
    let outcome: SendOutcome;
    do {
      isAskedAgain = false;
      outcome = await sendLocked();
    } while (isAskedAgain && outcome === 'sent');
    return outcome;
  }

  return {
    /** Resolves once everything went, or says why not. Asked again meanwhile, it looks once more at its end. */
    send(): Promise<SendOutcome> {
      isAskedAgain = true;
      running ??= run().finally(() => (running = null));
      return running;
    },
  };
}

type Envelope = Pick<
  KeptThing,
  'id' | 'kind' | 'madeAtMs' | 'order' | 'chain' | 'chainN' | 'payload'
>;

/** As many as fit into one request; always at least one. */
function batchOf(unsent: readonly KeptThing[]): Envelope[] {
  const batch: Envelope[] = [];
  const encoder = new TextEncoder();
  let bytes = 0;
  for (const { id, kind, madeAtMs, order, chain, chainN, payload } of unsent) {
    const envelope = { id, kind, madeAtMs, order, chain, chainN, payload };
    bytes += encoder.encode(JSON.stringify(envelope)).length + 1;
    const isFull = batch.length === MOST_THINGS || bytes > BATCH_BYTES;
    if (isFull && batch.length > 0) break;
    batch.push(envelope);
  }
  return batch;
}

async function withLock<T>(locks: SenderParts['locks'], work: () => Promise<T>): Promise<T> {
  if (!locks) return work();
  const patience = AbortSignal.timeout(LOCK_MS);
  let hasBegun = false;
  const begin = () => {
    hasBegun = true;
    return work();
  };
  try {
    return await locks.request(LOCK, { signal: patience }, begin);
  } catch (error) {
    if (hasBegun || !patience.aborted) throw error;
    return work();
  }
}
