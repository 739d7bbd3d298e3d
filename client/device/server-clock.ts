import type { PostSendings } from './sender.ts';

/** The server's clock and this device's at one moment. `uMs`: how far apart question and answer were. */
export type ServerTime = { serverMs: number; deviceMs: number; monotonicMs: number; uMs: number };

/** Reads the server's clock off its answers: it lay between question and answer, taken as the middle. */
export function createServerClock() {
  let last: ServerTime | null = null;
  return {
    last: (): ServerTime | null => last,
    watch(post: PostSendings): PostSendings {
      return async (sendings) => {
        const asked = { monotonicMs: performance.now(), deviceMs: Date.now() };
        const answer = await post(sendings);
        const [monotonicMs, deviceMs] = [performance.now(), Date.now()];
        // Of a phone that slept over the answer only its own clock tells.
        const tookMs = Math.max(monotonicMs - asked.monotonicMs, deviceMs - asked.deviceMs);
        const uMs = tookMs / 2;
        last = { serverMs: answer.serverNowMs + uMs, deviceMs, monotonicMs, uMs };
        return answer;
      };
    },
  };
}
