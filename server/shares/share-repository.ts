import type { Knex } from 'knex';
import { z } from 'zod';
import { newNoteSchema } from '#shared/schemas/runs.ts';

const frozenNotesSchema = z.array(newNoteSchema);

type ShareRow = {
  id: string;
  run_id: string;
  analysis_id: string;
  token_hash: string;
  made_by: string;
  made_at_ms: number | string;
  expires_at_ms: number | string;
  revoked_at_ms: number | string | null;
  opened_at_ms: number | string | null;
  notes: string;
};

/** A link as it is stored. The token itself is nowhere; `notes` are as they were when it was made. */
export type StoredShare = {
  id: string;
  runId: string;
  analysisId: string;
  tokenHash: string;
  madeBy: string;
  madeAtMs: number;
  expiresAtMs: number;
  revokedAtMs: number | null;
  openedAtMs: number | null;
  notes: z.infer<typeof frozenNotesSchema>;
};

export type ShareRepository = ReturnType<typeof createShareRepository>;

export function createShareRepository(db: Knex) {
  async function findBy(where: Partial<ShareRow>): Promise<StoredShare | undefined> {
    const row = await db<ShareRow>('shares').where(where).first();
    return row && toShare(row);
  }

  return {
    find: (id: string) => findBy({ id }),
    findByHash: (tokenHash: string) => findBy({ token_hash: tokenHash }),

    async insert(share: StoredShare): Promise<void> {
      await db<ShareRow>('shares').insert({
        id: share.id,
        run_id: share.runId,
        analysis_id: share.analysisId,
        token_hash: share.tokenHash,
        made_by: share.madeBy,
        made_at_ms: share.madeAtMs,
        expires_at_ms: share.expiresAtMs,
        revoked_at_ms: share.revokedAtMs,
        opened_at_ms: share.openedAtMs,
        notes: JSON.stringify(share.notes),
      });
    },

    /** Newest first. */
    async listByRun(runId: string): Promise<StoredShare[]> {
      const rows = await db<ShareRow>('shares')
        .where({ run_id: runId })
        .orderBy([
          { column: 'made_at_ms', order: 'desc' },
          { column: 'id', order: 'desc' },
        ]);
      return rows.map(toShare);
    },

    async setRevoked(id: string, atMs: number): Promise<void> {
      await db<ShareRow>('shares').where({ id }).whereNull('revoked_at_ms').update({
        revoked_at_ms: atMs,
      });
    },

    /** Only the first opening is kept. How many rows were changed. */
    setOpened(id: string, atMs: number): Promise<number> {
      return db<ShareRow>('shares')
        .where({ id })
        .whereNull('opened_at_ms')
        .update({ opened_at_ms: atMs });
    },
  };
}

function toShare(row: ShareRow): StoredShare {
  return {
    id: row.id,
    runId: row.run_id,
    analysisId: row.analysis_id,
    tokenHash: row.token_hash,
    madeBy: row.made_by,
    madeAtMs: Number(row.made_at_ms),
    expiresAtMs: Number(row.expires_at_ms),
    revokedAtMs: row.revoked_at_ms === null ? null : Number(row.revoked_at_ms),
    openedAtMs: row.opened_at_ms === null ? null : Number(row.opened_at_ms),
    notes: frozenNotesSchema.parse(JSON.parse(row.notes)),
  };
}
