import type { Knex } from 'knex';
import type { z } from 'zod';
import { notAllowed, notFound } from '#server/errors.ts';
import { createScopeRepository } from '#server/jobs/scope-repository.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { Thing } from '#shared/schemas/sendings.ts';

/** Where and for whom a thing is applied. There is one connection: build every repository on `trx`. */
export type ApplyOn = {
  trx: Knex.Transaction;
  person: Person;
  thing: Omit<Thing, 'payload'> & { deviceId: string };
  /** What the device's clock said as it sent this; null where it did not say. */
  deviceNowMs: number | null;
  nowMs: number;
};

export type Applied =
  | {
      status: 'applied';
      answer: unknown;
      /** Longer work, after the commit. A crash can lose it: what it makes must heal by itself later. */
      afterwards?: () => Promise<void>;
    }
  /** Somebody changed it meanwhile; nothing may have been written. `server`: what the shop has. */
  | { status: 'conflict'; server: unknown };

/** Applies one kind of thing. Refuses by throwing an AppError, whose code and words go to the device. */
export type ThingHandler = { apply(on: ApplyOn, payload: unknown): Promise<Applied> };

/** The payload cannot be understood by this version; a later one may. */
export class UnreadableError extends Error {
  override name = 'UnreadableError';
}

/** What it belongs to is on its way here; the device sends it again. `meanwhile`: work that may bring it about. */
export class NotYetError extends Error {
  override name = 'NotYetError';
  readonly meanwhile: () => Promise<void>;

  constructor(message: string, meanwhile: () => Promise<void>) {
    super(message);
    this.meanwhile = meanwhile;
  }
}

export function thingHandler<Schema extends z.ZodType>(
  schema: Schema,
  apply: (on: ApplyOn, payload: z.output<Schema>) => Promise<Applied>,
): ThingHandler {
  return {
    apply(on, payload) {
      const parsed = schema.safeParse(payload);
      if (!parsed.success) throw new UnreadableError(parsed.error.message);
      return apply(on, parsed.data);
    },
  };
}

/** As the table of server/access.ts has it for recording on a visit. @throws {AppError} may not */
export async function needOwnVisit({ trx, person }: ApplyOn, visitId: string): Promise<void> {
  if (person.role === 'office') throw notAllowed();
  if (person.role === 'owner') return;
  if (!(await createScopeRepository(trx).ownsVisit(person.id, visitId))) throw notFound();
}

/** The same for what is written on a run. @throws {AppError} may not */
export async function needOwnRun({ trx, person }: ApplyOn, runId: string): Promise<void> {
  if (person.role === 'office') throw notAllowed();
  if (person.role === 'owner') return;
  if (!(await createScopeRepository(trx).ownsRun(person.id, runId))) throw notFound();
}
