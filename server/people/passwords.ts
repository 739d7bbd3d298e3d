import type { Piscina } from 'piscina';
import { TooManyError } from '#server/errors.ts';
import { NOBODYS_HASH, prehash } from './password-hash.ts';
import type { HashTask } from './password-hash.ts';

export type Passwords = ReturnType<typeof createPasswords>;

/** Hashing off the main thread, one at a time, with a short queue. */
export function createPasswords(pool: Piscina, pepper: Buffer) {
  async function run(task: HashTask): Promise<unknown> {
    try {
      return await pool.run(task);
    } catch (error) {
      if (error instanceof Error && /queue is at limit/i.test(error.message)) throw tooBusy();
      throw error;
    }
  }

  return {
    async hash(password: string): Promise<string> {
      return String(await run({ do: 'hash', prehash: prehash(password, pepper) }));
    },

    /** `hash` undefined: there is no such person, and finding that out takes as long. */
    async matches(password: string, hash: string | undefined): Promise<boolean> {
      const prehashed = prehash(password, pepper);
      const same = await run({ do: 'compare', prehash: prehashed, hash: hash ?? NOBODYS_HASH });
      return same === true && hash !== undefined;
    },
  };
}

function tooBusy(): TooManyError {
  return new TooManyError('busy', 'Too many people are signing in. Try again in a minute.', 60);
}
