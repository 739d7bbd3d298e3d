import type { Knex } from 'knex';
import type { Person, Role } from '#shared/schemas/people.ts';

export type StoredSession = {
  id: string;
  userId: string;
  createdAtMs: number;
  seenAtMs: number;
  endedAtMs: number | null;
};

type JoinedRow = {
  id: string;
  user_id: string;
  created_at_ms: number;
  seen_at_ms: number;
  ended_at_ms: number | null;
  name: string;
  email: string;
  role: Role;
  disabled_at_ms: number | null;
};

export type SessionRepository = ReturnType<typeof createSessionRepository>;

export function createSessionRepository(db: Knex) {
  return {
    /** The session and whose it is, read together at every request. */
    async find(id: string): Promise<{ session: StoredSession; person: Person } | undefined> {
      const row = await db<JoinedRow>('sessions')
        .join('users', 'users.id', 'sessions.user_id')
        .where('sessions.id', id)
        .first<JoinedRow | undefined>(
          'sessions.id as id',
          'sessions.user_id as user_id',
          'sessions.created_at_ms as created_at_ms',
          'sessions.seen_at_ms as seen_at_ms',
          'sessions.ended_at_ms as ended_at_ms',
          'users.name as name',
          'users.email as email',
          'users.role as role',
          'users.disabled_at_ms as disabled_at_ms',
        );
      return row && { session: toSession(row), person: toPerson(row) };
    },

    async insert(session: StoredSession): Promise<void> {
      await db('sessions').insert({
        id: session.id,
        user_id: session.userId,
        created_at_ms: session.createdAtMs,
        seen_at_ms: session.seenAtMs,
        ended_at_ms: session.endedAtMs,
      });
    },

    async setSeenAt(id: string, seenAtMs: number): Promise<void> {
      await db('sessions').where({ id }).update({ seen_at_ms: seenAtMs });
    },

    async end(id: string, endedAtMs: number): Promise<void> {
      await db('sessions')
        .where({ id })
        .whereNull('ended_at_ms')
        .update({ ended_at_ms: endedAtMs });
    },

    /** Ends all of a person's sessions, but for one that is kept. */
    async endAllOf(userId: string, endedAtMs: number, keptId: string | null): Promise<void> {
      const open = db('sessions').where({ user_id: userId }).whereNull('ended_at_ms');
      if (keptId !== null) void open.whereNot({ id: keptId });
      await open.update({ ended_at_ms: endedAtMs });
    },
  };
}

function toSession(row: JoinedRow): StoredSession {
  return {
    id: row.id,
    userId: row.user_id,
    createdAtMs: Number(row.created_at_ms),
    seenAtMs: Number(row.seen_at_ms),
    endedAtMs: row.ended_at_ms === null ? null : Number(row.ended_at_ms),
  };
}

function toPerson(row: JoinedRow): Person {
  return {
    id: row.user_id,
    name: row.name,
    email: row.email,
    role: row.role,
    disabledAtMs: row.disabled_at_ms === null ? null : Number(row.disabled_at_ms),
  };
}
