import { Agent, get } from 'node:http';

/** Fifty requests a second: enough for a 99th percentile, little enough to leave the machine to the server. */
const EVERY_MS = 20;

export type Latencies = { p50Ms: number; p99Ms: number; maxMs: number; requests: number };

/**
 * Sends a small GET at a steady pace for as long as `work` lasts, whether earlier ones were answered or not:
 * a server that stalls is not spared by requests that never came.
 */
export async function measureLatency(
  url: string,
  cookie: string,
  work: Promise<unknown>,
): Promise<Latencies> {
  const agent = new Agent({ keepAlive: true, maxSockets: 16 });
  const timesMs: number[] = [];
  const open: Promise<void>[] = [];
  let isOver = false;
  void work.catch(() => undefined).finally(() => (isOver = true));

  for (let dueMs = performance.now(); !isOver; dueMs += EVERY_MS) {
    const waitMs = dueMs - performance.now();
    await new Promise((resolve) => setTimeout(resolve, Math.max(0, waitMs)));
    const startMs = performance.now();
    open.push(
      request(url, cookie, agent).then(() => void timesMs.push(performance.now() - startMs)),
    );
  }
  await Promise.all(open);
  agent.destroy();
  await work;

  timesMs.sort((a, b) => a - b);
  const at = (share: number) => timesMs[Math.floor(share * (timesMs.length - 1))] ?? NaN;
  return { p50Ms: at(0.5), p99Ms: at(0.99), maxMs: at(1), requests: timesMs.length };
}

function request(url: string, cookie: string, agent: Agent): Promise<void> {
  return new Promise((resolve, reject) => {
    const sent = get(url, { agent, headers: { cookie } }, (response) => {
      response.resume();
      response.on('end', () => {
        if (response.statusCode === 200) resolve();
        else reject(new Error(`${url} answered ${response.statusCode}`));
      });
    });
    sent.on('error', (error) => {
      // A kept connection that the server closed just then: a browser sends it again, too.
      if (sent.reusedSocket) request(url, cookie, agent).then(resolve, reject);
      else reject(error);
    });
  });
}
