import type { DeviceDb, KeptAnswer } from './device-db.ts';

const DAY_MS = 86_400_000;
/** Longer than a holiday; nobody works from answers older than that. */
const KEPT_MS = 21 * DAY_MS;

export type KeptAnswers = ReturnType<typeof createKeptAnswers>;

/** What the server answered last, by person and address. A convenience: losing it loses nothing. */
export function createKeptAnswers(db: () => Promise<DeviceDb>, nowMs: () => number) {
  return {
    async find(personId: string, url: string): Promise<KeptAnswer | undefined> {
      return (await db()).get('answers', [personId, url]);
    },

    async put(personId: string, url: string, answer: unknown): Promise<void> {
      await (await db()).put('answers', { personId, url, answer, fetchedAtMs: nowMs() });
    },

    async clear(): Promise<void> {
      await (await db()).clear('answers');
    },

    /** Lets go of what is too old, and of everything that is not this person's. */
    async sweep(personId: string): Promise<void> {
      const tx = (await db()).transaction('answers', 'readwrite');
      for await (const cursor of tx.store) {
        const { personId: whose, fetchedAtMs } = cursor.value;
        if (whose !== personId || fetchedAtMs < nowMs() - KEPT_MS) await cursor.delete();
      }
      await tx.done;
    },
  };
}
