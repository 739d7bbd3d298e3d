import type { Knex } from 'knex';

type FailureRow = {
  email_hash: string;
  failures: number;
  last_at_ms: number;
  blocked_until_ms: number;
};

export type Failures = { failures: number; lastAtMs: number; blockedUntilMs: number };
export type SignInFailuresRepository = ReturnType<typeof createSignInFailuresRepository>;

export function createSignInFailuresRepository(db: Knex) {
  return {
    async find(emailHash: string): Promise<Failures | undefined> {
      const row = await db<FailureRow>('sign_in_failures').where({ email_hash: emailHash }).first();
      return row && toFailures(row);
    },

    /** Reads and writes in one transaction, so that tries at the same time are all counted. */
    async change(
      emailHash: string,
      next: (before: Failures | undefined) => Failures | undefined,
    ): Promise<Failures | undefined> {
      return db.transaction(async (trx) => {
        const key = { email_hash: emailHash };
        const row = await trx<FailureRow>('sign_in_failures').where(key).first();
        const before = row && toFailures(row);
        const after = next(before);
        if (after) {
          await trx('sign_in_failures')
            .insert({ ...key, ...toRow(after) })
            .onConflict('email_hash')
            .merge();
        }
        return before;
      });
    },

    async forget(emailHash: string): Promise<void> {
      await db('sign_in_failures').where({ email_hash: emailHash }).delete();
    },

    async forgetBefore(lastAtMs: number): Promise<void> {
      await db('sign_in_failures').where('last_at_ms', '<', lastAtMs).delete();
    },
  };
}

function toFailures(row: FailureRow): Failures {
  return {
    failures: Number(row.failures),
    lastAtMs: Number(row.last_at_ms),
    blockedUntilMs: Number(row.blocked_until_ms),
  };
}

function toRow({ failures, lastAtMs, blockedUntilMs }: Failures): Omit<FailureRow, 'email_hash'> {
  return { failures, last_at_ms: lastAtMs, blocked_until_ms: blockedUntilMs };
}
