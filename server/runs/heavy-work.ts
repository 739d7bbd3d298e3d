import { TooManyError } from '#server/errors.ts';

const MOST_AT_ONCE = 20;
const RETRY_AFTER_S = 5;

/** Bounds what the workers are asked for: one heavy piece of work a person, and so many in all. */
export function createHeavyWork() {
  const busy = new Set<string>();

  /** Takes the person's place; what it returns gives it back, once. */
  function take(userId: string): () => void {
    if (busy.has(userId)) {
      throw tooMany('Another of your files is still being read. Try again in a moment.');
    }
    if (busy.size >= MOST_AT_ONCE) {
      throw tooMany('Many files are being read right now. Try again in a moment.');
    }
    busy.add(userId);
    return () => void busy.delete(userId);
  }
  return { take };
}

function tooMany(message: string): TooManyError {
  return new TooManyError('busy', message, RETRY_AFTER_S);
}
