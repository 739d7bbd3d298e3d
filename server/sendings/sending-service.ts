import type { Knex } from 'knex';
import { z } from 'zod';
import type { Audit } from '#server/people/audit-repository.ts';
import { idSchema } from '#shared/schemas/primitives.ts';
import { thingSchema, type Thing, type ThingAnswer } from '#shared/schemas/sendings.ts';
import { applyOnce, UNREADABLE, type From, type Handlers } from './apply-once.ts';

export type SendingParts = {
  db: Knex;
  handlers: Handlers;
  audit: Audit;
  now: () => Date;
  /** Told of what broke on our side; the thing is asked for again later. */
  onDefect: (error: unknown) => void;
};

export type SendingService = ReturnType<typeof createSendingService>;

const namedSchema = z.object({ id: idSchema });
/** Refusals of access; they are in the record of what people tried. */
const DENIALS = ['not-found', 'not-allowed'];

/** Takes what devices kept and sent later. */
export function createSendingService(parts: SendingParts) {
  const { audit, onDefect } = parts;

  async function take(from: From, thing: Thing): Promise<ThingAnswer> {
    try {
      const { answer, isNew, afterwards } = await applyOnce(parts, from, thing);
      await afterwards?.().catch(onDefect);
      if (isNew && answer.status === 'refused' && DENIALS.includes(answer.code)) {
        const subject = `POST /sendings ${thing.kind}`;
        await audit({ userId: from.person.id, event: 'authz_fail', subject });
      }
      return answer;
    } catch (error) {
      // One that breaks us does not hold up those behind it; the device keeps it.
      onDefect(error);
      return { id: thing.id, status: 'waiting', message: 'Something broke on our side.' };
    }
  }

  return {
    /** One answer for each thing that names itself, in the order of the device. */
    async takeAll(from: From, sent: readonly unknown[]): Promise<ThingAnswer[]> {
      const read = sent.map((each) => thingSchema.safeParse(each));
      const things = read.flatMap(({ data }) => data ?? []).sort((a, b) => a.order - b.order);
      const answers = sent.flatMap((each, at) => (read[at]?.success ? [] : unreadable(each)));
      for (const thing of things) answers.push(await take(from, thing));
      return answers;
    },
  };
}

/** What has not even an id is left out: the device keeps it as not sent. */
function unreadable(sent: unknown): ThingAnswer[] {
  const named = namedSchema.safeParse(sent);
  if (!named.success) return [];
  const { id } = named.data;
  return [{ id, status: 'refused', code: 'unreadable', message: UNREADABLE }];
}
