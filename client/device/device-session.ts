import { ApiError } from '../api/http.ts';
import { asOf } from './as-of.ts';
import { LATE, line } from './line.ts';
import { keepSending, thisDevice } from './this-device.ts';

type WithPerson = { person: { id: string; name: string } };

/**
 * Who is signed in, as the server says it; as it said it last where it cannot be asked, or hangs. From then on the things
 * of this page are theirs.
 */
export async function readSession<T extends WithPerson>(
  ask: () => Promise<T>,
  check: (answer: unknown) => T,
): Promise<T> {
  const asked = askServer(ask);
  const answer = await line.wait(asked);
  if (answer !== LATE) return answer;
  const kept = await thisDevice.keptSession();
  if (!kept) return asked;
  const session = check(kept.answer);
  const { id, name } = session.person;
  await thisDevice.reopen({ id, name });
  asOf.set('/api/session', kept.fetchedAtMs);
  return session;
}

/** Whatever it says counts, in time or late. */
async function askServer<T extends WithPerson>(ask: () => Promise<T>): Promise<T> {
  try {
    const session = await ask();
    const { id, name } = session.person;
    await thisDevice.open({ id, name }, session);
    asOf.set('/api/session', null);
    keepSending.hope();
    return session;
  } catch (error) {
    if (error instanceof ApiError && error.status === 401) await thisDevice.forget();
    throw error;
  }
}

export function leaveDevice(): Promise<void> {
  return thisDevice.leave();
}
