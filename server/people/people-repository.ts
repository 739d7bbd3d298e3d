import type { Knex } from 'knex';
import type { Person, Role } from '#shared/schemas/people.ts';

type UserRow = {
  id: string;
  name: string;
  email: string;
  role: Role;
  password_hash: string;
  created_at_ms: number;
  disabled_at_ms: number | null;
};

export type PersonToStore = Person & { passwordHash: string; createdAtMs: number };
export type PeopleRepository = ReturnType<typeof createPeopleRepository>;

export function createPeopleRepository(db: Knex) {
  return {
    async list(): Promise<Person[]> {
      return (await db<UserRow>('users').orderBy('name')).map(toPerson);
    },

    /** Those who may be sent on a visit: technicians, then owners who go themselves. */
    async listTechnicians(): Promise<{ id: string; name: string }[]> {
      const rows = await db<UserRow>('users')
        .whereIn('role', ['technician', 'owner'])
        .whereNull('disabled_at_ms')
        .orderBy([{ column: 'role', order: 'desc' }, { column: 'name' }]);
      return rows.map(({ id, name }) => ({ id, name }));
    },

    async find(id: string): Promise<Person | undefined> {
      const row = await db<UserRow>('users').where({ id }).first();
      return row && toPerson(row);
    },

    /** With the hash beside the person, so that it does not travel on with them. */
    async findByEmail(
      email: string,
    ): Promise<{ person: Person; passwordHash: string } | undefined> {
      const row = await db<UserRow>('users').where({ email }).first();
      return row && { person: toPerson(row), passwordHash: row.password_hash };
    },

    async insert(person: PersonToStore): Promise<void> {
      await db('users').insert({
        id: person.id,
        name: person.name,
        email: person.email,
        role: person.role,
        password_hash: person.passwordHash,
        created_at_ms: person.createdAtMs,
        disabled_at_ms: person.disabledAtMs,
      });
    },

    async setDisabledAt(id: string, disabledAtMs: number | null): Promise<void> {
      await db('users').where({ id }).update({ disabled_at_ms: disabledAtMs });
    },

    async setPasswordHash(id: string, passwordHash: string): Promise<void> {
      await db('users').where({ id }).update({ password_hash: passwordHash });
    },

    async countOwners(): Promise<number> {
      const row = await db('users').where({ role: 'owner' }).count({ n: '*' }).first();
      return Number(row?.n ?? 0);
    },
  };
}

function toPerson(row: UserRow): Person {
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    role: row.role,
    disabledAtMs: row.disabled_at_ms === null ? null : Number(row.disabled_at_ms),
  };
}
