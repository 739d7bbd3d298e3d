import { compareNow, hashNow } from './password-hash.ts';
import type { HashTask } from './password-hash.ts';

/** Runs in a thread of its own (server/pool.ts names this file). */
export default function work(task: HashTask): string | boolean {
  return task.do === 'hash' ? hashNow(task.prehash) : compareNow(task.prehash, task.hash);
}
