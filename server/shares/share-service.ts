import { randomUUID } from 'node:crypto';
import { notFound } from '#server/errors.ts';
import type { Audit } from '#server/people/audit-repository.ts';
import type { RunPages } from '#server/runs/run-page.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { RunPage } from '#shared/schemas/runs.ts';
import type { Share } from '#shared/schemas/shares.ts';
import type { ShareRepository, StoredShare } from './share-repository.ts';
import { hashToken, makeToken } from './share-token.ts';

const DAY_MS = 86_400_000;

export type ShareParts = {
  shares: ShareRepository;
  pages: RunPages;
  findPerson: (id: string) => Promise<Person | undefined>;
  audit: Audit;
  now: () => Date;
};

export type ShareService = ReturnType<typeof createShareService>;

/** Links to one run as it was analysed and noted when the link was made. */
export function createShareService({ shares, pages, findPerson, audit, now }: ShareParts) {
  async function toShare(stored: StoredShare): Promise<Share> {
    const { id, runId, madeAtMs, expiresAtMs, revokedAtMs, openedAtMs } = stored;
    const by = (await findPerson(stored.madeBy))?.name ?? '';
    return { id, runId, madeAtMs, by, expiresAtMs, revokedAtMs, openedAtMs };
  }

  return {
    async list(runId: string): Promise<Share[]> {
      return Promise.all((await shares.listByRun(runId)).map(toShare));
    },

    /** The token is in this answer and never again. */
    async make(by: Person, runId: string, days: number): Promise<{ share: Share; token: string }> {
      const { analysis, notes } = await pages.get(by, runId);
      const token = makeToken();
      const madeAtMs = now().getTime();
      const stored: StoredShare = {
        id: randomUUID(),
        runId,
        analysisId: analysis.id,
        tokenHash: hashToken(token),
        madeBy: by.id,
        madeAtMs,
        expiresAtMs: madeAtMs + days * DAY_MS,
        revokedAtMs: null,
        openedAtMs: null,
        notes: frozen(notes),
      };
      await shares.insert(stored);
      const details = { share: stored.id, days };
      await audit({ userId: by.id, event: 'share_made', subject: runId, details });
      return { share: await toShare(stored), token };
    },

    async revoke(by: Person, id: string): Promise<Share> {
      await shares.setRevoked(id, now().getTime());
      const stored = await shares.find(id);
      if (!stored) throw notFound();
      await audit({ userId: by.id, event: 'share_revoked', subject: stored.runId });
      return toShare(stored);
    },

    /** The share that a token opens now; undefined for a wrong, an expired and a revoked one alike. */
    async open(token: string): Promise<StoredShare | undefined> {
      const stored = await shares.findByHash(hashToken(token));
      const nowMs = now().getTime();
      if (!stored || stored.revokedAtMs !== null || stored.expiresAtMs <= nowMs) return undefined;
      if ((await shares.setOpened(stored.id, nowMs)) > 0) {
        const details = { share: stored.id };
        await audit({ userId: null, event: 'share_opened', subject: stored.runId, details });
      }
      return stored;
    },
  };
}

function frozen(notes: RunPage['notes']): StoredShare['notes'] {
  return notes.map(({ timeS, tempC, text }) => ({ timeS, tempC, text }));
}
