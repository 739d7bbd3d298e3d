import { randomUUID } from 'node:crypto';
import type { KeyObject } from 'node:crypto';
import { AppError, fieldFault } from '#server/errors.ts';
import type { PasswordChange, Person, SignIn } from '#shared/schemas/people.ts';
import type { Audit } from './audit-repository.ts';
import type { BackOff } from './back-off.ts';
import type { Passwords } from './passwords.ts';
import type { PeopleRepository } from './people-repository.ts';
import type { SessionRepository, StoredSession } from './session-repository.ts';
import { readToken, signToken } from './session-token.ts';

const DAY_MS = 86_400_000;
export const IDLE_MS = 14 * DAY_MS;
export const ABSOLUTE_MS = 30 * DAY_MS;
/** Being seen is written down once in this time, not at every request. */
const SEEN_EVERY_MS = 5 * 60_000;

export type SignedIn = { person: Person; sessionId: string };
export type SignInFrom = {
  /** What the browser held until now; it gives way, so that no session is left behind. */
  oldToken: string | undefined;
  address: string;
};
export type SessionService = ReturnType<typeof createSessionService>;

export type SessionParts = {
  people: PeopleRepository;
  sessions: SessionRepository;
  passwords: Passwords;
  backOff: BackOff;
  audit: Audit;
  tokenKey: KeyObject;
  now: () => Date;
};

export function createSessionService(parts: SessionParts) {
  const { people, sessions, passwords, backOff, audit, tokenKey, now } = parts;

  /** Every refusal is the same and takes as long: unknown, wrong, or disabled. */
  async function checkPassword({ email, password }: SignIn, address: string): Promise<Person> {
    const { failures } = await backOff.startTry(email);
    const stored = await people.findByEmail(email.trim().toLowerCase());
    const matches = await passwords.matches(password, stored?.passwordHash);
    const person = stored?.person;
    if (person && matches && person.disabledAtMs === null) {
      await backOff.succeeded(email);
      return person;
    }
    const event = backOff.isLocking(failures) ? 'authn_login_lock' : 'authn_login_fail';
    const details = { failures, address };
    await audit({ userId: person?.id ?? null, event, subject: 'session', details });
    throw new AppError(401, 'wrong-sign-in', 'That e-mail and password do not go together.');
  }

  async function open(person: Person): Promise<{ token: string; expiresAtMs: number }> {
    const nowMs = now().getTime();
    const id = randomUUID();
    const expiresAtMs = nowMs + ABSOLUTE_MS;
    await sessions.insert({
      id,
      userId: person.id,
      createdAtMs: nowMs,
      seenAtMs: nowMs,
      endedAtMs: null,
    });
    const token = signToken({ sessionId: id, userId: person.id }, tokenKey, expiresAtMs);
    return { token, expiresAtMs };
  }

  /** Who holds this token now; undefined when it is not ours, ended, too old, or theirs no more. */
  async function find(token: string): Promise<SignedIn | undefined> {
    const nowMs = now().getTime();
    const claims = readToken(token, tokenKey, nowMs);
    const found = claims && (await sessions.find(claims.sessionId));
    if (!claims || !found || found.person.id !== claims.userId) return undefined;
    const { session, person } = found;
    if (person.disabledAtMs !== null || !isLive(session, nowMs)) return undefined;
    if (nowMs - session.seenAtMs >= SEEN_EVERY_MS) await sessions.setSeenAt(session.id, nowMs);
    return { person, sessionId: session.id };
  }

  return {
    async signIn(asked: SignIn, { oldToken, address }: SignInFrom) {
      const person = await checkPassword(asked, address);
      const old = oldToken === undefined ? undefined : await find(oldToken);
      if (old) await sessions.end(old.sessionId, now().getTime());
      const opened = await open(person);
      const details = { address };
      await audit({ userId: person.id, event: 'authn_login_success', subject: 'session', details });
      return { person, ...opened };
    },

    find,

    async signOut({ person, sessionId }: SignedIn): Promise<void> {
      await sessions.end(sessionId, now().getTime());
      await audit({ userId: person.id, event: 'session_ended', subject: 'session' });
    },

    /** Ends every other session of the person. */
    async changePassword({ person, sessionId }: SignedIn, change: PasswordChange): Promise<void> {
      const log = { userId: person.id, subject: person.id };
      await backOff.startTry(person.email);
      const stored = await people.findByEmail(person.email);
      if (!(await passwords.matches(change.current, stored?.passwordHash))) {
        await audit({ ...log, event: 'authn_password_change_fail' });
        throw fieldFault('current', 'This is not your present password');
      }
      await backOff.succeeded(person.email);
      await people.setPasswordHash(person.id, await passwords.hash(change.next));
      await sessions.endAllOf(person.id, now().getTime(), sessionId);
      await audit({ ...log, event: 'authn_password_change' });
    },
  };
}

function isLive(session: StoredSession, nowMs: number): boolean {
  return (
    session.endedAtMs === null &&
    nowMs - session.seenAtMs < IDLE_MS &&
    nowMs - session.createdAtMs < ABSOLUTE_MS
  );
}
