import { randomUUID } from 'node:crypto';
import { isUniqueViolation } from '#server/db.ts';
import { AppError, fieldFault, notFound } from '#server/errors.ts';
import type { NewPerson, Person } from '#shared/schemas/people.ts';
import type { Audit } from './audit-repository.ts';
import type { Passwords } from './passwords.ts';
import type { PeopleRepository } from './people-repository.ts';
import type { SessionRepository } from './session-repository.ts';

export type PeopleService = ReturnType<typeof createPeopleService>;

export type PeopleParts = {
  people: PeopleRepository;
  sessions: SessionRepository;
  passwords: Passwords;
  audit: Audit;
  now: () => Date;
};

export function createPeopleService({ people, sessions, passwords, audit, now }: PeopleParts) {
  async function get(id: string): Promise<Person> {
    const person = await people.find(id);
    if (!person) throw notFound();
    return person;
  }

  return {
    list: people.list,
    listTechnicians: people.listTechnicians,

    async create(by: Person, { password, ...asked }: NewPerson): Promise<Person> {
      const person = { ...asked, id: randomUUID(), disabledAtMs: null };
      const passwordHash = await passwords.hash(password);
      try {
        await people.insert({ ...person, passwordHash, createdAtMs: now().getTime() });
      } catch (error) {
        if (isUniqueViolation(error)) throw fieldFault('email', 'Somebody has this address', 409);
        throw error;
      }
      const details = { role: person.role };
      await audit({ userId: by.id, event: 'user_created', subject: person.id, details });
      return person;
    },

    /** Ends what they have open at once. Nobody disables themselves, so an owner always remains. */
    async disable(by: Person, id: string): Promise<Person> {
      if (by.id === id) throw new AppError(409, 'own-account', 'You cannot disable yourself.');
      const person = await get(id);
      const disabledAtMs = person.disabledAtMs ?? now().getTime();
      await people.setDisabledAt(id, disabledAtMs);
      await sessions.endAllOf(id, disabledAtMs, null);
      await audit({ userId: by.id, event: 'user_disabled', subject: id });
      return { ...person, disabledAtMs };
    },

    async enable(by: Person, id: string): Promise<Person> {
      const person = await get(id);
      await people.setDisabledAt(id, null);
      await audit({ userId: by.id, event: 'user_enabled', subject: id });
      return { ...person, disabledAtMs: null };
    },
  };
}
