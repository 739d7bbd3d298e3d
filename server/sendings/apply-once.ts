import type { Knex } from 'knex';
import { AppError } from '#server/errors.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { SendingKind } from '#shared/schemas/sending-kinds.ts';
import type { Thing, ThingAnswer } from '#shared/schemas/sendings.ts';
import { createReceivedRepository } from './received-repository.ts';
import { thingHash } from './thing-hash.ts';
import {
  NotYetError,
  UnreadableError,
  type Applied,
  type ApplyOn,
  type ThingHandler,
} from './thing-handler.ts';

export type Handlers = Partial<Record<SendingKind, ThingHandler>>;
export type From = { person: Person; deviceId: string; deviceNowMs: number | null };
/** `isNew`: decided now, not remembered. */
type Done = { answer: ThingAnswer; isNew: boolean; afterwards?: (() => Promise<void>) | undefined };
type Decided = { answer: ThingAnswer; isFinal: boolean; afterwards?: Done['afterwards'] };

/** Applies a thing and records that it was, in one transaction: both or neither, however often it comes. */
export function applyOnce(
  { db, handlers, now }: { db: Knex; handlers: Handlers; now: () => Date },
  from: From,
  thing: Thing,
): Promise<Done> {
  return db.transaction(async (trx) => {
    const received = createReceivedRepository(trx);
    const sha256 = thingHash(thing);
    const known = await received.find(thing.id);
    if (known) {
      const isSame = known.personId === from.person.id && known.sha256 === sha256;
      return { answer: isSame ? again(known.answer) : idUsed(thing.id), isNew: false };
    }
    const outOfOrder = await placeProblem(received, from, thing);
    if (outOfOrder) return { answer: outOfOrder, isNew: false };

    const nowMs = now().getTime();
    const decided = await decide(handlers, { trx, ...from, thing, nowMs });
    if (decided.isFinal) {
      const { id, kind, order, chain, chainN, madeAtMs } = thing;
      const whose = { personId: from.person.id, deviceId: from.deviceId };
      const place = { kind, order, chain, chainN, madeAtMs, receivedAtMs: nowMs };
      await received.insert({ id, ...whose, ...place, sha256, answer: decided.answer });
    }
    return { answer: decided.answer, isNew: true, afterwards: decided.afterwards };
  });
}

function again(answer: ThingAnswer): ThingAnswer {
  return answer.status === 'applied' ? { ...answer, status: 'already-applied' } : answer;
}

function idUsed(id: string): ThingAnswer {
  const message = 'Something else came under this id, so this was not done.';
  return { id, status: 'refused', code: 'id-used', message };
}

type Received = ReturnType<typeof createReceivedRepository>;

/** Null where the thing may go ahead. */
async function placeProblem(
  received: Received,
  { person, deviceId }: From,
  { id, chain, chainN }: Thing,
): Promise<ThingAnswer | null> {
  if (chain === null || chainN === null) return null;
  const link = { personId: person.id, deviceId, chain };
  if (await received.has({ ...link, chainN })) {
    const message = 'Something else came in this place, so this was not done.';
    return { id, status: 'refused', code: 'place-used', message };
  }
  if (chainN === 1 || (await received.has({ ...link, chainN: chainN - 1 }))) return null;
  return { id, status: 'waiting', message: 'What was done before this has not come yet.' };
}

type HandedOn = Omit<ApplyOn, 'thing'> & From & { thing: Thing };

async function decide(handlers: Handlers, on: HandedOn): Promise<Decided> {
  const { trx, person, deviceId, deviceNowMs, nowMs } = on;
  const { payload, ...envelope } = on.thing;
  const { id, kind } = envelope;
  const handler = isKnown(handlers, kind) ? handlers[kind] : undefined;
  // Neither is final: a later version of this server may know better.
  if (!handler)
    return refusedForNow(id, 'unknown-kind', `This server does not know “${kind}” yet.`);
  try {
    // A point to go back to: a refusal leaves nothing of itself but its record.
    const applied = await trx.transaction((inner) =>
      handler.apply(
        { trx: inner, person, thing: { ...envelope, deviceId }, deviceNowMs, nowMs },
        payload,
      ),
    );
    return { answer: answerOf(id, applied, payload), isFinal: true, ...afterwardsOf(applied) };
  } catch (error) {
    if (error instanceof UnreadableError) return refusedForNow(id, 'unreadable', UNREADABLE);
    if (error instanceof NotYetError) return notYet(id, error);
    if (!(error instanceof AppError)) throw error;
    const { code, message } = error;
    return { answer: { id, status: 'refused', code, message }, isFinal: true };
  }
}

export const UNREADABLE = 'This server cannot read what was sent.';

function refusedForNow(id: string, code: string, message: string): Decided {
  return { answer: { id, status: 'refused', code, message }, isFinal: false };
}

function notYet(id: string, { message, meanwhile }: NotYetError): Decided {
  return { answer: { id, status: 'waiting', message }, isFinal: false, afterwards: meanwhile };
}

function isKnown(handlers: Handlers, kind: string): kind is SendingKind {
  return Object.hasOwn(handlers, kind);
}

function answerOf(id: string, applied: Applied, device: unknown): ThingAnswer {
  if (applied.status === 'applied') return { id, status: 'applied', answer: applied.answer };
  return { id, status: 'conflict', server: applied.server, device };
}

function afterwardsOf(applied: Applied): Pick<Done, 'afterwards'> {
  return applied.status === 'applied' ? { afterwards: applied.afterwards } : {};
}
