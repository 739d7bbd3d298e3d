import { ApiError } from '../api/http.ts';
import { asOf } from './as-of.ts';
import { isAway } from './shelf.ts';
import { keepSending, thisDevice } from './this-device.ts';

type WithPerson = { person: { id: string; name: string } };

/**
 * Who is signed in, as the server says it; as it said it last where it cannot be asked. From then on the things of this
 * page are theirs.
 */
export async function readSession<T extends WithPerson>(
  ask: () => Promise<T>,
  check: (answer: unknown) => T,
): Promise<T> {
  try {
    const session = await ask();
    const { id, name } = session.person;
    await thisDevice.open({ id, name }, session);
    asOf.set('/api/session', null);
    keepSending.hope();
    return session;
  } catch (error) {
    if (error instanceof ApiError && error.status === 401) await thisDevice.forget();
    const kept = isAway(error) ? await thisDevice.keptSession() : undefined;
    if (!kept) throw error;
    const session = check(kept.answer);
    const { id, name } = session.person;
    await thisDevice.reopen({ id, name });
    asOf.set('/api/session', kept.fetchedAtMs);
    return session;
  }
}

export function leaveDevice(): Promise<void> {
  return thisDevice.leave();
}
