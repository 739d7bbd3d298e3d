import type { Shelf } from '../api/http.ts';
import type { AsOf } from './as-of.ts';
import type { Device } from './device.ts';
import { createLine, LATE } from './line.ts';

/** What the screens on site need; nothing else of the shop lies on a phone (ASVS 14.3.3). */
const ON_SITE = [
  /^\/api\/rounds(\?day=[\d-]+)?$/,
  /^\/api\/(visits|machines|jobs|runs)\/[\w-]+$/,
  /^\/api\/machines\/[\w-]+\/(runs|references)$/,
  /^\/api\/runs\/[\w-]+\/trace\?columns=\d+$/,
  /^\/api\/(ratings|probes|calibrations)$/,
];

/** Keeps the server's answers as they come, and gives them where it cannot be asked. */
export function createShelf(
  device: Device,
  asOf: AsOf,
  onLate: (url: string) => void,
  line = createLine(),
): Shelf {
  async function keep(url: string, answer: unknown): Promise<void> {
    const person = device.person();
    if (person) await device.answers.put(person.id, url, answer);
  }

  async function find<T>(url: string, check: (answer: unknown) => T) {
    const person = device.person();
    const kept = person ? await device.answers.find(person.id, url) : undefined;
    if (!kept) return undefined;
    try {
      return { data: check(kept.answer), fetchedAtMs: kept.fetchedAtMs };
    } catch {
      // An older version put it there in another shape: as good as not kept.
      return undefined;
    }
  }

  return async (url, ask, check) => {
    if (!ON_SITE.some((pattern) => pattern.test(url))) return check(await ask());
    let isLate = false;
    const asked = ask().then((answer) => {
      const data = check(answer);
      // Not waited for: a full store is no reason to hold an answer back.
      keep(url, answer).catch(() => device.answers.clear());
      asOf.set(url, null);
      if (isLate) onLate(url);
      return data;
    });
    // Told of further down; it may fail before what lies here was found.
    asked.catch(() => {});
    const kept = await find(url, check);
    if (!kept) return asked;
    const answer = await line.wait(asked);
    if (answer !== LATE) return answer;
    isLate = true;
    asOf.set(url, kept.fetchedAtMs);
    return kept.data;
  };
}
