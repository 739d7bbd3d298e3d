import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { AppError } from '#server/errors.ts';
import { validate } from '#server/validate.ts';
import { newPersonSchema } from '#shared/schemas/people.ts';
import type { Person, Shop } from '#shared/schemas/people.ts';
import { createAudit } from './audit-repository.ts';
import { hashNow, prehash } from './password-hash.ts';
import { createPeopleRepository } from './people-repository.ts';
import { createShopRepository } from './shop-repository.ts';

/** What the owner sees first; the Shop page changes it. */
const NEW_SHOP: Omit<Shop, 'zone'> = {
  name: 'Our shop',
  town: '',
  phone: '',
  email: '',
  unit: 'F',
  minCycles: 3,
};

export type OwnerAsked = { name: string; email: string; password: string };

/**
 * The first person of an installation without the demo, and the shop with them.
 * @throws {AppError} 409 where there is an owner; 400 where a field is at fault
 */
export async function makeOwner(
  db: Knex,
  pepper: Buffer,
  { asked, now, zone }: { asked: OwnerAsked; now: () => Date; zone: string },
): Promise<Person> {
  const { password, ...fields } = validate(newPersonSchema, { ...asked, role: 'owner' });
  const passwordHash = hashNow(prehash(password, pepper));
  const person: Person = { ...fields, id: randomUUID(), disabledAtMs: null };
  return db.transaction(async (trx) => {
    const people = createPeopleRepository(trx);
    const shops = createShopRepository(trx);
    if ((await people.countOwners()) > 0) {
      throw new AppError(
        409,
        'owner-exists',
        'There is an owner. People are added on the Shop page.',
      );
    }
    if (!(await shops.find())) await shops.insert({ ...NEW_SHOP, zone }, false);
    await people.insert({ ...person, passwordHash, createdAtMs: now().getTime() });
    const entry = { userId: person.id, event: 'user_created', subject: person.id } as const;
    await createAudit(trx, now)(entry);
    return person;
  });
}
