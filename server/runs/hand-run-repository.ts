import type { Knex } from 'knex';
import { runEventSchema } from '#shared/schemas/hand-run.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';

type EventRow = {
  run_id: string;
  n: number;
  event_id: string;
  kind: string;
  visit_id: string;
  user_id: string;
  event: string;
  received_at_ms: number | string;
};

/** Whose a run taken by hand is, and on which visit: said by its first event. */
export type HandRunOwner = { userId: string; visitId: string };

export type HandRunRepository = ReturnType<typeof createHandRunRepository>;

/** Runs taken by hand, event by event. Takes a connection or a transaction. */
export function createHandRunRepository(db: Knex) {
  return {
    async insert(event: RunEvent, owner: HandRunOwner, receivedAtMs: number): Promise<void> {
      await db<EventRow>('hand_run_events').insert({
        run_id: event.runId,
        n: event.n,
        event_id: event.id,
        kind: event.kind,
        visit_id: owner.visitId,
        user_id: owner.userId,
        event: JSON.stringify(event),
        received_at_ms: receivedAtMs,
      });
    },

    async ownerOf(runId: string): Promise<HandRunOwner | undefined> {
      const row = await db<EventRow>('hand_run_events').where({ run_id: runId, n: 0 }).first();
      return row && { userId: row.user_id, visitId: row.visit_id };
    },

    async lastN(runId: string): Promise<number> {
      const row = await db<EventRow>('hand_run_events')
        .where({ run_id: runId })
        .orderBy('n', 'desc')
        .first();
      return row ? row.n : -1;
    },

    async isOver(runId: string): Promise<boolean> {
      const row = await db<EventRow>('hand_run_events')
        .where({ run_id: runId })
        .whereIn('kind', ['end', 'thrown-away'])
        .first();
      return row !== undefined;
    },

    /** In the order in which things were done. */
    async list(runId: string): Promise<RunEvent[]> {
      const rows = await db<EventRow>('hand_run_events').where({ run_id: runId }).orderBy('n');
      return rows.map(({ event }) => runEventSchema.parse(JSON.parse(event)));
    },

    /** Ended, and no run was made of them yet: a crash came between. */
    async listUnmade(): Promise<string[]> {
      const rows = await db<EventRow>('hand_run_events')
        .where({ kind: 'end' })
        .whereNotIn('run_id', db('runs').select('id'))
        .select('run_id');
      return rows.map(({ run_id }) => run_id);
    },
  };
}
