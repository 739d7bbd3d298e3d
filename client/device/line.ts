import { ApiError } from '../api/http.ts';

/** On a bad line, what lies here already is shown after so long; the line's answer follows when it comes. */
const PATIENCE_MS = 4_000;
/** After one question hung, the next are not waited for as long, until something answers. */
const SHORT_MS = 250;

export const LATE = Symbol();

/** Neither the server nor anything before it answered. A proxy says so with 502 to 504. */
export function isAway(error: unknown): boolean {
  return error instanceof ApiError && [0, 502, 503, 504].includes(error.status);
}

export type Line = ReturnType<typeof createLine>;

/** How patient a page is with the network: a line that hangs says neither yes nor no. */
export function createLine() {
  let patienceMs = PATIENCE_MS;
  return {
    /** The answer; LATE where there was none in time, or nobody to give one. @throws a refusal */
    wait<T>(asked: Promise<T>): Promise<T | typeof LATE> {
      return new Promise((resolve, reject) => {
        const timer = setTimeout(() => {
          patienceMs = SHORT_MS;
          resolve(LATE);
        }, patienceMs);
        asked
          .finally(() => clearTimeout(timer))
          .then(
            (answer) => {
              patienceMs = PATIENCE_MS;
              resolve(answer);
            },
            (error: unknown) => (isAway(error) ? resolve(LATE) : reject(error)),
          );
      });
    },
  };
}

/** Of this page. */
export const line = createLine();
