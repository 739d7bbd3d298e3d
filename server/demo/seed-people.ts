import { randomUUID } from 'node:crypto';
import type { AppParts } from '#server/app.ts';
import { createPasswords } from '#server/people/passwords.ts';
import { createPeopleRepository } from '#server/people/people-repository.ts';
import { createShopRepository } from '#server/people/shop-repository.ts';
import type { Person } from '#shared/schemas/people.ts';
import { DEMO_PASSWORD, DEMO_PEOPLE, DEMO_SHOP } from './demo-people.ts';

export type DemoStaff = Record<(typeof DEMO_PEOPLE)[number]['key'], Person>;

/** The shop and whoever works there. */
export async function seedPeople({ db, workers, secrets, now }: AppParts): Promise<DemoStaff> {
  const passwords = createPasswords(workers.passwords, secrets.pepper);
  const people = createPeopleRepository(db);
  await createShopRepository(db).insert(DEMO_SHOP, true);

  const hired = await Promise.all(
    DEMO_PEOPLE.map(async ({ key, ...told }) => {
      const person: Person = { ...told, id: randomUUID(), disabledAtMs: null };
      const passwordHash = await passwords.hash(DEMO_PASSWORD);
      await people.insert({ ...person, passwordHash, createdAtMs: now().getTime() });
      return [key, person] as const;
    }),
  );
  const find = (key: keyof DemoStaff) => needed(hired.find(([each]) => each === key)?.[1], key);
  return { nora: find('nora'), imelda: find('imelda'), tom: find('tom'), ada: find('ada') };
}

/** @throws {Error} the demo's own data name something that is not there */
export function needed<Thing>(thing: Thing | undefined, name: string): Thing {
  if (thing === undefined) throw new Error(`the demo shop has no ${name}`);
  return thing;
}
