/**
 * The part of the Web Locks API that the client uses, for tests in Node: one holder a name, first come first served
 * (https://www.w3.org/TR/web-locks/). Tabs of one browser share it.
 */
export function createWebLocks(): Pick<LockManager, 'request'> {
  const tails = new Map<string, Promise<unknown>>();

  async function request<T>(name: string, ...rest: unknown[]): Promise<T> {
    const work = rest.at(-1) as (lock: Lock) => Promise<T>;
    const before = tails.get(name) ?? Promise.resolve();
    const done = before.catch(() => {}).then(() => work({ name, mode: 'exclusive' }));
    tails.set(name, done);
    return done;
  }
  return { request };
}
