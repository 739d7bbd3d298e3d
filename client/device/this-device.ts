import { useSyncExternalStore } from 'react';
import type { SendingKind } from '#shared/schemas/sending-kinds.ts';
import type { SendingsAnswer, ThingPayloads } from '#shared/schemas/sendings.ts';
import { createDevice, type Unsent } from './device.ts';
import type { KeptThing } from './device-db.ts';
import { createKeepSending, type Sending } from './keep-sending.ts';
import { postSendings } from './post-sendings.ts';
import { createSender, type SendOutcome } from './sender.ts';
import { createServerClock } from './server-clock.ts';

/** The device that this page runs on. */
export const thisDevice = createDevice({
  channel: typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel('fusekeeper'),
});

/** What the server's clock said with its last answer to a sending; null: not reached since the page was opened. */
export const serverClock = createServerClock();

const answerListeners = new Set<(answer: SendingsAnswer) => void>();

export const keepSending = createKeepSending(
  thisDevice,
  createSender({
    device: thisDevice,
    post: serverClock.watch(postSendings),
    locks: typeof navigator === 'undefined' ? undefined : navigator.locks,
    onAnswers: (answer) => answerListeners.forEach((tell) => tell(answer)),
  }),
);

/** Told of every answer to a sending of this tab. @returns stops it */
export function onAnswers(tell: (answer: SendingsAnswer) => void): () => void {
  answerListeners.add(tell);
  return () => void answerListeners.delete(tell);
}

/** Sends what waits; resolves once it went, or says why not. */
export function sendNow(): Promise<SendOutcome> {
  return keepSending.sendNow();
}

/**
 * Puts something by for the server; resolves once it would survive a power cut, and sends it when it can.
 * `chain`: things of one chain are numbered 1, 2, 3… and applied in that order, without a gap.
 * @throws {KeepError} nothing was kept; its message is for the page
 */
export function keepThing<Kind extends SendingKind>(
  kind: Kind,
  payload: ThingPayloads[Kind],
  { chain }: { chain?: string } = {},
): Promise<KeptThing> {
  return thisDevice.keep({ kind, payload, chain });
}

/** Everything that was kept in a chain, sent or not, in order. */
export async function thingsOfChain(chain: string): Promise<KeptThing[]> {
  const person = thisDevice.person();
  return person ? thisDevice.things.listChain(person.id, chain) : [];
}

/** Lets go of a chain that the server has whole; a chain with something unsent stays. */
export async function letGoOfChain(chain: string): Promise<boolean> {
  const kept = await thingsOfChain(chain);
  if (kept.some(({ state }) => state !== 'applied')) return false;
  await thisDevice.things.drop(kept.map(({ id }) => id));
  return true;
}

/** How many things wait on this device; changes with every thing kept or sent, in whichever tab. */
export function useUnsent(): Unsent {
  return useSyncExternalStore(thisDevice.subscribe, thisDevice.unsent);
}

/** Whether something is being sent, and how the last attempt went. */
export function useSending(): Sending {
  return useSyncExternalStore(keepSending.subscribe, keepSending.sending);
}
